import { sameLevelM } from "./legs.ts";
import type { RockInterval } from "./model.ts";

/**
 * Height in metres of the same rock where it is passed first, for a height strictly inside `repeat`, a stretch of section
 * that a fault shows a second time. Without thicknesses the first passage is the stretch of equal length directly below;
 * with thickness_low equal to thickness_high it lies that far down. Undefined where the distance is not known: the two
 * differ, one is blank, or it is 0.
 */
export function firstPassage(heightM: number, repeat: RockInterval): number | undefined {
  const { baseM, topM, thicknessLowM: low, thicknessHighM: high } = repeat;
  const distanceM = low === undefined && high === undefined ? topM - baseM : low === high ? low : undefined;
  return distanceM === undefined || distanceM <= sameLevelM ? undefined : heightM - distanceM;
}
