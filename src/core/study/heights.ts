import type { Axis, LengthUnit } from "./model.ts";
import { fromMetres, toMetres } from "./units.ts";

/** The axis and unit in which a section's positions are written. */
export interface OwnScale {
  readonly axis: Axis;
  readonly unit: LengthUnit;
}

/** Metres of stratigraphic height, increasing upward, of a position on a section's own axis: a depth d is -d. */
export function givenToHeight(position: number, scale: OwnScale): number {
  const metres = toMetres(position, scale.unit);
  return scale.axis === "depth" ? 0 - metres : metres;
}

/** The position on the section's own axis and in its unit of a height in metres. */
export function heightToGiven(heightM: number, scale: OwnScale): number {
  return fromMetres(scale.axis === "depth" ? 0 - heightM : heightM, scale.unit);
}

const usualDecimals: Readonly<Record<LengthUnit, number>> = { m: 3, cm: 1, mm: 0, ft: 2 };

/** A position for reading: own axis and unit, to the millimetre or so, trailing zeros dropped ("12.4 m", "116.5 ft depth"). */
export function formatGiven(heightM: number, scale: OwnScale, decimals = usualDecimals[scale.unit]): string {
  const fixed = heightToGiven(heightM, scale).toFixed(decimals);
  const short = fixed.includes(".") ? fixed.replace(/\.?0+$/, "") : fixed;
  const text = /^-0$/.test(short) ? "0" : short;
  return `${text} ${scale.unit}${scale.axis === "depth" ? " depth" : ""}`;
}
