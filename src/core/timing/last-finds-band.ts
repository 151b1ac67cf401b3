import { exp } from "../numeric/elementary.ts";
import { forEachSimulation } from "../numeric/kernels.ts";
import { poissonBinomial } from "../numeric/poisson-binomial.ts";
import { quantile } from "../numeric/sums.ts";
import type { EffectiveRange } from "../ranges/pivot.ts";
import { chancesAbove } from "./last-finds.ts";
import type { Simulation } from "./pulses-bootstrap.ts";

/** Levels between which tails are interpolated; they crowd towards the end, where the curve falls fastest. */
const GRID = 400;

/**
 * Local level of the band that holds the whole curve of last finds with confidence C: the 1 - C quantile, over simulated sets of
 * last finds, of the smallest two-sided p of their number at any level. A curve is worst just below a last find, where it stands
 * highest, and at it, where it has fallen; both are looked at. At each level the band then takes every number whose p is no
 * smaller: it widens by chance and not by standard deviations, which say nothing where one taxon is expected or none.
 */
export function localLevel(
  ranges: readonly EffectiveRange[],
  end: number,
  { confidence, simulation }: { readonly confidence: number; readonly simulation: Simulation },
): number {
  const tails = tailTable(ranges, end);
  const { seed, replicates } = simulation;
  const smallest = new Float64Array(replicates);
  const lasts = new Float64Array(ranges.length);
  const plan = { seed, stream: "extinctionTiming", replicates, draws: ranges.length } as const;
  forEachSimulation(plan, (exponentials, replicate) => {
    ranges.forEach(({ base, exponent }, i) => {
      lasts[i] = base + (end - base) * exp(-exponentials[i] / exponent);
    });
    smallest[replicate] = smallestP(lasts.toSorted(), tails);
  });
  return quantile(smallest, 1 - confidence);
}

interface TailTable {
  readonly lowest: number;
  readonly end: number;
  /** P(S <= s) and P(S >= s), s from 0 to k, level by level. */
  readonly lower: Float64Array;
  readonly upper: Float64Array;
}

function tailTable(ranges: readonly EffectiveRange[], end: number): TailTable {
  const lowest = Math.min(...ranges.map((range) => range.base));
  const size = ranges.length + 1;
  const lower = new Float64Array((GRID + 1) * size);
  const upper = new Float64Array((GRID + 1) * size);
  for (let i = 0; i <= GRID; i++) {
    const root = (GRID - i) / GRID;
    const share = root * root * root * root;
    const distribution = poissonBinomial(chancesAbove(ranges, end - (end - lowest) * share, end));
    for (let s = 0, sum = 0; s < size; s++) lower[i * size + s] = sum += distribution[s];
    for (let s = size - 1, sum = 0; s >= 0; s--) upper[i * size + s] = sum += distribution[s];
  }
  return { lowest, end, lower, upper };
}

/** Smallest two-sided p along the curve of sorted last finds. */
function smallestP(sorted: Float64Array, { lowest, end, lower, upper }: TailTable): number {
  const size = sorted.length + 1;
  let least = 0.5;
  for (let i = 0; i < sorted.length; i++) {
    const share = (end - sorted[i]) / (end - lowest);
    const place = GRID * (1 - Math.sqrt(Math.sqrt(share)));
    const cell = Math.min(GRID - 1, Math.max(0, Math.floor(place)));
    const along = place - cell;
    const at = (table: Float64Array, s: number) => {
      const from = table[cell * size + s];
      return from + along * (table[(cell + 1) * size + s] - from);
    };
    least = Math.min(least, at(upper, sorted.length - i), at(lower, sorted.length - 1 - i));
  }
  return 2 * least;
}
