import { type EntityContent, refused } from "./entity-content";
import type { NormalEntity } from "./normal-entity";

/** An entity with what it came to. */
export interface Item {
  readonly entity: NormalEntity;
  readonly content: EntityContent;
}

export interface BlockItems {
  readonly name: string;
  readonly base: { readonly x: number; readonly y: number };
  readonly items: readonly Item[];
}

/** A block ready to be placed: what one placing costs, and how many blocks deep it goes. */
export interface WeighedBlock extends BlockItems {
  readonly weight: number;
  readonly depth: number;
}

/** Blocks within blocks: more than any drawing has, few enough to walk by recursion. */
export const DEEPEST_NESTING = 32;

/** Block names are the same whatever the case. */
export const blockKey = (name: string): string => name.toLowerCase();

/** The key of the block an item places, or null. */
const placedKey = ({ entity, content }: Item): string | null =>
  content.kind === "insert" ? blockKey(entity.block ?? "") : null;

/** Curves and other things that placing an item comes to, the placing itself counted as one. */
export function itemWeight(item: Item, blocks: ReadonlyMap<string, WeighedBlock>): number {
  const { content } = item;
  if (content.kind === "path") return content.path.curves.length;
  if (content.kind !== "insert") return 1;
  const block = blocks.get(blockKey(item.entity.block ?? ""));
  return 1 + (block ? Math.max(1, block.weight) * content.insert.columns * content.insert.rows : 0);
}

function weigh(
  block: BlockItems,
  openKeys: ReadonlySet<string>,
  weighed: ReadonlyMap<string, WeighedBlock>,
): WeighedBlock {
  let weight = 0;
  let depth = 1;
  const items = block.items.map((item) => {
    const key = placedKey(item);
    const inner = key === null ? undefined : weighed.get(key);
    const endless = key !== null && openKeys.has(key);
    const kept =
      endless || (inner && inner.depth >= DEEPEST_NESTING) ? { ...item, content: refused("too-deep") } : item;
    if (kept === item && inner) depth = Math.max(depth, inner.depth + 1);
    weight += itemWeight(kept, weighed);
    return kept;
  });
  return { ...block, items, weight, depth };
}

/**
 * The blocks with the cost of placing each, worked out from the innermost out in one pass over all inserts, so that
 * a bomb of nested arrays is known before anything is expanded. Inserts that close a ring, and those that go
 * deeper than 32 blocks, are refused here.
 */
export function weighBlocks(blocks: ReadonlyMap<string, BlockItems>): ReadonlyMap<string, WeighedBlock> {
  const weighed = new Map<string, WeighedBlock>();
  const openKeys = new Set<string>();
  const stack: { key: string; block: BlockItems; inner: string[] }[] = [];
  const open = (key: string) => {
    const block = blocks.get(key);
    if (!block || weighed.has(key) || openKeys.has(key)) return;
    openKeys.add(key);
    stack.push({ key, block, inner: block.items.flatMap((item) => placedKey(item) ?? []) });
  };
  for (const root of blocks.keys()) {
    open(root);
    while (stack.length > 0) {
      const top = stack[stack.length - 1];
      const next = top.inner.pop();
      if (next !== undefined) {
        open(next);
        continue;
      }
      weighed.set(top.key, weigh(top.block, openKeys, weighed));
      openKeys.delete(top.key);
      stack.pop();
    }
  }
  return weighed;
}
