import { largestCombinedP } from "./combined.ts";
import { informative } from "./common-end.ts";
import { largestLevelP } from "./confidence-levels.ts";
import { largestHalfP } from "./half-intervals.ts";
import type { TaxonRange } from "./range-data.ts";
import type { TimingAnswer, TimingMethod } from "./result.ts";
import { commonFields, type PlacedHorizon, type SetCase } from "./set-case.ts";

interface Largest {
  readonly p: number;
  /** In effective metres. */
  readonly at: number;
  readonly statistic: number;
  readonly df?: number;
}

interface HorizonMethod {
  readonly method: TimingMethod;
  readonly largest: (ranges: readonly TaxonRange[], low: number, high: number) => Largest | undefined;
}

const methods: readonly HorizonMethod[] = [
  { method: "confidence-levels", largest: largestLevelP },
  { method: "combined", largest: largestCombinedP },
  {
    method: "half-intervals",
    largest: (ranges, low, high) => {
      const test = largestHalfP(ranges, low, high);
      return test && { ...test, statistic: test.below };
    },
  },
];

/** `at-horizon`: did the taxa of the set end at this horizon? For each method one answer for each horizon of the section. */
export function horizonAnswers(setCase: SetCase): TimingAnswer[] {
  return methods.flatMap((method) =>
    setCase.horizons.map((horizon) => horizonAnswer(setCase, horizon, method)),
  );
}

function horizonAnswer(
  setCase: SetCase,
  { name, marker }: PlacedHorizon,
  { method, largest: largestOf }: HorizonMethod,
): TimingAnswer {
  const { set, coordinate } = setCase;
  const fields = {
    ...commonFields(setCase, informative(set.ranges).length),
    question: "at-horizon",
    method,
    horizon: name,
  } as const;
  const isPoint = marker.lowM === marker.highM;
  const largest = largestOf(
    set.ranges,
    coordinate.toEffective(marker.lowM),
    coordinate.toEffective(marker.highM),
  );
  if (largest === undefined)
    return { ...fields, outcome: "undefined", note: "no taxon with an informative range" };
  const highestM = Math.max(...set.ranges.map((range) => range.lastM));
  if (highestM > marker.highM) {
    const above = set.ranges.filter((range) => range.lastM > marker.highM).length;
    return { ...fields, p: 0, outcome: "closed", note: `${above} last finds lie above the horizon` };
  }
  const heightM = coordinate.toHeight(largest.at, "lower") ?? marker.lowM;
  return {
    ...fields,
    ...(isPoint ? statisticOf(largest) : {}),
    p: largest.p,
    estimate: Math.min(marker.highM, Math.max(marker.lowM, highestM, heightM)),
    unit: "m",
    outcome: "closed",
    note: isPoint ? "" : "largest p over the horizon's interval",
  };
}

function statisticOf({ statistic, df }: Largest) {
  return { testStatistic: statistic, ...(df === undefined ? {} : { df }) };
}
