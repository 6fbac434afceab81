import {
  type Affine,
  affineApply,
  affineCompose,
  affineDeterminant,
  IDENTITY,
  transformPath,
} from "../geometry";
import { blockKey, type Item, itemWeight, type WeighedBlock } from "./block-graph";
import type { DrawnPath, DrawnText, IgnoredReason } from "./drawing";
import type { Insert } from "./entity-content";
import type { LayerTable } from "./layer-table";
import { FARTHEST } from "./numbers";
import { readTexts } from "./texts";

/** Curves that inserts may come to in one drawing; an insert that would go beyond is left out whole and listed. */
export const MOST_EXPANDED = 300_000;

/** Where an item stands: the map to the drawing, and what it takes over from the inserts above it. */
interface Standing {
  readonly place: Affine;
  readonly block: string | null;
  /** Layer that things on layer 0 of a block take over. */
  readonly layer: string | null;
  readonly hidden: boolean;
}

const ON_THE_DRAWING: Standing = { place: IDENTITY, block: null, layer: null, hidden: false };

/** Scales multiply from block to block; a map that throws things out of reach is damage. */
const isWithinReach = (place: Affine): boolean =>
  Object.values(place).every((value) => Math.abs(value) <= FARTHEST);

/** Collects what the modelspace items come to once every block is expanded. */
export class Expansion {
  readonly paths: DrawnPath[] = [];
  readonly texts: DrawnText[] = [];
  readonly ignored = new Map<string, { type: string; layer: string; why: IgnoredReason; count: number }>();
  readonly #blocks: ReadonlyMap<string, WeighedBlock>;
  readonly #layers: LayerTable;
  #budget = MOST_EXPANDED;
  #entity = 0;

  constructor(blocks: ReadonlyMap<string, WeighedBlock>, layers: LayerTable) {
    this.#blocks = blocks;
    this.#layers = layers;
  }

  /** `ordinal` is that of the modelspace entity. */
  add(item: Item, ordinal: number): void {
    this.#entity = ordinal;
    this.#add(item, ON_THE_DRAWING);
  }

  /** An entity of a paper layout: listed, never drawn. */
  addOnPaper({ entity }: Item): void {
    this.#ignore(entity.type, this.#layers.nameOf(entity.layer), "paper-space");
  }

  #add(item: Item, standing: Standing): void {
    const { entity, content } = item;
    const isByBlock = standing.layer !== null && entity.layer === "0";
    const layer = isByBlock ? (standing.layer ?? "0") : this.#layers.nameOf(entity.layer);
    const hidden = standing.hidden || entity.invisible || this.#layers.isHidden(layer);
    for (const { text, at, height } of entity.raw ? readTexts(entity.raw) : []) {
      const size = Math.sqrt(Math.abs(affineDeterminant(standing.place)));
      this.texts.push({ text, at: affineApply(standing.place, at), height: height * size, layer });
    }
    if (content.kind === "refused") {
      this.#ignore(entity.type, layer, content.why);
    } else if (content.kind === "path") {
      const isPlaced = standing.block !== null;
      const path = isPlaced ? transformPath(content.path, standing.place) : content.path;
      const source = { type: entity.type, entity: this.#entity, block: standing.block };
      this.paths.push({ path, layer, source, hidden });
    } else {
      this.#place(item, content.insert, layer, standing);
    }
  }

  #place(item: Item, insert: Insert, layer: string, standing: Standing): void {
    const { entity } = item;
    const block = this.#blocks.get(blockKey(entity.block ?? ""));
    if (!block) {
      this.#ignore(entity.type, layer, "damaged");
      return;
    }
    if (standing.block === null) {
      const weight = itemWeight(item, this.#blocks);
      if (!(weight <= this.#budget)) {
        this.#ignore(entity.type, layer, "too-many");
        return;
      }
      this.#budget -= weight;
    }
    // A frozen layer hides all of a block that stands on it; a layer that is off hides only its own things.
    const hidden = standing.hidden || entity.invisible || this.#layers.isFrozen(layer);
    for (let row = 0; row < insert.rows; row++) {
      for (let column = 0; column < insert.columns; column++) {
        const place = affineCompose(standing.place, insert.place(column, row, block.base));
        if (!isWithinReach(place)) {
          this.#ignore(entity.type, layer, "damaged");
          continue;
        }
        for (const inner of block.items) this.#add(inner, { place, block: block.name, layer, hidden });
      }
    }
  }

  #ignore(type: string, layer: string, why: IgnoredReason): void {
    const key = `${why} ${type} ${layer}`;
    const known = this.ignored.get(key);
    if (known) known.count++;
    else this.ignored.set(key, { type, layer, why, count: 1 });
  }
}
