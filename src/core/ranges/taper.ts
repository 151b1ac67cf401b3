import { rangeMethods } from "./methods.ts";
import type { RangeCase } from "./range-case.ts";
import type { RangeMethod, Taper } from "./result.ts";
import { sampledBound } from "./sampled-end.ts";
import type { Survival } from "./survival.ts";

/** A taper is drawn down to this chance, or to the section's top. */
const LEAST_CHANCE = 0.005;
const STEPS = 48;
const HALVINGS = 50;

interface Outline {
  readonly heightsM: readonly number[];
  readonly chances: readonly number[];
}

/**
 * The taper of a range above its last find by one method: at each height the chance, 1 minus the confidence of the method,
 * that the taxon was still there. Falls from 1 at the last find. Undefined where the method says nothing.
 */
export function taperBy(rangeCase: RangeCase, method: RangeMethod): Taper | undefined {
  const survival = rangeMethods[method].survival(rangeCase);
  if (survival === undefined) return undefined;
  const outline = survival.kind === "steps" ? stepOutline(rangeCase, survival) : curve(rangeCase, survival);
  if (outline === undefined) return undefined;
  const endM = boundBy(rangeCase, method);
  return {
    section: rangeCase.section,
    taxon: rangeCase.taxon.taxon,
    method,
    ...outline,
    ...(endM === undefined ? {} : { endM }),
  };
}

/** Where the interval at the study's confidence ends; undefined where it leaves the section. */
function boundBy(rangeCase: RangeCase, method: RangeMethod): number | undefined {
  if (method === "sampled") return sampledBound(rangeCase);
  const { outcome, highM } = rangeMethods[method].end(rangeCase);
  return outcome === "closed" || outcome === "in-hiatus" ? highM : undefined;
}

/** The taper by the leading method; where that says nothing, `uniform` stands in; undefined where neither does. */
export function taper(rangeCase: RangeCase, leading: RangeMethod): Taper | undefined {
  return taperBy(rangeCase, leading) ?? taperBy(rangeCase, "uniform");
}

/**
 * Evenly spaced levels, mapped to height: dense where the chance falls fast; flat across rock without recovery. Undefined
 * for a method that bounds an end at some levels without a chance for each.
 */
function curve(
  { range, topM }: RangeCase,
  { coordinate, chanceAt }: Survival & { readonly kind: "curve" },
): Outline | undefined {
  const upToM = Math.max(topM, range.lastM);
  const lowest = coordinate.toEffective(range.lastM);
  if (chanceAt(coordinate.toEffective(upToM)) === undefined) return undefined;
  const chance = (level: number) => Math.min(1, Math.max(0, chanceAt(level) ?? 0));
  const highest = lastWith(chance, lowest, coordinate.toEffective(upToM));
  const heights = new Set([range.lastM]);
  for (let step = 1; step <= STEPS; step++) {
    const share = step / STEPS;
    const heightM = coordinate.toHeight(lowest + (highest - lowest) * share * share, "upper");
    if (heightM !== undefined) heights.add(Math.min(heightM, upToM));
  }
  for (const gap of coordinate.gaps)
    for (const edgeM of [gap.baseM, gap.topM])
      if (edgeM > range.lastM && edgeM <= upToM && coordinate.toEffective(edgeM) <= highest)
        heights.add(edgeM);
  const heightsM = [...heights].toSorted((a, b) => a - b);
  const chances = heightsM.map((heightM) =>
    heightM === range.lastM ? 1 : chance(coordinate.toEffective(heightM)),
  );
  return { heightsM, chances };
}

/** The level where the chance has fallen to the least that is drawn, or the top of what is drawn. */
function lastWith(chance: (level: number) => number, lowest: number, top: number): number {
  if (chance(top) >= LEAST_CHANCE) return top;
  let [low, high] = [lowest, top];
  for (let halving = 0; halving < HALVINGS; halving++) {
    const middle = 0.5 * (low + high);
    if (chance(middle) >= LEAST_CHANCE) low = middle;
    else high = middle;
  }
  return high;
}

/** Steps: the chance falls at each barren horizon sampled, and between them nobody looked. */
function stepOutline(
  { range, topM }: RangeCase,
  { barrenM, chances: steps }: Survival & { readonly kind: "steps" },
): Outline {
  const heightsM = [range.lastM];
  const chances = [1];
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
