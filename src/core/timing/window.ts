import type { MarkerHorizon } from "../markers/result.ts";
import type { Section } from "../study/model.ts";
import type { TaxonRange } from "./range-data.ts";

/** The window of end levels in one section, in heights. */
export interface TimingWindow {
  readonly lowM: number;
  readonly highM: number;
  /** True where the declared window did not reach from the lowest last find to above the highest. */
  readonly isWidened: boolean;
}

/** `timing.window` is metres from H, or heights where the section has no H; too short, it is widened to the section. */
export function timingWindow(
  declared: readonly [number, number],
  ranges: readonly TaxonRange[],
  { section, horizon }: { readonly section: Section; readonly horizon: MarkerHorizon | undefined },
): TimingWindow {
  const origin = horizon?.positionM ?? 0;
  const lowM = origin + declared[0];
  const highM = origin + declared[1];
  const lasts = ranges.map((range) => range.lastM);
  const isWidened = lowM > Math.min(...lasts) || highM <= Math.max(...lasts);
  if (!isWidened) return { lowM, highM, isWidened };
  return {
    lowM: Math.min(lowM, section.bottomM, ...lasts),
    highM: Math.max(highM, section.topM),
    isWidened,
  };
}
