import { exp, log, log1p } from "../numeric/elementary.ts";
import { gaussLegendre } from "../numeric/gauss-legendre.ts";

const NODES = 16;
/** Slopes are integrated up to this many standard deviations of their prior. */
const LARGEST_SLOPE = 6;
const SLOPE_PANELS = 6;
/** Panels in v end at these powers of a half of the largest v, and at 0. */
const HALVINGS = 9;
/** Up to this number of finds the panels are as they stand; beyond it they are divided. */
const PLAIN_FINDS = 200;
/** Terms this far (natural log) below the largest of a sum do not count. */
const NEGLIGIBLE = 40;

/** |lambda| at the nodes, and the log of weight times (1 + |lambda|)^n times the prior, up to a constant. */
export interface Slopes {
  readonly steepness: Float64Array;
  readonly logWeights: Float64Array;
}

/** Unscaled mass of one sign of the slope. */
export interface SlopeMass {
  readonly total: number;
  /** Integral of |lambda|. */
  readonly slopeSum: number;
  /** Mass of ends above the level v: z below 1 - v^2. */
  readonly above: (v: number) => number;
}

/** How often the panels are divided for n finds, whose posterior narrows as 1 / sqrt(n). */
function divisions(finds: number): number {
  return Math.ceil(Math.sqrt(Math.max(1, finds / PLAIN_FINDS)));
}

export function slopeNodes(finds: number, spread: number): Slopes {
  const panels = SLOPE_PANELS * divisions(finds);
  const edges = Array.from({ length: panels + 1 }, (_, i) => (LARGEST_SLOPE * spread * i) / panels);
  const { at, weights } = panelNodes(edges);
  const logWeights = at.map(
    (slope, i) => log(weights[i]) + finds * log1p(slope) - 0.5 * (slope / spread) * (slope / spread),
  );
  return { steepness: at, logWeights };
}

/** log and mean slope of the integral over falling slopes at v, up to z^(n-1) dz: sum of exp(logWeight + mu ln prod(1 - y z)). */
function overSlopes({ steepness, logWeights }: Slopes, logProduct: number) {
  let largest = Number.NEGATIVE_INFINITY;
  for (let i = 0; i < steepness.length; i++)
    largest = Math.max(largest, logWeights[i] + steepness[i] * logProduct);
  let sum = 0;
  let slopeSum = 0;
  for (let i = 0; i < steepness.length; i++) {
    const term = logWeights[i] + steepness[i] * logProduct - largest;
    if (term < -NEGLIGIBLE) continue;
    const value = exp(term);
    sum += value;
    slopeSum += steepness[i] * value;
  }
  return { logSum: largest + log(sum), slope: slopeSum / sum };
}

/** Log posterior density in v for falling recovery, and the mean |lambda| there. */
export type FallingDensity = (v: number) => { readonly logDensity: number; readonly slope: number };

export function fallingDensity(shares: readonly number[], slopes: Slopes): FallingDensity {
  return (v) => {
    const { logSum, slope } = overSlopes(slopes, logProductBelow(shares, v * v));
    return { logDensity: log(2 * v) + (shares.length - 1) * log1p(-v * v) + logSum, slope };
  };
}

/** ln prod(1 - y z) with 1 - z given, so that nothing cancels near z = 1; logs of products of eight factors. */
function logProductBelow(shares: readonly number[], complement: number): number {
  let sum = 0;
  let product = 1;
  for (let i = 0; i < shares.length; i++) {
    product *= 1 - shares[i] + shares[i] * complement;
    if (i % 8 === 7) {
      sum += log(product);
      product = 1;
    }
  }
  return sum + log(product);
}

/** Panel edges in v from 0 to `top`, halving towards 0. */
export function levelEdges(top: number, finds: number): number[] {
  const halves = [0, ...Array.from({ length: HALVINGS }, (_, i) => top * 2 ** (i + 1 - HALVINGS))];
  const parts = divisions(finds);
  return halves.flatMap((edge, i) =>
    i === 0
      ? [0]
      : Array.from(
          { length: parts },
          (_, part) => halves[i - 1] + ((edge - halves[i - 1]) * (part + 1)) / parts,
        ),
  );
}

export function panelNodes(edges: readonly number[]) {
  const rule = gaussLegendre(NODES);
  const at = new Float64Array((edges.length - 1) * NODES);
  const weights = new Float64Array(at.length);
  for (let panel = 0; panel + 1 < edges.length; panel++) {
    const half = (edges[panel + 1] - edges[panel]) / 2;
    for (let i = 0; i < NODES; i++) {
      at[panel * NODES + i] = edges[panel] + half * (1 + rule.nodes[i]);
      weights[panel * NODES + i] = half * rule.weights[i];
    }
  }
  return { at, weights };
}

/** Mass of falling recovery, its densities divided by exp(logScale). */
export function fallingMass(density: FallingDensity, edges: readonly number[]) {
  const { at, weights } = panelNodes(edges);
  const values = Array.from(at, density);
  const logScale = values.reduce(
    (most, { logDensity }) => Math.max(most, logDensity),
    Number.NEGATIVE_INFINITY,
  );
  return {
    logScale,
    scaledTo: (scale: number): SlopeMass => {
      const masses = values.map(({ logDensity }, i) => weights[i] * exp(logDensity - scale));
      const sums = panelSums(masses);
      const partial = (from: number, to: number) => {
        const inside = panelNodes([from, to]);
        return inside.at.reduce(
          (sum, v, i) => sum + inside.weights[i] * exp(density(v).logDensity - scale),
          0,
        );
      };
      return {
        total: sums[0],
        slopeSum: masses.reduce((sum, mass, i) => sum + mass * values[i].slope, 0),
        above: (v) => {
          const panel = edges.findIndex((edge) => edge >= v);
          if (panel < 0) return 0;
          return sums[panel] + (edges[panel] > v ? partial(v, edges[panel]) : 0);
        },
      };
    },
  };
}

/** Sum of masses from each panel upward; 0 above the last. */
function panelSums(masses: readonly number[]): number[] {
  const sums = [0];
  for (let end = masses.length; end > 0; end -= NODES)
    sums.unshift(masses.slice(end - NODES, end).reduce((sum, mass) => sum + mass, sums[0]));
  return sums;
}

/** Mass of rising recovery, closed in z: (prod y)^lambda z^(n (1 + lambda)) / (n (1 + lambda)). */
export function risingMass(shares: readonly number[], slopes: Slopes, top: number) {
  const finds = shares.length;
  const logShares = shares.reduce((sum, y) => sum + (y > 0 ? log(y) : Number.NEGATIVE_INFINITY), 0);
  const powers = slopes.steepness.map((slope) => finds * (1 + slope));
  const logMasses = slopes.logWeights.map(
    (weight, i) => weight + slopes.steepness[i] * logShares - log(powers[i]),
  );
  const logLeast = log1p(-top * top);
  return {
    logScale: logMasses.reduce((most, mass) => Math.max(most, mass), Number.NEGATIVE_INFINITY),
    scaledTo: (scale: number): SlopeMass => {
      const masses = logMasses.map((mass) => exp(mass - scale));
      const above = (v: number) => {
        const logZ = log1p(-v * v);
        return masses.reduce(
          (sum, mass, i) =>
            sum + (mass === 0 ? 0 : mass * (exp(powers[i] * logZ) - exp(powers[i] * logLeast))),
          0,
        );
      };
      const shareOf = (i: number) => masses[i] * (1 - exp(powers[i] * logLeast));
      return {
        total: masses.reduce((sum, _, i) => sum + shareOf(i), 0),
        slopeSum: masses.reduce((sum, _, i) => sum + slopes.steepness[i] * shareOf(i), 0),
        above,
      };
    },
  };
}
