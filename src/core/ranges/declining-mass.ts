import { exp, log, log1p } from "../numeric/elementary.ts";
import { integralAbove, panelNodes } from "./panels.ts";

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
function levelEdges(top: number, finds: number): number[] {
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

/** Mass of falling recovery: 2 v z^(n-1) times the integral over slopes, whose log is smooth in v. */
export function fallingMass(shares: readonly number[], slopes: Slopes, top: number) {
  const edges = levelEdges(top, shares.length);
  const { at, weights } = panelNodes(edges);
  const integrals = Array.from(at, (v) => overSlopes(slopes, logProductBelow(shares, v * v)));
  const logDensity = (v: number, logSum: number) => log(2 * v) + (shares.length - 1) * log1p(-v * v) + logSum;
  const logScale = integrals.reduce(
    (most, { logSum }, i) => Math.max(most, logDensity(at[i], logSum)),
    Number.NEGATIVE_INFINITY,
  );
  return {
    logScale,
    scaledTo: (scale: number): SlopeMass => {
      const density = (v: number, logSum: number) => exp(logDensity(v, logSum) - scale);
      const above = integralAbove(edges, {
        smooth: integrals.map(({ logSum }) => logSum),
        integrand: density,
      });
      const slopeSum = integrals.reduce(
        (sum, { logSum, slope }, i) => sum + weights[i] * slope * density(at[i], logSum),
        0,
      );
      return { total: above(0), slopeSum, above };
    },
  };
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
      const least = powers.map((power) => exp(power * logLeast));
      const above = (v: number) => {
        const logZ = log1p(-v * v);
        return masses.reduce(
          (sum, mass, i) => sum + (mass === 0 ? 0 : mass * (exp(powers[i] * logZ) - least[i])),
          0,
        );
      };
      const shareOf = (i: number) => masses[i] * (1 - least[i]);
      return {
        total: masses.reduce((sum, _, i) => sum + shareOf(i), 0),
        slopeSum: masses.reduce((sum, _, i) => sum + slopes.steepness[i] * shareOf(i), 0),
        above,
      };
    },
  };
}
