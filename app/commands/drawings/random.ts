/** Numbers in [0, 1) that follow from a seed alone (xorshift32, Marsaglia 2003; the start is spread by a multiplicative hash). */
export type Random = () => number;

export function seededRandom(seed: number): Random {
  let state = Math.imul(seed ^ 0x9e3779b9, 0x85ebca6b) >>> 0 || 1;
  return () => {
    state ^= state << 13;
    state ^= state >>> 17;
    state ^= state << 5;
    state >>>= 0;
    return state / 0x1_0000_0000;
  };
}

/** A whole number from 0 to just under `count`. */
export const pick = (random: Random, count: number): number => Math.floor(random() * count);
