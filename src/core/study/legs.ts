import type { Leg } from "./model.ts";

/** Two levels nearer than this are one level (1e-9 m). */
export const sameLevelM = 1e-9;

/**
 * Height in metres of a reading on a leg, linear between the leg's rows; undefined outside them.
 * `reading` is in the section's own unit.
 */
export function legHeight(leg: Leg, reading: number): number | undefined {
  const { readings, heightsM } = leg;
  const last = readings.length - 1;
  if (!(reading >= readings[0] && reading <= readings[last])) return undefined;
  let upper = 1;
  while (upper < last && readings[upper] < reading) upper += 1;
  const share = (reading - readings[upper - 1]) / (readings[upper] - readings[upper - 1]);
  if (share === 1) return heightsM[upper];
  return heightsM[upper - 1] + share * (heightsM[upper] - heightsM[upper - 1]);
}

/**
 * Gives the same number to levels within 1e-9 m of each other, the number met first, so that a horizon met in two legs
 * is one level.
 */
export function levelRegister(): (heightM: number) => number {
  const known = new Map<number, number>();
  const cellM = 2 * sameLevelM;
  return (heightM) => {
    const cell = Math.floor(heightM / cellM);
    for (const near of [cell, cell - 1, cell + 1]) {
      const level = known.get(near);
      if (level !== undefined && Math.abs(level - heightM) <= sameLevelM) return level;
    }
    known.set(cell, heightM);
    return heightM;
  };
}
