import type { CountedSamples } from "./counts.ts";
import type { RangeCase } from "./range-case.ts";
import type { SampledHorizon } from "./sampled-horizons.ts";

/** A taxon's counts among the horizons that were counted for its group, efforts scaled to a mean of 1. */
export interface CountedRange extends CountedSamples {
  /** Efforts and heights of the barren horizons above the last find, from below upward. */
  readonly above: readonly number[];
  readonly barrenM: readonly number[];
  /** What stands for effort: specimens counted to, the effort given, or every horizon alike. */
  readonly effort: "counted to" | "effort" | "equal";
}

/** The counts that bear on the end of a case, or why there are none; the first find's own sample is left out in mode first. */
export function countedRange({ taxon, searched, sampled }: RangeCase): CountedRange | string {
  if (sampled === undefined || taxon.counts === undefined) return "no counts";
  if (sampled.unsampledFinds > 0) return "finds outside the samples that were counted";
  const bySample = new Map(taxon.samples.map((sample, i) => [sample, taxon.counts?.[i]]));
  const { inRange, barrenAbove } = sampled.count;
  const end = searched.length - barrenAbove;
  const used = searched.slice(end - inRange);
  if (used.some(({ isCounted }) => !isCounted)) return "samples of the range were not all counted";
  const counts = used.slice(0, inRange).map((horizon) => countAt(horizon, bySample));
  const known = counts.filter((count) => count !== undefined);
  if (known.length < counts.length) return "a find without its count";
  const { efforts, effort } = effortsOf(used);
  return {
    counts: known,
    efforts: efforts.slice(0, inRange),
    above: efforts.slice(inRange),
    barrenM: searched.slice(end).map(({ heightM }) => heightM),
    effort,
  };
}

type Counts = ReadonlyMap<string | undefined, number | undefined>;

function countAt({ samples }: SampledHorizon, bySample: Counts): number | undefined {
  const withTaxon = samples.filter((sample) => bySample.has(sample));
  return withTaxon.reduce<number | undefined>((sum, sample) => {
    const count = bySample.get(sample);
    return sum === undefined || count === undefined ? undefined : sum + count;
  }, 0);
}

function effortsOf(used: readonly SampledHorizon[]): {
  readonly efforts: readonly number[];
  readonly effort: CountedRange["effort"];
} {
  const countedTo = used.flatMap((horizon) => horizon.countedTo ?? []);
  const given = used.flatMap((horizon) => horizon.effort ?? []);
  const [efforts, effort] =
    countedTo.length === used.length
      ? ([countedTo, "counted to"] as const)
      : given.length === used.length
        ? ([given, "effort"] as const)
        : ([used.map(() => 1), "equal"] as const);
  const mean = efforts.reduce((sum, value) => sum + value, 0) / used.length;
  return { efforts: efforts.map((value) => value / mean), effort };
}
