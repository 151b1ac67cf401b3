import { type Centroid, centroid, rescaledInterior } from "../ranges/checks/centroid.ts";
import type { TaxonRange } from "./range-data.ts";
import type { TimingAnswer } from "./result.ts";
import { commonFields, type SetCase } from "./set-case.ts";
import { allCandidates } from "./sets.ts";

/** A pooled p for decline below this demotes the methods that assume constant recovery. */
export const DECLINE_GATE = 0.1;

/** Centroid of all interior finds of a set. */
export function pooledCentroid(ranges: readonly TaxonRange[]): Centroid | undefined {
  return centroid(ranges.flatMap((range) => rescaledInterior(range.levels)));
}

/** `recovery`: does it decline upward? Pooled for every set, and taxon by taxon for the candidates. */
export function recoveryAnswers(setCase: SetCase): TimingAnswer[] {
  const { set } = setCase;
  const withInterior = set.ranges.filter((range) => rescaledInterior(range.levels).length > 0).length;
  const pooled = answer(setCase, pooledCentroid(set.ranges), withInterior);
  if (set.set !== allCandidates) return [pooled];
  const single = set.ranges.map((range) => ({
    ...answer(setCase, centroid(rescaledInterior(range.levels)), 1),
    group: range.group,
    taxon: range.taxon,
  }));
  return [pooled, ...single];
}

function answer(setCase: SetCase, test: Centroid | undefined, taxa: number): TimingAnswer {
  const fields = { ...commonFields(setCase, taxa), question: "recovery", method: "centroid" } as const;
  if (test === undefined)
    return { ...fields, outcome: "undefined", note: "no find between the first and the last" };
  const { z, p, finds } = test;
  const words = `${finds} finds between first and last; p is for decline upward`;
  return { ...fields, testStatistic: z, p, outcome: "closed", note: words };
}
