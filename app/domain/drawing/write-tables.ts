import type { DxfLines } from "./dxf-lines";
import type { DxfVersion } from "./write-entities";

/** The line type named on every layer. */
const CONTINUOUS = "CONTINUOUS";
const WHITE = 7;

/** One table with its records; `record` writes what follows a record's name. */
function writeTable(
  out: DxfLines,
  version: DxfVersion,
  table: string,
  records: readonly { readonly name: string; readonly marker: string; readonly body: () => void }[],
): string[] {
  const isR2000 = version === "R2000";
  const handle = isR2000 ? out.newHandle() : "";
  out.text(0, "TABLE");
  out.text(2, table);
  if (isR2000) {
    out.text(5, handle);
    out.text(330, "0");
    out.text(100, "AcDbSymbolTable");
  }
  out.integer(70, records.length);
  if (isR2000 && table === "DIMSTYLE") out.text(100, "AcDbDimStyleTable");
  const handles = records.map(({ name, marker, body }) => {
    const own = isR2000 ? out.newHandle() : "";
    out.text(0, table);
    if (isR2000) {
      out.text(5, own);
      out.text(330, handle);
      out.text(100, "AcDbSymbolTableRecord");
      out.text(100, marker);
    }
    out.text(2, name);
    body();
    return own;
  });
  out.text(0, "ENDTAB");
  return handles;
}

const nothing = () => {};

/** Line types, layers and, for R2000, the tables it must have; gives the handles of the two layouts' block records. */
export function writeTables(
  out: DxfLines,
  version: DxfVersion,
  layers: readonly string[],
): { readonly model: string; readonly paper: string } {
  const isR2000 = version === "R2000";
  out.text(0, "SECTION");
  out.text(2, "TABLES");
  const lineTypes = isR2000 ? ["ByBlock", "ByLayer", CONTINUOUS] : [CONTINUOUS];
  const lineType = (name: string) => ({
    name,
    marker: "AcDbLinetypeTableRecord",
    body: () => {
      out.integer(70, 0);
      out.text(3, name === CONTINUOUS ? "Solid line" : "");
      out.integer(72, 65);
      out.integer(73, 0);
      out.real(40, 0);
    },
  });
  writeTable(out, version, "LTYPE", lineTypes.map(lineType));
  const layer = (name: string) => ({
    name,
    marker: "AcDbLayerTableRecord",
    body: () => {
      out.integer(70, 0);
      out.integer(62, WHITE);
      out.text(6, CONTINUOUS);
    },
  });
  writeTable(out, version, "LAYER", [...new Set(["0", ...layers])].map(layer));
  const [model, paper] = isR2000 ? writeRequiredTables(out) : ["", ""];
  out.text(0, "ENDSEC");
  return { model, paper };
}

function writeRequiredTables(out: DxfLines): string[] {
  const styleBody = () => {
    out.integer(70, 0);
    out.real(40, 0);
    out.real(41, 1);
    out.real(50, 0);
    out.integer(71, 0);
    out.real(42, 2.5);
    out.text(3, "txt");
    out.text(4, "");
  };
  writeTable(out, "R2000", "VPORT", []);
  writeTable(out, "R2000", "STYLE", [
    { name: "Standard", marker: "AcDbTextStyleTableRecord", body: styleBody },
  ]);
  writeTable(out, "R2000", "VIEW", []);
  writeTable(out, "R2000", "UCS", []);
  const flags = () => out.integer(70, 0);
  writeTable(out, "R2000", "APPID", [{ name: "ACAD", marker: "AcDbRegAppTableRecord", body: flags }]);
  writeTable(out, "R2000", "DIMSTYLE", []);
  const blockRecord = (name: string) => ({ name, marker: "AcDbBlockTableRecord", body: nothing });
  return writeTable(out, "R2000", "BLOCK_RECORD", ["*Model_Space", "*Paper_Space"].map(blockRecord));
}

/** The two layouts' blocks (R2000), both empty: the drawing itself stands in ENTITIES. */
export function writeBlocks(
  out: DxfLines,
  version: DxfVersion,
  owners: { model: string; paper: string },
): void {
  out.text(0, "SECTION");
  out.text(2, "BLOCKS");
  const layouts =
    version === "R2000"
      ? [["*Model_Space", owners.model] as const, ["*Paper_Space", owners.paper] as const]
      : [];
  for (const [name, owner] of layouts) {
    const open = (type: string, marker: string) => {
      out.text(0, type);
      out.text(5, out.newHandle());
      out.text(330, owner);
      out.text(100, "AcDbEntity");
      out.text(8, "0");
      out.text(100, marker);
    };
    open("BLOCK", "AcDbBlockBegin");
    out.text(2, name);
    out.integer(70, 0);
    out.point(10, { x: 0, y: 0 });
    out.text(3, name);
    out.text(1, "");
    open("ENDBLK", "AcDbBlockEnd");
  }
  out.text(0, "ENDSEC");
}

/** The root dictionary R2000 asks for, with the empty dictionary of groups. */
export function writeObjects(out: DxfLines): void {
  out.text(0, "SECTION");
  out.text(2, "OBJECTS");
  const root = out.newHandle();
  const groups = out.newHandle();
  const dictionary = (handle: string, owner: string) => {
    out.text(0, "DICTIONARY");
    out.text(5, handle);
    out.text(330, owner);
    out.text(100, "AcDbDictionary");
    out.integer(281, 1);
  };
  dictionary(root, "0");
  out.text(3, "ACAD_GROUP");
  out.text(350, groups);
  dictionary(groups, root);
  out.text(0, "ENDSEC");
}
