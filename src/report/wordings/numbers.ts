import { heightToGiven } from "../../core/study/heights.ts";
import type { Section } from "../../core/study/model.ts";

const minus = (text: string) => text.replace("-", "\u2212");

/** Metres with as many decimals as a field worker would give: 0.013, 0.42, 12.77, 148.3. */
export function metres(value: number): string {
  const size = Math.abs(value);
  const decimals = size >= 100 ? 1 : size >= 0.1 || size === 0 ? 2 : 3;
  return minus(value.toFixed(decimals));
}

/** A position in the section's own axis and unit: `12.77 m`, `depth 812.3 ft`. */
export function position(section: Section, heightM: number, withinM = Number.POSITIVE_INFINITY): string {
  const text = `${inOwnUnit(section, heightM, withinM)} ${section.unit}`;
  return section.axis === "depth" ? `depth ${text}` : text;
}

/** An interval in the section's own axis and unit, the stratigraphically lower end first: `12.71 to 12.83 m`. */
export function positionInterval(section: Section, lowM: number, highM: number): string {
  const widthM = highM - lowM;
  return `${inOwnUnit(section, lowM, widthM)} to ${inOwnUnit(section, highM, widthM)} ${section.unit}`;
}

/** Enough decimals to tell apart what lies `withinM` of each other, and no more than a millimetre needs. */
function inOwnUnit(section: Section, heightM: number, withinM: number): string {
  const usual = { m: 2, ft: 2, cm: 1, mm: 0 }[section.unit];
  const finest = { m: 4, ft: 3, cm: 2, mm: 1 }[section.unit];
  const isFine = withinM < 0.05;
  const decimals = isFine ? Math.min(finest, usual + (withinM < 0.005 ? 2 : 1)) : usual;
  return minus(heightToGiven(heightM, section).toFixed(decimals));
}

/** An offset with its sign: `+0.62 m`, `−1.30 m`. */
export const offset = (valueM: number): string => `${valueM > 0 ? "+" : ""}${metres(valueM)}`;

export function probability(p: number): string {
  if (p < 0.001) return "< 0.001";
  if (p > 0.999) return "> 0.999";
  if (p > 0.99) return p.toFixed(3);
  return p < 0.1 ? p.toPrecision(2) : p.toFixed(2);
}

/** `p = 0.46`, `p < 0.001`. */
export const pValue = (p: number): string =>
  p < 0.001 || p > 0.999 ? `p ${probability(p)}` : `p = ${probability(p)}`;

export const percent = (share: number): string => `${Number((100 * share).toPrecision(4))}\u00a0%`;

export const significant = (value: number, digits = 3): string =>
  minus(String(Number(value.toPrecision(digits))));
