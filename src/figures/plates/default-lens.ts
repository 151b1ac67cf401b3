import type { Analysis } from "../../core/analysis-result.ts";
import type { View } from "./drawing.ts";
import { extentM, mainHorizonOf, sectionNamed } from "./section-frame.ts";

const HALF_WIDTH_M = 1;
/** Of the section at most, so that a thin one keeps its surroundings. */
const LARGEST_PART = 0.06;
/** Part of the plate's height that the band is given. */
const SHARE = 0.45;
const MOST = 50;

/** A lens under which centimetres about the main horizon show; none where the section has no main horizon. */
export function defaultLens(analysis: Analysis, name: string): View["lens"] {
  if (mainHorizonOf(analysis, name) === undefined) return undefined;
  const [bottomM, topM] = extentM(sectionNamed(analysis, name));
  const halfWidthM = Math.min(HALF_WIDTH_M, LARGEST_PART * (topM - bottomM));
  const rest = topM - bottomM - 2 * halfWidthM;
  const times = (SHARE * rest) / ((1 - SHARE) * 2 * halfWidthM);
  return { halfWidthM, times: Math.min(MOST, Math.round(times)) };
}
