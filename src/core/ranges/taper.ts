import { pivot } from "./pivot.ts";
import type { RangeCase } from "./range-case.ts";
import { reasonWithoutBound } from "./range-case.ts";
import type { RangeMethod, Taper } from "./result.ts";
import { chancesOf } from "./sampled-range.ts";
import { uniformBound } from "./uniform.ts";

/** A taper is drawn down to this chance, or to the section's top. */
const LEAST_CHANCE = 0.005;
const STEPS = 48;

interface Outline {
  readonly heightsM: readonly number[];
  readonly chances: readonly number[];
}

/**
 * The taper of a range above its last find: at each height the chance, 1 minus the confidence of the leading method,
 * that the taxon was still there. Falls from 1 at the last find; where the leading method is undefined, `uniform`
 * stands in; undefined where neither says anything.
 *
 * @param endM upper end of the interval at the study's confidence, where it closes inside the section.
 */
export function taper(
  rangeCase: RangeCase,
  leading: RangeMethod,
  endM: (method: RangeMethod) => number | undefined,
): Taper | undefined {
  const canBeSampled = (rangeCase.sampled?.count.finds ?? 0) > 0;
  const method = leading === "sampled" && !canBeSampled ? "uniform" : leading;
  if (method !== "sampled" && reasonWithoutBound(rangeCase) !== undefined) return undefined;
  const outline = method === "sampled" ? sampledOutline(rangeCase) : uniformOutline(rangeCase);
  const end = endM(method);
  return {
    section: rangeCase.section,
    taxon: rangeCase.taxon.taxon,
    method,
    ...outline,
    ...(end === undefined ? {} : { endM: end }),
  };
}

/** Evenly spaced levels, mapped to height: dense where the chance falls fast; flat across rock without recovery. */
function uniformOutline({ range, coordinate, topM: sectionTopM }: RangeCase): Outline {
  const lowest = coordinate.toEffective(range.lastM);
  const topM = Math.max(sectionTopM, range.lastM);
  const highest = Math.min(
    coordinate.toEffective(topM),
    uniformBound(range, 1 - LEAST_CHANCE) ?? Number.POSITIVE_INFINITY,
  );
  const heights = new Set([range.lastM]);
  for (let step = 1; step <= STEPS; step++) {
    const share = step / STEPS;
    const heightM = coordinate.toHeight(lowest + (highest - lowest) * share * share, "upper");
    if (heightM !== undefined) heights.add(Math.min(heightM, topM));
  }
  for (const gap of coordinate.gaps)
    for (const edgeM of [gap.baseM, gap.topM])
      if (edgeM > range.lastM && edgeM <= topM && coordinate.toEffective(edgeM) <= highest)
        heights.add(edgeM);
  const heightsM = [...heights].toSorted((a, b) => a - b);
  return { heightsM, chances: heightsM.map((heightM) => pivot(range, coordinate.toEffective(heightM))) };
}

/** Steps: the chance falls at each barren horizon sampled, and between them nobody looked. */
function sampledOutline({ range, topM, sampled }: RangeCase): Outline {
  const heightsM = [range.lastM];
  const chances = [1];
  const barrenM = sampled?.barrenM ?? [];
  const steps = sampled === undefined ? [1] : chancesOf(sampled);
  barrenM.forEach((heightM, index) => {
    if (heightM <= range.lastM || steps[index] < LEAST_CHANCE) return;
    heightsM.push(heightM, heightM);
    chances.push(chances[chances.length - 1], steps[index + 1]);
  });
  const isDrawnOut = chances[chances.length - 1] >= LEAST_CHANCE;
  if (isDrawnOut && topM > heightsM[heightsM.length - 1]) {
    heightsM.push(topM);
    chances.push(chances[chances.length - 1]);
  }
  return { heightsM, chances };
}
