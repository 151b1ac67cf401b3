import type { LevelPosterior } from "../scenarios/level-posterior.ts";

export interface LevelInterval {
  readonly low: number;
  readonly high: number;
}

/** Steps between two edges of the density. */
const STEPS = 24;
const HALVINGS = 60;

/**
 * The shortest set of levels that holds a share of the posterior: where its density is above some threshold, from below
 * upward, in as many pieces as it has. Along each step between edges the density is taken as linear.
 *
 * @param confidence share held, in (0, 1).
 */
export function highestDensity(
  { edgesM, cdf, density }: LevelPosterior,
  confidence: number,
): readonly LevelInterval[] {
  const places = edgesM.slice(1).flatMap((high, i) => {
    const low = edgesM[i];
    return Array.from({ length: STEPS }, (_, s) => {
      const level = low + ((s + (s === 0 ? 1e-9 : 0)) / STEPS) * (high - low);
      return { level, density: density(level) };
    });
  });
  const top = edgesM[edgesM.length - 1];
  const last = edgesM[edgesM.length - 2];
  places.push({ level: top, density: density(top - 1e-9 * (top - last)) });
  const held = (threshold: number) =>
    piecesAbove(places, threshold).reduce((sum, { low, high }) => sum + cdf(high) - cdf(low), 0);
  let below = 0;
  let above = Math.max(...places.map((place) => place.density));
  for (let i = 0; i < HALVINGS; i++) {
    const middle = 0.5 * (below + above);
    if (held(middle) >= confidence) below = middle;
    else above = middle;
  }
  return piecesAbove(places, below);
}

interface Place {
  readonly level: number;
  readonly density: number;
}

function piecesAbove(places: readonly Place[], threshold: number): readonly LevelInterval[] {
  const pieces: LevelInterval[] = [];
  let start: number | undefined;
  places.forEach((place, i) => {
    const before = places[i - 1];
    const isAbove = place.density >= threshold;
    if (isAbove && start === undefined)
      start = before === undefined ? place.level : crossing(before, place, threshold);
    if (!isAbove && start !== undefined && before !== undefined) {
      pieces.push({ low: start, high: crossing(before, place, threshold) });
      start = undefined;
    }
  });
  if (start !== undefined) pieces.push({ low: start, high: places[places.length - 1].level });
  return pieces.filter(({ low, high }) => high > low);
}

function crossing(a: Place, b: Place, threshold: number): number {
  const rise = b.density - a.density;
  return rise === 0 ? a.level : a.level + ((threshold - a.density) / rise) * (b.level - a.level);
}
