import { type BlockItems, blockKey, type Item, weighBlocks } from "./block-graph";
import { decodeText } from "./decode";
import type { Drawing, ReadResult } from "./drawing";
import { Expansion } from "./expand";
import { LayerTable } from "./layer-table";
import type { NormalEntity } from "./normal-entity";
import { EntityParser } from "./parse";
import { type DxfSections, readSections } from "./sections";
import { sniffContent } from "./sniff";
import { otherUnitOfCode, unitOfCode } from "./units-code";

function readItems(text: string): DxfSections<Item> {
  const parser = new EntityParser();
  const sections = readSections<Item>(text, (raw, isCut) => parser.add(raw, isCut));
  parser.flush();
  return sections;
}

function notesOf(sections: DxfSections<Item>, decoding: readonly string[]): string[] {
  const notes = [...decoding];
  const { scan, header } = sections;
  if (!scan.ended) {
    notes.push(
      sections.entitiesClosed
        ? "The file's end mark is missing; everything drawn was read."
        : "The file is cut short: it was read as far as it goes, and what came after is missing.",
    );
  }
  if (scan.strayLines > 0) notes.push(`${scan.strayLines} lines out of step were passed over.`);
  const items = [sections.entities, ...sections.blocks.map((block) => block.entities)].flat();
  const mended = items.filter(({ entity }) => entity.mended).length;
  if (mended > 0)
    notes.push(`Numbers of ${mended} entities were written with a comma or the letter D and were mended.`);
  const other = otherUnitOfCode(header.units);
  if (other) notes.push(`The file says that it is drawn in ${other}.`);
  if (!sections.hasEntities) notes.push("The file has no section of drawn entities.");
  return notes;
}

function countTypes(entities: readonly NormalEntity[]): Record<string, number> {
  const counts = new Map<string, number>();
  for (const { type } of entities) counts.set(type, (counts.get(type) ?? 0) + 1);
  return Object.fromEntries(counts);
}

function layersOf(table: LayerTable, paths: Drawing["paths"]): Drawing["layers"] {
  const counts = new Map<string, number>();
  for (const { layer } of paths) counts.set(layer, (counts.get(layer) ?? 0) + 1);
  return table
    .all()
    .map(({ name }) => ({ name, hidden: table.isHidden(name), count: counts.get(name) ?? 0 }));
}

/**
 * Reads a DXF file. Paths are in drawing units, blocks expanded; what is not read as curves is listed in `ignored`.
 * Time and memory grow with the size of the file, and with blocks up to the cap of `MOST_EXPANDED`. Never throws:
 * bytes that are no DXF come back with a sentence for the person who sent them.
 */
export function readDrawing(bytes: Uint8Array): ReadResult {
  const content = sniffContent(bytes);
  if (!content.ok) return content;
  const { text, notes } = decodeText(bytes);
  const sections = readItems(text);
  const model = sections.entities;
  const blocks = new Map<string, BlockItems>();
  for (const { name, base, entities } of sections.blocks)
    blocks.set(blockKey(name), { name, base, items: entities });
  const layers = new LayerTable(sections.layers);
  const expansion = new Expansion(weighBlocks(blocks), layers);
  const inModelSpace = model.filter(({ entity }) => !entity.paperSpace);
  for (const [ordinal, item] of inModelSpace.entries()) expansion.add(item, ordinal);
  for (const item of model) if (item.entity.paperSpace) expansion.addOnPaper(item);
  return {
    ok: true,
    drawing: {
      unit: "drawing",
      declared: unitOfCode(sections.header.units),
      layers: layersOf(layers, expansion.paths),
      entities: countTypes(inModelSpace.map(({ entity }) => entity)),
      paths: expansion.paths,
      texts: expansion.texts,
      ignored: [...expansion.ignored.values()],
      notes: notesOf(sections, notes),
    },
  };
}
