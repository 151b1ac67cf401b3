import { commonFields, type RangeCase } from "./range-case.ts";
import type { RangeEnd, RangeMethod } from "./result.ts";
import type { Survival } from "./survival.ts";
import { boundOutcome, cutOffNote } from "./uniform-end.ts";
import type { LevelAsked } from "./window-end.ts";

/** What a method says about one upper end, levels in effective metres. */
export interface Estimate {
  /** Undefined where nothing bounds the end at this level. */
  readonly bound: number | undefined;
  readonly point?: number;
  /** Chance of a last find as low as it is if the taxon lived to a level, or that the end lies above it. */
  readonly chanceAt: (level: number) => number | undefined;
  /** Where the chance is printed; absent: at the main horizon. */
  readonly asked?: LevelAsked;
  /** Finds that carry information, where not the exponent of the range. */
  readonly exponent?: number;
  /** What the bound really covers, where not the level asked for. */
  readonly level?: number;
  readonly notes: readonly (string | undefined)[];
}

export interface Estimator {
  readonly method: RangeMethod;
  /** Why the method says nothing about a case; undefined where it does. */
  readonly reason: (rangeCase: RangeCase) => string | undefined;
  readonly estimate: (rangeCase: RangeCase) => Estimate;
}

/** The row of each case, and the chance of survival that its bound is a level of. */
export interface EstimatedEnd {
  (rangeCase: RangeCase): RangeEnd;
  readonly survival: (rangeCase: RangeCase) => Survival | undefined;
}

/** The row that an estimator gives for each case: named outcomes first, then its bound, point, p and reach of H. */
export function estimatedEnd(estimator: Estimator): EstimatedEnd {
  return Object.assign(rowBy(estimator), {
    survival: (rangeCase: RangeCase): Survival | undefined => {
      if (estimator.reason(rangeCase) !== undefined) return undefined;
      const { chanceAt } = estimator.estimate(rangeCase);
      return { kind: "curve", coordinate: rangeCase.coordinate, chanceAt };
    },
  });
}

function rowBy({ method, reason, estimate }: Estimator): (rangeCase: RangeCase) => RangeEnd {
  return (rangeCase) => {
    const common = { ...commonFields(rangeCase), method };
    const undefinedBecause = reason(rangeCase);
    if (undefinedBecause !== undefined) return { ...common, outcome: "undefined", note: undefinedBecause };
    const lowM = rangeCase.range.lastM;
    if (rangeCase.reachesTop)
      return { ...common, lowM, outcome: "leaves-section", note: cutOffNote(rangeCase) };
    const made = estimate(rangeCase);
    return {
      ...common,
      exponent: made.exponent ?? common.exponent,
      level: made.level ?? common.level,
      lowM,
      ...pointField(rangeCase, made.point),
      ...chanceFields(rangeCase, made),
      ...boundOutcome(rangeCase, made.bound, {
        notes: [made.asked?.words, ...made.notes],
        reachAt: (level) => complement(made.chanceAt(level)),
      }),
    };
  };
}

function pointField({ coordinate }: RangeCase, point: number | undefined): Pick<RangeEnd, "pointM"> {
  const pointM = point === undefined ? undefined : coordinate.toHeight(point, "upper");
  return pointM === undefined ? {} : { pointM };
}

function chanceFields(
  { range, coordinate, horizon }: RangeCase,
  { asked, chanceAt }: Estimate,
): Pick<RangeEnd, "p" | "reachLevel"> {
  const at = asked ?? (horizon === undefined ? undefined : { levelM: horizon.positionM, isHorizon: true });
  if (at === undefined || at.levelM < range.lastM) return {};
  const p = chanceAt(coordinate.toEffective(at.levelM));
  if (p === undefined) return {};
  return { p, ...(at.isHorizon ? { reachLevel: 1 - p } : {}) };
}

function complement(chance: number | undefined): number | undefined {
  return chance === undefined ? undefined : 1 - chance;
}
