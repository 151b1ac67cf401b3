import { commonFields, levelWords, type RangeCase, reasonWithoutBound, wordsOf } from "./range-case.ts";
import type { RangeEnd } from "./result.ts";
import { uniformBound } from "./uniform.ts";
import { boundFields, cutOffNote } from "./uniform-end.ts";
import { persistence } from "./window.ts";

/**
 * The row of method `window`: p and evidence ratio at the level asked about, and the bound that p inverts to. The
 * level is H where H lies above the last find, never higher than the group was searched; else the highest level
 * searched.
 */
export function windowEnd(rangeCase: RangeCase): RangeEnd {
  const undefinedBecause = reasonWithoutBound(rangeCase);
  const common = { ...commonFields(rangeCase), method: "window" as const };
  if (undefinedBecause !== undefined) return { ...common, outcome: "undefined", note: undefinedBecause };
  const { range, coordinate, confidence } = rangeCase;
  if (rangeCase.reachesTop)
    return { ...common, lowM: range.lastM, outcome: "leaves-section", note: cutOffNote(rangeCase) };
  const asked = levelAsked(rangeCase);
  const persists =
    asked.levelM > range.lastM ? persistence(range, coordinate.toEffective(asked.levelM)) : undefined;
  const fields = {
    ...common,
    lowM: range.lastM,
    ...(persists === undefined ? {} : { p: persists.p }),
    ...(persists?.evidenceRatio === undefined ? {} : { evidenceRatio: persists.evidenceRatio }),
    ...(persists !== undefined && asked.isHorizon ? { reachLevel: 1 - persists.p } : {}),
  };
  return { ...fields, ...boundFields(rangeCase, uniformBound(range, confidence), [asked.words]) };
}

export interface LevelAsked {
  readonly levelM: number;
  readonly isHorizon: boolean;
  readonly words: string;
}

/** Where persistence is asked about: H where it lies above the last find and was searched, else the highest level searched. */
export function levelAsked(rangeCase: RangeCase): LevelAsked {
  const { range, horizon, searchedTopM } = rangeCase;
  const { highest, above } = wordsOf(rangeCase);
  const isAbove = horizon !== undefined && horizon.positionM > range.lastM;
  if (isAbove && horizon.positionM <= searchedTopM)
    return { levelM: horizon.positionM, isHorizon: true, words: `p at ${horizon.horizon}` };
  const searched = `p at ${levelWords(rangeCase, searchedTopM)}, the ${highest} level searched`;
  const words = isAbove
    ? `${searched}, ${above === "above" ? "below" : "above"} ${horizon.horizon}`
    : searched;
  return { levelM: searchedTopM, isHorizon: false, words };
}
