import { findRoot } from "../numeric/roots.ts";
import { highestLast, informative } from "./common-end.ts";
import { largestLevelP, levelTest } from "./confidence-levels.ts";
import type { LevelCurve } from "./result.ts";
import type { SetCase } from "./set-case.ts";
import type { TimingWindow } from "./window.ts";

/** The curve is drawn until p falls under this. */
const LEAST_P = 1e-3;
const STEPS = 64;

/**
 * p of `confidence-levels` at heights from the highest last find upward, to where it vanishes or the window of end
 * levels ends; with the peak, the edges of rock without recovery and the horizons among them. Below it p is 0.
 * Undefined where no taxon is informative or the window ends below the highest last find.
 */
export function levelCurve(
  setCase: SetCase,
  window: TimingWindow,
  steps: number = STEPS,
): LevelCurve | undefined {
  const { section, set, coordinate, horizons } = setCase;
  if (informative(set.ranges).length === 0) return undefined;
  const lowestM = Math.max(...set.ranges.map((range) => range.lastM));
  if (!(window.highM > lowestM)) return undefined;
  const pAt = (heightM: number) => levelTest(set.ranges, coordinate.toEffective(heightM))?.p ?? 0;
  const peakM = peak(setCase, lowestM, window.highM);
  const topM =
    pAt(window.highM) >= LEAST_P || pAt(peakM) < LEAST_P
      ? window.highM
      : findRoot((heightM) => pAt(heightM) - LEAST_P, peakM, window.highM, { tolerance: 1e-6 });
  const spanM = topM - lowestM;
  const even = Array.from({ length: steps + 1 }, (_, i) => lowestM + (spanM * i * i) / (steps * steps));
  const edges = coordinate.gaps.flatMap((gap) => [gap.baseM, gap.topM]);
  const marked = [peakM, ...edges, ...horizons.map(({ marker }) => marker.positionM)];
  const heights = [...even, ...marked].filter((heightM) => heightM >= lowestM && heightM <= topM);
  const heightsM = [...new Set(heights)].toSorted((a, b) => a - b);
  return { section: section.name, set: set.set, heightsM, p: heightsM.map(pAt) };
}

function peak({ set, coordinate }: SetCase, lowestM: number, highestM: number): number {
  const low = highestLast(set.ranges);
  const best = largestLevelP(set.ranges, low, coordinate.toEffective(highestM));
  const heightM = best === undefined ? undefined : coordinate.toHeight(best.at, "lower");
  return Math.min(highestM, Math.max(lowestM, heightM ?? lowestM));
}
