import { informative } from "./common-end.ts";
import { largestLevelP, levelTest } from "./confidence-levels.ts";
import type { TimingAnswer } from "./result.ts";
import { commonFields, type PlacedHorizon, type SetCase } from "./set-case.ts";

/** `at-horizon`: did the taxa of the set end at this horizon? One answer for each horizon of the section. */
export function horizonAnswers(setCase: SetCase): TimingAnswer[] {
  return setCase.horizons.map((horizon) => horizonAnswer(setCase, horizon));
}

function horizonAnswer(setCase: SetCase, { name, marker }: PlacedHorizon): TimingAnswer {
  const { set, coordinate } = setCase;
  const fields = {
    ...commonFields(setCase, informative(set.ranges).length),
    question: "at-horizon",
    method: "confidence-levels",
    horizon: name,
  } as const;
  const isPoint = marker.lowM === marker.highM;
  const low = coordinate.toEffective(marker.lowM);
  const largest = largestLevelP(set.ranges, low, coordinate.toEffective(marker.highM));
  if (largest === undefined)
    return { ...fields, outcome: "undefined", note: "no taxon with an informative range" };
  const highestM = Math.max(...set.ranges.map((range) => range.lastM));
  if (highestM > marker.highM) {
    const above = set.ranges.filter((range) => range.lastM > marker.highM).length;
    return { ...fields, p: 0, outcome: "closed", note: `${above} last finds lie above the horizon` };
  }
  const heightM = coordinate.toHeight(largest.at, "lower") ?? marker.lowM;
  const statistic = isPoint ? levelTest(set.ranges, low)?.statistic : undefined;
  return {
    ...fields,
    ...(statistic === undefined ? {} : { testStatistic: statistic }),
    p: largest.p,
    estimate: Math.min(marker.highM, Math.max(marker.lowM, highestM, heightM)),
    unit: "m",
    outcome: "closed",
    note: isPoint ? "" : "largest p over the horizon's interval",
  };
}
