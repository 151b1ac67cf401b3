import type { TrueSection } from "./truth.ts";

const metresPer = { m: 1, cm: 0.01, ft: 0.3048 } as const;
const decimalsOf = { m: 2, cm: 1, ft: 2 } as const;

/** A section's own upward scale: its unit, counted upward (minus the depth in a core). */
export const upwardFromM = (section: TrueSection, heightM: number): number =>
  heightM / metresPer[section.unit];

export const metresFromUpward = (section: TrueSection, upward: number): number =>
  upward * metresPer[section.unit];

export const upwardFromOwn = (section: TrueSection, own: number): number =>
  section.axis === "depth" ? -own : own;

/** The cell of a table: the section's own axis, unit and usual decimals. */
export function ownText(section: TrueSection, upward: number, extraDecimals = 0): string {
  const own = section.axis === "depth" ? -upward : upward;
  return own.toFixed(decimalsOf[section.unit] + extraDecimals);
}

export const lengthText = (section: TrueSection, length: number): string =>
  length.toFixed(decimalsOf[section.unit]);

export const toStep = (section: TrueSection, upward: number): number =>
  Number((Math.round(upward / section.step) * section.step).toFixed(6));

/** The base of the smear: the event surface less the mixing length. */
export const smearBaseM = (section: TrueSection): number => section.eventSurfaceM - section.mixingLengthM;

/** Height of a moment, in thousand years after the event; everything within a hiatus lies on its surface. */
export function heightAtKa(section: TrueSection, ka: number): number {
  if (ka >= 0) return section.eventSurfaceM + ka * section.rateAboveMPerKa;
  const unbroken = section.eventSurfaceM + ka * section.rateBelowMPerKa;
  if (section.hiatus === undefined) return unbroken;
  const cut = smearBaseM(section);
  return unbroken >= cut ? unbroken : Math.min(cut, unbroken + section.hiatus.missingM);
}

/** The moment that a height holds; at a hiatus, the younger side. */
export function kaAtHeight(section: TrueSection, heightM: number): number {
  const above = heightM - section.eventSurfaceM;
  if (above >= 0) return above / section.rateAboveMPerKa;
  const isUnderCut = section.hiatus !== undefined && heightM < smearBaseM(section);
  const missing = isUnderCut && section.hiatus !== undefined ? section.hiatus.missingM : 0;
  return (above - missing) / section.rateBelowMPerKa;
}
