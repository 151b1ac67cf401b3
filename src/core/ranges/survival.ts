import type { Coordinate } from "./coordinate.ts";
import type { InCoordinate } from "./in-coordinate.ts";
import { pivot } from "./pivot.ts";
import { type RangeCase, reasonWithoutBound } from "./range-case.ts";

/**
 * The chance, 1 minus the confidence of a method, that the taxon was still there at each level above its last find: a
 * curve in its coordinate, or steps at the barren horizons above, between which nobody looked.
 */
export type Survival =
  | {
      readonly kind: "curve";
      readonly coordinate: Coordinate;
      /** At a level in effective metres; falls upward. Undefined: the method does not tell. */
      readonly chanceAt: (level: number) => number | undefined;
    }
  | {
      readonly kind: "steps";
      readonly barrenM: readonly number[];
      /** p(j) for j = 0..M_b. */
      readonly chances: Float64Array;
    };

/** The curve of the pivot, in the coordinate of a shape of recovery. */
export function pivotSurvival(rangeCase: RangeCase, shape: InCoordinate): Survival | undefined {
  if (reasonWithoutBound({ ...rangeCase, ...shape }) !== undefined) return undefined;
  const { range, coordinate } = shape;
  return { kind: "curve", coordinate, chanceAt: (level) => pivot(range, level) };
}
