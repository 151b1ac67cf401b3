import { confidenceToReach } from "./pivot.ts";
import {
  commonFields,
  levelWords,
  metres,
  note,
  type RangeCase,
  reasonWithoutBound,
  wordsOf,
} from "./range-case.ts";
import type { RangeEnd } from "./result.ts";
import { uniformBound, uniformPoint } from "./uniform.ts";

/** With this many horizons or fewer the interval mostly reflects the assumption of uniform finds. */
const FEW_HORIZONS = 4;

/** The row of method `uniform`: one-ended upper bound, point estimate, and the level at which it reaches H. */
export function uniformEnd(rangeCase: RangeCase): RangeEnd {
  const undefinedBecause = reasonWithoutBound(rangeCase);
  const common = { ...commonFields(rangeCase), method: "uniform" as const };
  if (undefinedBecause !== undefined) return { ...common, outcome: "undefined", note: undefinedBecause };
  const { range, coordinate, confidence } = rangeCase;
  const reach = reachLevel(rangeCase);
  const fields = { ...common, lowM: range.lastM, ...(reach === undefined ? {} : { reachLevel: reach }) };
  if (rangeCase.reachesTop) return { ...fields, outcome: "leaves-section", note: cutOffNote(rangeCase) };
  const bound = uniformBound(range, confidence);
  const point = uniformPoint(range);
  const pointM = point === undefined ? undefined : coordinate.toHeight(point, "upper");
  return {
    ...fields,
    ...(pointM === undefined ? {} : { pointM }),
    ...boundFields(rangeCase, bound, [fewNote(range.horizons)]),
  };
}

/** Why the end of a range that the section cuts off is open. */
export function cutOffNote(rangeCase: RangeCase): string {
  const { highest, sectionEnd } = wordsOf(rangeCase);
  return `found in the ${highest} sample searched: the end is open at the ${sectionEnd}`;
}

/** Confidence at which the interval just reaches H; undefined where the last find lies above H or the end is cut off. */
function reachLevel({ range, coordinate, horizon, reachesTop }: RangeCase): number | undefined {
  if (reachesTop || horizon === undefined || horizon.positionM < range.lastM) return undefined;
  return confidenceToReach(range, coordinate.toEffective(horizon.positionM));
}

export function fewNote(horizons: number): string | undefined {
  return horizons <= FEW_HORIZONS
    ? `${horizons} horizons: the interval mostly reflects the assumption of uniform finds`
    : undefined;
}

/**
 * The bound as a height with its outcome. Above the section's top the number is kept, recovery being continued there,
 * but the outcome says that no rock of this section can confirm it.
 */
export function boundFields(
  rangeCase: RangeCase,
  bound: number | undefined,
  notes: readonly (string | undefined)[],
): Pick<RangeEnd, "highM" | "outcome" | "note"> {
  const { coordinate, range, topM } = rangeCase;
  const highM = bound === undefined ? undefined : coordinate.toHeight(bound, "upper");
  if (bound === undefined || highM === undefined) return { outcome: "open", note: note(...notes) };
  const gap = coordinate.gapAt(bound);
  if (gap !== undefined) {
    const edges = [levelWords(rangeCase, gap.baseM), levelWords(rangeCase, gap.topM)];
    const [low, high] = rangeCase.end === "base" ? edges.toReversed() : edges;
    const words = `bound falls in a gap from ${low} to ${high}`;
    return { highM, outcome: "in-hiatus", note: note(words, ...notes) };
  }
  if (highM <= topM) return { highM, outcome: "closed", note: note(...notes) };
  const atTop = confidenceToReach(range, coordinate.toEffective(topM));
  const { above, sectionEnd } = wordsOf(rangeCase);
  const words = `bound lies ${metres(highM - topM)} ${above} the ${sectionEnd}, reached at level ${round(atTop)}`;
  return { highM, outcome: "leaves-section", note: note(words, ...notes) };
}

function round(level: number): number {
  return Math.round(level * 10000) / 10000;
}
