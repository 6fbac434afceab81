import DxfParser, { type IEntity } from "dxf-parser";
import { ENTITY_READERS } from "./curve-readers";
import { type EntityContent, GroupNumbers } from "./entity-content";
import type { NormalEntity } from "./normal-entity";

type HandlerClass = Parameters<DxfParser["registerEntityHandler"]>[0];
type Handler = InstanceType<HandlerClass>;
type Scanner = Parameters<Handler["parseEntity"]>[0];
type Group = Parameters<Handler["parseEntity"]>[1];

interface ReadEntity extends IEntity {
  readonly content: EntityContent;
}

/** A parser handler that reads one entity type by the reader given for it. */
function handlerClass(
  type: Handler["ForEntityName"],
  read: (numbers: GroupNumbers) => EntityContent,
): HandlerClass {
  return class implements Handler {
    ForEntityName = type;

    parseEntity(scanner: Scanner, opening: Group): ReadEntity {
      const numbers = new GroupNumbers();
      let handle = Number.NaN;
      for (let group = scanner.next(); group.code !== 0; group = scanner.next()) {
        if (group.code === 5) handle = Number(group.value);
        else if (typeof group.value === "number") numbers.push(group.code, group.value);
      }
      return { type: String(opening.value), handle, content: read(numbers) } as ReadEntity;
    }
  };
}

/**
 * The contents of normalised entities, in their order; null for those without a body. The parser sees one section of
 * checked groups with our own ordinals as handles, so nothing of a damaged file can hold it up or make it speak.
 */
export function parseEntities(entities: readonly NormalEntity[]): (EntityContent | null)[] {
  const lines: string[] = ["0", "SECTION", "2", "ENTITIES"];
  for (const [index, { type, body }] of entities.entries()) {
    if (!("lines" in body)) continue;
    lines.push("0", type, "5", String(index));
    for (const line of body.lines) lines.push(line);
  }
  lines.push("0", "ENDSEC", "0", "EOF");

  const parser = new DxfParser();
  for (const [type, read] of ENTITY_READERS) {
    parser.registerEntityHandler(handlerClass(type as Handler["ForEntityName"], read));
  }
  const contents: (EntityContent | null)[] = entities.map(() => null);
  for (const entity of parser.parse(lines.join("\n"))?.entities ?? []) {
    contents[Number(entity.handle)] = (entity as ReadEntity).content;
  }
  return contents;
}
