import type { Coordinate } from "../ranges/coordinate.ts";
import { commonEndGiven, informative } from "./common-end.ts";
import type { PlacedRange } from "./duration.ts";

export interface Separation {
  /** Later end minus earlier end, metres of height; negative: the groups ended the other way round. */
  readonly lowM: number;
  readonly highM: number;
}

/**
 * How far apart did two groups end, each at one level? Interval of theta_late - theta_early in metres, exact at level C for
 * any recovery: with u_G the level at which the pooled pivot of a group falls to 1 - C, mapped to heights, it is
 * [M_late - u_early, u_late - M_early]. Whichever group attains the highest find once shifted, the pivot of the other is
 * uniform on (0, 1).
 *
 * The two groups must be declared before the last finds are seen: chosen from them, the interval lies too far from 0.
 * Undefined where a group has no informative taxon; the sides open are absent where recovery is not known up to a bound.
 * The question: S. C. Wang & P. J. Everson 2007, Paleobiology 33:324-336; the exact interval is ours.
 */
export function separation(
  groups: { readonly early: readonly PlacedRange[]; readonly late: readonly PlacedRange[] },
  coordinate: Coordinate,
  confidence: number,
): Partial<Separation> | undefined {
  const early = groupEnd(groups.early, coordinate, confidence);
  const late = groupEnd(groups.late, coordinate, confidence);
  if (early === undefined || late === undefined) return undefined;
  return {
    ...(early.boundM === undefined ? {} : { lowM: late.lastM - early.boundM }),
    ...(late.boundM === undefined ? {} : { highM: late.boundM - early.lastM }),
  };
}

function groupEnd(ranges: readonly PlacedRange[], coordinate: Coordinate, confidence: number) {
  const kept = ranges.filter((range) => informative([range]).length > 0);
  const bound = commonEndGiven(kept, confidence);
  if (bound.kind !== "interval") return undefined;
  return {
    lastM: Math.max(...kept.map((range) => range.lastM)),
    boundM: coordinate.toHeight(bound.high, "upper"),
  };
}
