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
import { breakNotes, missingRockNotes } from "./rock-breaks.ts";
import { uniformBound, uniformPoint } from "./uniform.ts";

/** With this many horizons or fewer the interval mostly reflects the assumption of uniform finds. */
const FEW_HORIZONS = 4;

/** The row of method `uniform`: one-ended upper bound, point estimate, and the level at which it reaches H. */
export function uniformEnd(given: RangeCase): RangeEnd {
  const rangeCase = { ...given, ...given.constant };
  const undefinedBecause = reasonWithoutBound(rangeCase);
  const common = { ...commonFields(rangeCase), method: "uniform" as const };
  if (undefinedBecause !== undefined) return { ...common, outcome: "undefined", note: undefinedBecause };
  const { range, coordinate, confidence } = rangeCase;
  const fields = { ...common, lowM: range.lastM, ...reachFields(rangeCase) };
  if (rangeCase.reachesTop) return { ...fields, outcome: "leaves-section", note: cutOffNote(rangeCase) };
  const bound = uniformBound(range, confidence);
  const point = uniformPoint(range);
  const pointM = point === undefined ? undefined : coordinate.toHeight(point, "upper");
  return {
    ...fields,
    ...(pointM === undefined ? {} : { pointM }),
    ...boundFields(rangeCase, bound, [...missingRockNotes(rangeCase), fewNote(range.horizons)]),
  };
}

/** Why the end of a range that the section cuts off is open. */
export function cutOffNote(rangeCase: RangeCase): string {
  const { highest, sectionEnd } = wordsOf(rangeCase);
  return `found in the ${highest} sample searched: the end is open at the ${sectionEnd}`;
}

/** Confidence at which the interval just reaches H; absent where the last find lies above H or the end is cut off. */
export function reachFields({
  range,
  coordinate,
  horizon,
  reachesTop,
}: RangeCase): Pick<RangeEnd, "reachLevel"> {
  if (reachesTop || horizon === undefined || horizon.positionM < range.lastM) return {};
  return { reachLevel: confidenceToReach(range, coordinate.toEffective(horizon.positionM)) };
}

export function fewNote(horizons: number): string | undefined {
  return horizons <= FEW_HORIZONS
    ? `${horizons} horizons: the interval mostly reflects the assumption of uniform finds`
    : undefined;
}

/** `boundOutcome` of a method whose confidence at any level is that of the pivot. */
export function boundFields(
  rangeCase: RangeCase,
  bound: number | undefined,
  notes: readonly (string | undefined)[],
): Pick<RangeEnd, "highM" | "outcome" | "note"> {
  return boundOutcome(rangeCase, bound, {
    notes,
    reachAt: (level) => confidenceToReach(rangeCase.range, level),
  });
}

interface BoundWords {
  readonly notes: readonly (string | undefined)[];
  /** Confidence at which the interval reaches a level, in effective metres; undefined: not known. */
  readonly reachAt: (level: number) => number | undefined;
}

/**
 * The bound as a height with its outcome. Above the section's top the number is kept, recovery being continued there,
 * but the outcome says that no rock of this section can confirm it.
 */
export function boundOutcome(
  rangeCase: RangeCase,
  bound: number | undefined,
  { notes: given, reachAt }: BoundWords,
): Pick<RangeEnd, "highM" | "outcome" | "note"> {
  const { coordinate, topM } = rangeCase;
  const { above, sectionEnd } = wordsOf(rangeCase);
  const atTop = reachAt(coordinate.toEffective(topM));
  const highM = bound === undefined ? undefined : coordinate.toHeight(bound, "upper");
  if (bound === undefined || highM === undefined) {
    const reached = atTop === undefined ? undefined : `the ${sectionEnd} is reached at level ${round(atTop)}`;
    return { outcome: "open", note: note(...given, reached) };
  }
  const notes = [...given, ...breakNotes(rangeCase, bound, reachAt)];
  const gap = coordinate.gapAt(bound);
  if (gap !== undefined) {
    const edges = [levelWords(rangeCase, gap.baseM), levelWords(rangeCase, gap.topM)];
    const [low, high] = rangeCase.end === "base" ? edges.toReversed() : edges;
    const words = `bound falls in a gap from ${low} to ${high}`;
    return { highM, outcome: "in-hiatus", note: note(words, ...notes) };
  }
  if (highM <= topM) return { highM, outcome: "closed", note: note(...notes) };
  const reached = atTop === undefined ? "" : `, reached at level ${round(atTop)}`;
  const words = `bound lies ${metres(highM - topM)} ${above} the ${sectionEnd}${reached}`;
  return { highM, outcome: "leaves-section", note: note(words, ...notes) };
}

/** A level or chance to four decimals, for notes. */
export function round(level: number): number {
  return Math.round(level * 10000) / 10000;
}

/** A level in effective metres as an upper limit of height in the section, for notes. */
export function heightWords(rangeCase: RangeCase, level: number): string {
  const heightM = rangeCase.coordinate.toHeight(level, "upper");
  return heightM === undefined ? "beyond the declared recovery" : levelWords(rangeCase, heightM);
}
