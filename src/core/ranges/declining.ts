import { findRoot } from "../numeric/roots.ts";
import { fallingMass, risingMass, slopeNodes } from "./declining-mass.ts";

export interface DecliningRecord {
  /** y_i = (x_i - b) / (M - b) of every find that counts, in effective metres: 0 to 1, the last one 1. */
  readonly shares: readonly number[];
  /** s: standard deviation of the slope lambda beforehand. */
  readonly spread: number;
  /** (H - M) / (M - b) where the end is known to lie no higher than H; absent: no limit. */
  readonly limit?: number;
}

export interface DecliningPosterior {
  /** P(lambda < 0 | finds): recovery falls towards the end. */
  readonly falling: number;
  /** Evidence for falling over rising recovery, equally likely beforehand; absent where rising is impossible. */
  readonly evidenceRatio?: number;
  /** E[lambda | finds]. */
  readonly slope: number;
  /** Chance that the end lies more than this many times M - b above the last find. */
  readonly chanceBeyond: (extension: number) => number;
  /** The quantile p of the end, as a multiple of M - b above the last find. */
  readonly extension: (p: number) => number;
}

/** Root of v to this absolute distance; v^2 / (1 - v^2) is the extension. */
const LEVEL_TOLERANCE = 1e-11;

/**
 * The end of a range when recovery changes towards it at an unknown rate.
 *
 * Assumes that y = (x - b) / (theta - b) has density (1 + lambda) y^lambda for lambda >= 0 (rising) and
 * (1 - lambda) (1 - y)^(-lambda) below 0 (falling; lambda = 0 is uniform), with priors theta - b ~ 1 / (theta - b) on
 * (M - b, H - b) and lambda ~ N(0, s^2). With z = (M - b) / (theta - b) the posterior is z^(n-1) (1 + mu)^n
 * prod (1 - y_i z)^mu phi(mu / s) for mu = -lambda >= 0, and (1 + lambda)^n (prod y_i)^lambda z^(n (1 + lambda) - 1)
 * phi(lambda / s) above. A find at the base (y = 0) leaves falling recovery alone.
 *
 * Quadrature: Gauss-Legendre in the slope up to 6 s and in v, z = 1 - v^2, which softens (1 - z)^mu; panels shrink
 * towards v = 0. Cost: about 10^4 exponentials for n up to 200, growing with n beyond.
 *
 * Throws for no find, a share outside 0 to 1, a last one that is not 1, or a spread or limit that is not above 0.
 * After S. C. Wang, P. J. Everson, H. J. Zhou, D. Park & D. J. Chudzicki 2016, Paleobiology 42:240-256.
 */
export function decliningPosterior(record: DecliningRecord): DecliningPosterior {
  requireRecord(record);
  const { shares, spread, limit } = record;
  const top = limit === undefined ? 1 : levelOf(limit);
  const slopes = slopeNodes(shares.length, spread);
  const falling = fallingMass(shares, slopes, top);
  const rising = risingMass(shares, slopes, top);
  const scale = Math.max(falling.logScale, rising.logScale);
  const [down, up] = [falling.scaledTo(scale), rising.scaledTo(scale)];
  const total = down.total + up.total;
  const beyond = (v: number) => (v >= top ? 0 : (down.above(v) + up.above(v)) / total);
  return {
    falling: down.total / total,
    ...(up.total > 0 ? { evidenceRatio: down.total / up.total } : {}),
    slope: (up.slopeSum - down.slopeSum) / total,
    chanceBeyond: (extension) => (extension <= 0 ? 1 : beyond(levelOf(extension))),
    extension: (p) => {
      if (!(p > 0 && p < 1))
        throw new RangeError(`decliningPosterior: expected a level between 0 and 1, got ${p} (p)`);
      const v = findRoot((at) => beyond(at) - (1 - p), 0, top, { tolerance: LEVEL_TOLERANCE });
      return (v * v) / (1 - v * v);
    },
  };
}

function levelOf(extension: number): number {
  return Math.sqrt(extension / (1 + extension));
}

function requireRecord({ shares, spread, limit }: DecliningRecord): void {
  const isOrdered = shares.length > 0 && shares.every((y) => y >= 0 && y <= 1);
  if (!isOrdered || shares[shares.length - 1] !== 1 || !(spread > 0) || !(limit === undefined || limit > 0))
    throw new RangeError(
      `decliningPosterior: expected shares from 0 to 1, a spread and a limit above 0, got ${shares.length} shares up to ` +
        `${shares[shares.length - 1]}, ${spread} and ${limit}`,
    );
}
