import { type TextStyle, textWidth } from "../text.ts";
import { spaceOut } from "./space-out.ts";

/** Names hang down to the right at this angle from the horizontal. */
export const SLANT_DEGREES = 56;
const SLANT = (SLANT_DEGREES * Math.PI) / 180;
const LINE_HEIGHT = 1;

export interface SlantedName {
  readonly text: string;
  /** Where the name's mark stands, and where the name begins: apart where marks stand closer than lines of text can. */
  readonly markX: number;
  readonly x: number;
}

export interface NameRow {
  readonly names: readonly { readonly text: string; readonly x: number }[];
  readonly style: TextStyle;
  readonly bounds?: readonly [number, number];
}

/** Places a row of slanted names under their marks so that no two lines of text touch. */
export function slantedNames({ names, style, bounds }: NameRow): readonly SlantedName[] {
  const gap = (style.size * LINE_HEIGHT) / Math.sin(SLANT);
  const places = spaceOut(
    names.map(({ x }) => x),
    gap,
    bounds,
  );
  return names.map(({ text, x }, i) => ({ text, markX: x, x: places[i] ?? x }));
}

/** Room the row takes downward, in points. */
export function slantedDepth(names: readonly string[], style: TextStyle): number {
  const longest = Math.max(0, ...names.map((name) => textWidth(name, style)));
  return longest * Math.sin(SLANT) + style.size * Math.cos(SLANT);
}

/** Room the last name takes to the right of its mark, in points. */
export function slantedOverhang(name: string, style: TextStyle): number {
  return textWidth(name, style) * Math.cos(SLANT) + style.size * Math.sin(SLANT);
}
