import { isUninformative } from "../ranges/pivot.ts";
import { commonEndGiven } from "./common-end.ts";
import { chancesAbove, expectedLasts } from "./last-finds.ts";
import { localLevel } from "./last-finds-band.ts";
import type { LastFindsPoint } from "./result.ts";
import { type SetCase, simulationOf } from "./set-case.ts";
import { allCandidates } from "./sets.ts";

const STEPS = 60;

/**
 * Last finds above each level of a section, observed, and as they would be if all ranges of the set ended together at its
 * estimated common level: at every last find and on an even grid from the lowest of them to that level. For the candidates and
 * each declared list. Taxa without an informative range say nothing of where their last find would lie and are left out.
 */
export function lastFindsCurve(setCase: SetCase): LastFindsPoint[] {
  const { section, set, coordinate, confidence, settings } = setCase;
  if (set.set !== allCandidates && !(set.set in settings.timing.sets)) return [];
  const ranges = set.ranges.filter((range) => !isUninformative(range));
  const middle = commonEndGiven(ranges, 0.5);
  const endM = middle.kind === "interval" ? coordinate.toHeight(middle.high, "upper") : undefined;
  if (ranges.length < 2 || middle.kind !== "interval" || endM === undefined) return [];
  const local = localLevel(ranges, middle.high, {
    confidence,
    simulation: simulationOf(settings),
  });
  return positionsOf(
    ranges.map((range) => range.lastM),
    endM,
  ).map((positionM) => {
    const chances = chancesAbove(ranges, coordinate.toEffective(positionM), middle.high);
    return {
      section: section.name,
      set: set.set,
      positionM,
      observed: ranges.filter((range) => range.lastM > positionM).length,
      ...expectedLasts(chances, { confidence, local }),
      level: confidence,
    };
  });
}

function positionsOf(lastsM: readonly number[], endM: number): readonly number[] {
  const lowestM = Math.min(...lastsM);
  const even = Array.from({ length: STEPS + 1 }, (_, i) => lowestM + ((endM - lowestM) * i) / STEPS);
  return [...new Set([...lastsM, ...even])].toSorted((a, b) => a - b);
}
