import DxfParser, { type IEntity } from "dxf-parser";
import { ENTITY_READERS } from "./curve-readers";
import { type EntityContent, GroupNumbers, refused } from "./entity-content";
import { type NormalEntity, normaliseEntity, type RawEntity } from "./normal-entity";

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

/** Entities parsed in one go: enough to make the parser's start cheap, few enough to keep its memory small. */
const BATCH = 2000;

const OPENING = "0\nSECTION\n2\nENTITIES\n";
const CLOSING = "\n0\nENDSEC\n0\nEOF";

/** What an entity came to; `content` is there once its batch is parsed. */
export interface ParsedItem {
  readonly entity: NormalEntity;
  content: EntityContent;
}

/**
 * Reads entities through the parser, a batch at a time. The parser sees one section of checked groups with our own
 * ordinals as handles, so nothing of a damaged file can hold it up or make it speak.
 */
export class EntityParser {
  readonly #parser = new DxfParser();
  #items: ParsedItem[] = [];
  #lines: string[] = [];

  constructor() {
    for (const [type, read] of ENTITY_READERS) {
      this.#parser.registerEntityHandler(handlerClass(type as Handler["ForEntityName"], read));
    }
  }

  /** Takes the next entity; its content is settled by the next `flush` at the latest. */
  add(raw: RawEntity, isCut: boolean): ParsedItem {
    const { entity, why } = normaliseEntity(raw, isCut, this.#lines, this.#items.length);
    if (why !== null) return { entity, content: refused(why) };
    const item = { entity, content: refused("damaged") };
    this.#items.push(item);
    if (this.#items.length >= BATCH) this.flush();
    return item;
  }

  flush(): void {
    if (this.#items.length === 0) return;
    const text = `${OPENING}${this.#lines.join("\n")}${CLOSING}`;
    for (const parsed of this.#parser.parse(text)?.entities ?? []) {
      this.#items[Number(parsed.handle)].content = (parsed as ReadEntity).content;
    }
    this.#items = [];
    this.#lines = [];
  }
}
