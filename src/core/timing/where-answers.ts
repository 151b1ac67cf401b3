import { median } from "../numeric/sums.ts";
import { metres, note } from "../ranges/range-case.ts";
import { informative } from "./common-end.ts";
import { endRow } from "./common-end-answers.ts";
import { halfIntervals } from "./half-intervals.ts";
import type { TimingAnswer } from "./result.ts";
import { commonFields, type SetCase } from "./set-case.ts";
import { twoHighestEnd, withTwoHighest } from "./two-highest-end.ts";

/** `where` from the ends of 50% intervals: the level is the exact coverage that the number of taxa allows. */
export function halfIntervalsWhere(setCase: SetCase): TimingAnswer {
  const { set, coordinate, confidence } = setCase;
  const taxa = informative(set.ranges).length;
  const half = halfIntervals(set.ranges, confidence);
  const method = "half-intervals";
  if (half === undefined) {
    const fields = { ...commonFields(setCase, taxa), question: "where", method } as const;
    return { ...fields, unit: "m", outcome: "undefined", note: "too few taxa for this confidence" };
  }
  const highestM = Math.max(...set.ranges.map((range) => range.lastM));
  const middleM = coordinate.toHeight(median(half.ends), "upper");
  const row = endRow(setCase, half.set, { taxa, level: half.coverage });
  return {
    ...row,
    method,
    ...(middleM === undefined || row.outcome === "empty" ? {} : { estimate: Math.max(highestM, middleM) }),
    note: note(row.note, middleM !== undefined && `half of the 50% intervals end below ${metres(middleM)}`),
  };
}

/** Other tail than the declared one, so that the lean on the shape of recovery is seen. */
const otherTail = (tail: number) => (tail === 1 ? 2 : 1);

/** `where` from the two highest finds of each taxon: with the declared tail, and with another beside it. */
export function twoHighestWhere(setCase: SetCase): TimingAnswer[] {
  const { tail } = setCase.settings.ranges;
  return [tail, otherTail(tail)].map((beta) => twoHighestRow(setCase, beta));
}

function twoHighestRow(setCase: SetCase, tail: number): TimingAnswer {
  const { set, coordinate, confidence } = setCase;
  const taxa = withTwoHighest(set.ranges).length;
  const end = twoHighestEnd(set.ranges, confidence, tail);
  const middle = twoHighestEnd(set.ranges, 0.5, tail);
  const estimateM = middle.kind === "interval" ? coordinate.toHeight(middle.high, "upper") : undefined;
  return {
    ...endRow(setCase, end, { taxa, words: tailWords(tail) }),
    ...(estimateM === undefined ? {} : { estimate: estimateM }),
    method: "two-highest",
  };
}

const tailWords = (tail: number) =>
  tail === 1 ? "tail 1: finds as dense up to the end" : `tail ${tail}: finds thin out towards the end`;
