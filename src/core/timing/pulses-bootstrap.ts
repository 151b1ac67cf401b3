import { exp } from "../numeric/elementary.ts";
import { forEachSimulation } from "../numeric/kernels.ts";
import type { EffectiveRange } from "../ranges/pivot.ts";
import { commonEndGiven } from "./common-end.ts";
import { type SortedRanges, secondPulseReaches } from "./pulse-gain.ts";
import { fitPulses } from "./pulses.ts";

export interface PulsesTest {
  /** 2 (ll_(K + 1) - ll_K). */
  readonly statistic: number;
  readonly p: number;
  readonly mcError: number;
  /** Simulated assemblages: fewer than allowed where p was soon known well enough. */
  readonly replicates: number;
  /** Levels of the K pulses by largest likelihood, in effective metres. */
  readonly levels: readonly number[];
}

export interface Simulation {
  readonly seed: number;
  readonly replicates: number;
}

/** As soon as so many simulated gains reach the observed one, p is known to 7% of itself. */
const ENOUGH = 200;

/**
 * Are K pulses enough, against one more? Parametric bootstrap of 2 (ll_(K + 1) - ll_K): assemblages with the user's own
 * m_i and b_i are simulated from K pulses, each at its median-unbiased level (the largest-likelihood one, a last find, lies too
 * low). Sampling stops once enough simulated gains reach the observed one; p is then their share, else (1 + reached) / (1 + N).
 * Uninformative ranges are dropped. Undefined with K informative ranges or fewer.
 *
 * Assumes uniform recovery in the coordinate; where recovery declines upward one pulse is split.
 * After S. C. Wang & L. Zhong 2018, Paleobiology 44:199-218; stopping: J. Besag & P. Clifford 1991, Biometrika
 * 78:301-304, doi 10.1093/biomet/78.2.301.
 *
 * @param ranges informative ranges.
 */
export function pulsesBootstrap(
  ranges: readonly EffectiveRange[],
  pulses: number,
  { seed, replicates }: Simulation,
): PulsesTest | undefined {
  if (ranges.length <= pulses) return undefined;
  const fits = fitPulses(ranges, pulses + 1);
  const { levels, pulseOf } = fits[pulses - 1];
  const statistic = Math.max(0, 2 * (fits[pulses].logLikelihood - fits[pulses - 1].logLikelihood));
  const ends = medianEnds(ranges, pulseOf, pulses);
  const reaches = simulatedReach(ranges, ends, { pulses, gain: statistic * (1 - 1e-12) });
  let reached = 0;
  let drawn = 0;
  const plan = { seed, stream: "parametricBootstrap", replicates, draws: ranges.length } as const;
  forEachSimulation(plan, (exponentials) => {
    drawn++;
    if (reaches(exponentials)) reached++;
    return reached >= ENOUGH;
  });
  const p = reached >= ENOUGH ? reached / drawn : (1 + reached) / (1 + drawn);
  return { statistic, p, mcError: shareError(reached, drawn), replicates: drawn, levels };
}

/** Standard error of a simulated share; with one hit and one miss added it is never 0. */
export function shareError(hits: number, drawn: number): number {
  const share = (hits + 1) / (drawn + 2);
  return Math.sqrt((share * (1 - share)) / drawn);
}

/** For each range, the median-unbiased level of its pulse. */
function medianEnds(
  ranges: readonly EffectiveRange[],
  pulseOf: readonly number[],
  pulses: number,
): Float64Array {
  const levels = Array.from({ length: pulses }, (_, pulse) => {
    const end = commonEndGiven(
      ranges.filter((_range, i) => pulseOf[i] === pulse),
      0.5,
    );
    return end.kind === "interval" ? end.high : 0;
  });
  return Float64Array.from(pulseOf, (pulse) => levels[pulse]);
}

interface Observed {
  readonly pulses: number;
  readonly gain: number;
}

/** Draws one assemblage: does its gain by one more pulse reach the observed one? */
function simulatedReach(ranges: readonly EffectiveRange[], ends: Float64Array, { pulses, gain }: Observed) {
  const k = ranges.length;
  const sorted = {
    lasts: new Float64Array(k),
    bases: new Float64Array(k),
    exponents: new Float64Array(k),
  } satisfies SortedRanges;
  return (exponentials: Float64Array): boolean => {
    for (let i = 0; i < k; i++) {
      const { base, exponent } = ranges[i];
      const last = base + (ends[i] - base) * exp(-exponentials[i] / exponent);
      let place = i;
      for (; place > 0 && sorted.lasts[place - 1] > last; place--) copyUp(sorted, place);
      sorted.lasts[place] = last;
      sorted.bases[place] = base;
      sorted.exponents[place] = exponent;
    }
    return pulses === 1 ? secondPulseReaches(sorted, gain) : furtherGain(sorted, pulses) >= gain;
  };
}

function copyUp({ lasts, bases, exponents }: SortedRanges, place: number): void {
  lasts[place] = lasts[place - 1];
  bases[place] = bases[place - 1];
  exponents[place] = exponents[place - 1];
}

function furtherGain({ lasts, bases, exponents }: SortedRanges, pulses: number): number {
  const drawn = Array.from(lasts, (last, i) => ({ last, base: bases[i], exponent: exponents[i] }));
  const fits = fitPulses(drawn, pulses + 1);
  return 2 * (fits[pulses].logLikelihood - fits[pulses - 1].logLikelihood);
}
