import { heightToGiven } from "../../core/study/heights.ts";
import type { Section } from "../../core/study/model.ts";

const minus = (text: string) => text.replace("-", "\u2212");

/** Keeps a number and its unit on one line. */
const TIED = "\u00a0";

/** Metres with as many decimals as a field worker would give: 0.013, 0.42, 12.77, 148.3. */
export const metres = (value: number): string => minus(value.toFixed(decimalsOf(value)));

/** The same with its unit: `0.42 m`. */
export const inMetres = (value: number): string => `${metres(value)}${TIED}m`;

function decimalsOf(value: number): number {
  const size = Math.abs(value);
  return size >= 100 ? 1 : size >= 0.1 || size === 0 ? 2 : 3;
}

/** A position in the section's own axis and unit: `12.77 m`, `depth 812.3 ft`. */
export function position(section: Section, heightM: number, withinM = Number.POSITIVE_INFINITY): string {
  const text = `${inOwnUnit(section, heightM, withinM)}${TIED}${section.unit}`;
  return section.axis === "depth" ? `depth${TIED}${text}` : text;
}

/** An interval in the section's own axis and unit, the stratigraphically lower end first: `12.71 to 12.83 m`. */
export function positionInterval(section: Section, lowM: number, highM: number): string {
  const widthM = highM - lowM;
  return `${inOwnUnit(section, lowM, widthM)} to ${inOwnUnit(section, highM, widthM)}${TIED}${section.unit}`;
}

/** Enough decimals to tell apart what lies `withinM` of each other, and no more than a millimetre needs. */
function inOwnUnit(section: Section, heightM: number, withinM: number): string {
  const usual = { m: 2, ft: 2, cm: 1, mm: 0 }[section.unit];
  const finest = { m: 4, ft: 3, cm: 2, mm: 1 }[section.unit];
  const isFine = withinM < 0.05;
  const decimals = isFine ? Math.min(finest, usual + (withinM < 0.005 ? 2 : 1)) : usual;
  return minus(heightToGiven(heightM, section).toFixed(decimals));
}

/** An offset with its sign: `+0.62`, `−1.30`. */
export const offset = (valueM: number): string => `${valueM > 0 ? "+" : ""}${metres(valueM)}`;

/** Two offsets to the decimals of the finer: `−0.013 to +0.144 m`. */
export function offsetInterval(lowM: number, highM: number): string {
  const decimals = Math.max(decimalsOf(lowM), decimalsOf(highM));
  const signed = (value: number) => `${value > 0 ? "+" : ""}${minus(value.toFixed(decimals))}`;
  return `${signed(lowM)} to ${signed(highM)}${TIED}m`;
}

export function probability(p: number): string {
  if (p < 0.001) return `<${TIED}0.001`;
  if (p > 0.999) return `>${TIED}0.999`;
  if (p > 0.99) return p.toFixed(3);
  return p < 0.1 ? p.toPrecision(2) : p.toFixed(2);
}

/** `p = 0.46`, `p < 0.001`. */
export const pValue = (p: number): string =>
  p < 0.001 || p > 0.999 ? `p${TIED}${probability(p)}` : `p${TIED}=${TIED}${probability(p)}`;

export const percent = (share: number): string =>
  `${share < 1 && share >= 0.99995 ? "over 99.99" : Number((100 * share).toPrecision(4))}${TIED}%`;

export const significant = (value: number, digits = 3): string =>
  minus(String(Number(value.toPrecision(digits))));
