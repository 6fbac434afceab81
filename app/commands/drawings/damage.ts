import { generatedDrawing } from "./generated-drawing";
import { pick, type Random, seededRandom } from "./random";

/** Size of the drawings that are damaged: a panel or a few. */
const SMALLEST_BYTES = 2_000;
const LARGEST_BYTES = 24_000;
const MOST_WOUNDS = 12;

type Damage = (bytes: Uint8Array, random: Random) => Uint8Array;

const truncated: Damage = (bytes, random) => bytes.slice(0, pick(random, bytes.length));

const flipped: Damage = (bytes, random) => {
  const hurt = bytes.slice();
  for (let i = 1 + pick(random, MOST_WOUNDS); i > 0; i--)
    hurt[pick(random, hurt.length)] ^= 1 << pick(random, 8);
  return hurt;
};

const byLines =
  (change: (lines: string[], random: Random) => void): Damage =>
  (bytes, random) => {
    const lines = new TextDecoder("latin1").decode(bytes).split("\n");
    for (let i = 1 + pick(random, MOST_WOUNDS); i > 0; i--) change(lines, random);
    return new TextEncoder().encode(lines.join("\n"));
  };

const removed = byLines((lines, random) => {
  lines.splice(pick(random, lines.length), 1 + pick(random, 3));
});

const swapped = byLines((lines, random) => {
  const [i, j] = [pick(random, lines.length), pick(random, lines.length)];
  [lines[i], lines[j]] = [lines[j], lines[i]];
});

/** Values that numbers of damaged files turn into. */
const WILD = ["1e308", "-1e308", "1e-320", "NaN", "0", "-1", "99999999999", "", "1,5", "HINGE", "%%d"];

const wild = byLines((lines, random) => {
  lines[pick(random, lines.length)] = WILD[pick(random, WILD.length)];
});

const DAMAGES: Readonly<Record<string, Damage>> = { truncated, flipped, removed, swapped, wild };
export const DAMAGE_NAMES: readonly string[] = Object.keys(DAMAGES);

/** A small generated drawing hurt in one way, both by the seed. */
export function damagedDrawing(seed: number): { readonly damage: string; readonly bytes: Uint8Array } {
  const random = seededRandom(seed);
  const size = SMALLEST_BYTES + pick(random, LARGEST_BYTES - SMALLEST_BYTES);
  const whole = new TextEncoder().encode(generatedDrawing(pick(random, 1_000_000), size));
  const damage = DAMAGE_NAMES[pick(random, DAMAGE_NAMES.length)];
  return { damage, bytes: DAMAGES[damage](whole, random) };
}
