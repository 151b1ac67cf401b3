import type { IntervalKind, RockInterval } from "./model.ts";

export interface HeightInterval {
  readonly baseM: number;
  readonly topM: number;
}

const unsearchable: ReadonlySet<IntervalKind> = new Set(["covered", "core-loss", "not-searched"]);

/** Intervals as a sorted list without overlaps; those that touch are joined. */
export function unionOfIntervals(intervals: readonly HeightInterval[]): readonly HeightInterval[] {
  const sorted = intervals.toSorted((a, b) => a.baseM - b.baseM || a.topM - b.topM);
  const union: HeightInterval[] = [];
  for (const { baseM, topM } of sorted) {
    const last = union.at(-1);
    if (last && baseM <= last.topM)
      union[union.length - 1] = { baseM: last.baseM, topM: Math.max(last.topM, topM) };
    else union.push({ baseM, topM });
  }
  return union;
}

/** The rock nobody could search (covered, core loss, not searched), where recovery is 0. */
export const unsearchableIntervals = (intervals: readonly RockInterval[]): readonly HeightInterval[] =>
  unionOfIntervals(intervals.filter(({ kind }) => unsearchable.has(kind)));

/** True where a height lies strictly inside one of the intervals; their ends were seen. */
export const isInside = (heightM: number, intervals: readonly HeightInterval[]): boolean =>
  intervals.some(({ baseM, topM }) => heightM > baseM && heightM < topM);
