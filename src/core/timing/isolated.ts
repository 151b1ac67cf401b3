import { expm1, log, log1p } from "../numeric/elementary.ts";
import { highestFindP } from "../ranges/checks/highest-find.ts";
import type { TaxonRange } from "./range-data.ts";
import type { TimingAnswer } from "./result.ts";
import { commonFields, type SetCase } from "./set-case.ts";
import { allCandidates } from "./sets.ts";

interface Judged {
  readonly range: TaxonRange;
  readonly p: number;
  readonly isIsolated: boolean;
}

/** Each taxon's highest find against those below it; isolated where its p is at most 1 - C^(1/k), k the taxa judged. */
function judged(ranges: readonly TaxonRange[], confidence: number): readonly Judged[] {
  const tested = ranges.flatMap((range) => {
    const p = highestFindP(range.levels);
    return p === undefined ? [] : [{ range, p }];
  });
  const limit = -expm1(log(confidence) / tested.length);
  return tested.map(({ range, p }) => ({ range, p, isIsolated: p <= limit }));
}

/** Taxa whose highest find is isolated, all taxa of the set considered. */
export function isolatedTaxa(ranges: readonly TaxonRange[], confidence: number): readonly string[] {
  return judged(ranges, confidence).flatMap(({ range, isIsolated }) => (isIsolated ? [range.taxon] : []));
}

/** `isolated`: is any highest find out of keeping with the finds below it? All candidates together, then one by one. */
export function isolatedAnswers(setCase: SetCase): TimingAnswer[] {
  const { set, confidence } = setCase;
  if (set.set !== allCandidates) return [];
  const all = judged(set.ranges, confidence);
  const fields = { question: "isolated", method: "highest-find" } as const;
  if (all.length === 0)
    return [
      { ...commonFields(setCase, 0), ...fields, outcome: "undefined", note: "no taxon with three finds" },
    ];
  const least = Math.min(...all.map(({ p }) => p));
  return [
    {
      ...commonFields(setCase, all.length),
      ...fields,
      p: least >= 1 ? 1 : -expm1(all.length * log1p(-least)),
      outcome: "closed",
      note: `smallest of ${all.length} taxa, allowing for their number`,
    },
    ...all.map(({ range, p, isIsolated }) => ({
      ...commonFields(setCase, 1),
      ...fields,
      group: range.group,
      taxon: range.taxon,
      p,
      outcome: "closed" as const,
      note: isIsolated ? "isolated: answers are given with and without it" : "",
    })),
  ];
}
