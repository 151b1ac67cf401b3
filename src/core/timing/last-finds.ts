import { exp, expm1, log1p } from "../numeric/elementary.ts";
import { countQuantile, poissonBinomial } from "../numeric/poisson-binomial.ts";
import { forEachReplicate } from "../numeric/streams.ts";
import { quantile } from "../numeric/sums.ts";
import { type EffectiveRange, logPivot } from "../ranges/pivot.ts";
import type { Simulation } from "./pulses-bootstrap.ts";

/** How many last finds lie above a level if all ranges end together, and the band that holds the observed number. */
export interface ExpectedLasts {
  readonly expected: number;
  /** Pointwise: quantiles of the exact distribution. */
  readonly low: number;
  readonly high: number;
  /** Standard deviation of the number. */
  readonly sd: number;
}

/**
 * Number of last finds above a level x if every range ends at theta, given each taxon's number of finds:
 * P(M_i <= x) = ((U(x) - U(b_i)) / (U(theta) - U(b_i)))^m_i, so that the number is Poisson-binomial; its mean, deviation and
 * exact quantiles (the least count whose cumulative chance reaches them).
 *
 * The smearing of one end over many last finds: P. W. Signor & J. H. Lipps 1982, Geological Society of America Special
 * Paper 190:291-296, doi 10.1130/SPE190-p291.
 */
export function expectedLasts(chances: Float64Array, confidence: number): ExpectedLasts {
  const distribution = poissonBinomial(chances);
  const tail = 0.5 * (1 - confidence);
  let [expected, variance] = [0, 0];
  for (const p of chances) {
    expected += p;
    variance += p * (1 - p);
  }
  return {
    expected,
    low: countQuantile(distribution, tail),
    high: countQuantile(distribution, 1 - tail),
    sd: Math.sqrt(variance),
  };
}

/** Chance of each taxon's last find to lie above a level, both in effective metres, if its range ends at `end`. */
export function chancesAbove(ranges: readonly EffectiveRange[], level: number, end: number): Float64Array {
  return Float64Array.from(ranges, ({ base, exponent }) => {
    if (level >= end) return 0;
    if (level <= base) return 1;
    return 1 - exp(logPivot({ base, last: level, exponent }, end));
  });
}

/** Levels at which the deviation of the number is smaller than this say nothing. */
const LEAST_SD = 0.05;
const GRID = 400;

/**
 * Half-width of the simultaneous band in standard deviations: the C quantile, over simulated sets of last finds, of the
 * largest |S(x) - E S(x)| / sd S(x) over all x with sd above 0.05. It changes most at the last finds themselves, so both sides of each
 * are looked at; E and sd are interpolated between 400 levels.
 */
export function simultaneousFactor(
  ranges: readonly EffectiveRange[],
  end: number,
  { confidence, simulation }: { readonly confidence: number; readonly simulation: Simulation },
): number {
  const lowest = Math.min(...ranges.map((range) => range.base));
  const grid = momentGrid(ranges, lowest, end);
  const largest = new Float64Array(simulation.replicates);
  const lasts = new Float64Array(ranges.length);
  const { seed, replicates } = simulation;
  forEachReplicate(replicates, { seed, stream: "extinctionTiming" }, (replicate, generator) => {
    ranges.forEach(({ base, exponent }, i) => {
      lasts[i] = base + (end - base) * exp(-generator.exponential() / exponent);
    });
    lasts.sort();
    largest[replicate] = largestDeviation(lasts, (end - lowest) / GRID, { ...grid, lowest });
  });
  return quantile(largest, confidence);
}

interface MomentGrid {
  readonly expected: Float64Array;
  readonly sd: Float64Array;
}

function momentGrid(ranges: readonly EffectiveRange[], lowest: number, end: number): MomentGrid {
  const expected = new Float64Array(GRID + 1);
  const sd = new Float64Array(GRID + 1);
  for (let i = 0; i <= GRID; i++) {
    let variance = 0;
    for (const p of chancesAbove(ranges, lowest + ((end - lowest) * i) / GRID, end)) {
      expected[i] += p;
      variance += p * (1 - p);
    }
    sd[i] = Math.sqrt(variance);
  }
  return { expected, sd };
}

function largestDeviation(
  sorted: Float64Array,
  step: number,
  { expected, sd, lowest }: MomentGrid & { readonly lowest: number },
): number {
  let largest = 0;
  for (let i = 0; i < sorted.length; i++) {
    const place = (sorted[i] - lowest) / step;
    const below = Math.min(GRID - 1, Math.floor(place));
    const share = place - below;
    const deviation = sd[below] + share * (sd[below + 1] - sd[below]);
    if (deviation <= LEAST_SD) continue;
    const mean = expected[below] + share * (expected[below + 1] - expected[below]);
    const above = sorted.length - 1 - i;
    largest = Math.max(largest, Math.abs(above - mean) / deviation, Math.abs(above + 1 - mean) / deviation);
  }
  return largest;
}

/**
 * Chance to see a taxon in one sample by negative binomial counts: 1 - (1 + mu / kappa)^(-kappa e), where effort e scales
 * mean and shape alike.
 *
 * @param mean mu, mean count at effort 1, 0 or more.
 * @param shape kappa, above 0; small: clumped.
 */
export function detectionByCounts(mean: number, shape: number, effort: number): number {
  return -expm1(-shape * effort * log1p(mean / shape));
}

/**
 * Chance of each taxon's last find to lie in a sample above a level, from its chance to be seen in each sample up to its
 * end: 1 - prod over samples above the level of (1 - d_is). Not conditional on being found at all.
 *
 * @param detections for each taxon, its chance in each sample above the level and within its range.
 */
export function sampledChancesAbove(detections: readonly (readonly number[])[]): Float64Array {
  return Float64Array.from(
    detections,
    (ofTaxon) => 1 - ofTaxon.reduce((missed, chance) => missed * (1 - chance), 1),
  );
}
