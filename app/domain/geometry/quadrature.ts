/**
 * Gauss-Kronrod (7, 15) on [-1, 1]: non-negative nodes, Kronrod weights, and the Gauss weights of every second
 * node. Values from R. Piessens et al., QUADPACK (1983), routine QK15.
 */
const NODES = [
  0.9914553711208126, 0.9491079123427585, 0.8648644233597691, 0.7415311855993945, 0.5860872354676911,
  0.4058451513773972, 0.20778495500789848, 0,
];
const KRONROD = [
  0.022935322010529224, 0.06309209262997856, 0.10479001032225019, 0.14065325971552592, 0.1690047266392679,
  0.19035057806478542, 0.20443294007529889, 0.20948214108472782,
];
const GAUSS = [0.1294849661688697, 0.27970539148927664, 0.3818300505051189, 0.4179591836734694];

/** Bisections in one call: a bound on work for integrands that never settle. */
const MOST_BISECTIONS = 400;

interface Interval {
  readonly from: number;
  readonly to: number;
  readonly value: number;
  readonly error: number;
}

function estimate(integrand: (u: number) => number, from: number, to: number): Interval {
  const half = (to - from) / 2;
  const middle = (from + to) / 2;
  let kronrod = 0;
  let gauss = 0;
  for (let i = 0; i < NODES.length; i++) {
    const offset = half * NODES[i];
    const sum = offset === 0 ? integrand(middle) : integrand(middle - offset) + integrand(middle + offset);
    kronrod += KRONROD[i] * sum;
    if (i % 2 === 1) gauss += GAUSS[(i - 1) / 2] * sum;
  }
  return { from, to, value: kronrod * half, error: Math.abs((kronrod - gauss) * half) };
}

/**
 * The integral of `integrand` from `from` to `to`, by bisection of what is worse than its share of
 * `tolerance` (absolute). Gives its best value after 400 bisections.
 */
export function integrate(
  integrand: (u: number) => number,
  from: number,
  to: number,
  tolerance: number,
): number {
  const span = Math.abs(to - from);
  if (span === 0) return 0;
  const pending = [estimate(integrand, from, to)];
  let total = 0;
  let bisections = 0;
  for (let next = pending.pop(); next; next = pending.pop()) {
    const share = tolerance * (Math.abs(next.to - next.from) / span);
    if (!(next.error > share) || bisections >= MOST_BISECTIONS) {
      total += next.value;
      continue;
    }
    bisections++;
    const middle = (next.from + next.to) / 2;
    pending.push(estimate(integrand, next.from, middle), estimate(integrand, middle, next.to));
  }
  return total;
}
