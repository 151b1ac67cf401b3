import { metres, note } from "../ranges/range-case.ts";
import {
  commonEndGiven,
  commonEndJoint,
  commonEndTest,
  type EndSet,
  highestLast,
  informative,
  isAlignedTooWell,
} from "./common-end.ts";
import type { TimingAnswer } from "./result.ts";
import { commonFields, type SetCase } from "./set-case.ts";

/** `one-level`: could all have ended together? */
export function oneLevelAnswer(setCase: SetCase): TimingAnswer {
  const { ranges } = setCase.set;
  const kept = informative(ranges).length;
  const fields = {
    ...commonFields(setCase, kept),
    question: "one-level",
    method: "common-end",
  } as const;
  const test = commonEndTest(ranges);
  if (test === undefined)
    return { ...fields, outcome: "undefined", note: "fewer than two taxa with an informative range" };
  return {
    ...fields,
    testStatistic: test.statistic,
    df: test.df,
    p: test.p,
    outcome: "closed",
    note: note(
      droppedNote(ranges.length - kept),
      test.tied > 1 && `${test.tied} taxa share the highest last find`,
      isAlignedTooWell(test.p) && "ends aligned very well: binning, truncation or choice of taxa?",
    ),
  };
}

/** `where`: the common level, given that there is one, and jointly with the question whether there is one. */
export function whereAnswers(setCase: SetCase): TimingAnswer[] {
  const { set, confidence } = setCase;
  const test = commonEndTest(set.ranges);
  const isRejected = test !== undefined && test.p <= 1 - confidence;
  const given = commonEndGiven(set.ranges, confidence);
  const median = commonEndGiven(set.ranges, 0.5);
  const estimateM =
    median.kind === "interval" ? setCase.coordinate.toHeight(median.high, "upper") : undefined;
  return [
    {
      ...endAnswer(setCase, given, isRejected && "one level is rejected: this set means little alone"),
      ...(estimateM === undefined ? {} : { estimate: estimateM }),
      method: "common-end-given",
    },
    { ...endAnswer(setCase, commonEndJoint(set.ranges, confidence)), method: "common-end-joint" },
  ];
}

function endAnswer(setCase: SetCase, end: EndSet, extra?: string | false): Omit<TimingAnswer, "method"> {
  const kept = informative(setCase.set.ranges).length;
  return endRow(setCase, end, { taxa: kept, words: extra });
}

interface EndWords {
  readonly taxa: number;
  /** Where not the study's confidence. */
  readonly level?: number;
  readonly words?: string | false;
}

/** A set of levels in effective metres as a row of `where`, in heights. */
export function endRow(
  setCase: SetCase,
  end: EndSet,
  { taxa, level, words }: EndWords,
): Omit<TimingAnswer, "method"> {
  const { section, set, coordinate, confidence } = setCase;
  const fields = {
    ...commonFields(setCase, taxa),
    question: "where",
    level: level ?? confidence,
    unit: "m",
  } as const;
  const dropped = droppedNote(set.ranges.length - taxa);
  if (end.kind === "undefined")
    return { ...fields, outcome: "undefined", note: "no taxon with an informative range" };
  if (end.kind === "empty")
    return { ...fields, outcome: "empty", note: note("no common end fits", dropped, words) };
  const isAtHighest = end.low === highestLast(set.ranges);
  const low = isAtHighest
    ? Math.max(...set.ranges.map((range) => range.lastM))
    : coordinate.toHeight(end.low, "lower");
  const high = coordinate.toHeight(end.high, "upper");
  const gap = coordinate.gapAt(end.high);
  const bounds = { ...(low === undefined ? {} : { low }), ...(high === undefined ? {} : { high }) };
  const isBeyond = high !== undefined && high > section.topM;
  return {
    ...fields,
    ...bounds,
    outcome: high === undefined ? "open" : isBeyond ? "leaves-section" : "closed",
    note: note(
      isBeyond && `upper end lies ${metres(high - section.topM)} above the section's top`,
      gap && `upper end falls in a gap from ${metres(gap.baseM)} to ${metres(gap.topM)}`,
      dropped,
      words,
    ),
  };
}

function droppedNote(dropped: number): string | undefined {
  return dropped > 0
    ? `${dropped} without an informative range left out of the statistic; their finds still bound the level`
    : undefined;
}
