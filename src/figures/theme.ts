import type { TextStyle } from "./text.ts";

/** Colours of a plate. It stays on paper white in every theme of the page: what is seen is what exports. */
export const COLOURS = {
  paper: "#fffdf8",
  ink: "#22252a",
  /** Units, ticks, censored values. */
  soft: "#6d6a63",
  hair: "#e4ded1",
  /** Ground of a column, and the background band of an analyte on it. */
  column: "#faf7ef",
  band: "#ece6d8",
  /** Marker horizons and anomalies. */
  rust: "#a8431d",
  /** What is inferred. */
  blue: "#1f5f8b",
} as const;

/** Smallest text on a plate at its physical size, in points. */
export const SMALLEST_TEXT = 7;

export const TEXT = {
  title: { face: "sansSemibold", size: 10.5 },
  heading: { face: "sansSemibold", size: 8 },
  label: { face: "sans", size: 7.5 },
  labelStrong: { face: "sansSemibold", size: 7.5 },
  unit: { face: "sans", size: 7 },
  taxon: { face: "serifItalic", size: 7.5 },
} as const satisfies Record<string, TextStyle>;

export type MarkShape =
  | "circle"
  | "square"
  | "diamond"
  | "triangle"
  | "inverted-triangle"
  | "plus"
  | "cross"
  | "bar";

/** How a group of taxa is told apart: a colour, and a letter, shape and dash that say the same without it. */
export interface GroupSign {
  readonly colour: string;
  readonly letter: string;
  readonly shape: MarkShape;
  /** SVG dash array; empty is solid. */
  readonly dash: string;
}

/** Four quiet colours; the fifth to eighth are for studies with more groups. */
export const GROUP_SIGNS: readonly GroupSign[] = [
  { colour: "#35618f", letter: "A", shape: "circle", dash: "" },
  { colour: "#7a5a1e", letter: "B", shape: "square", dash: "4 1.5" },
  { colour: "#4b7048", letter: "C", shape: "diamond", dash: "1.5 1.5" },
  { colour: "#7b4a78", letter: "D", shape: "triangle", dash: "4 1.5 1 1.5" },
  { colour: "#27707a", letter: "E", shape: "inverted-triangle", dash: "6 2" },
  { colour: "#5b5f66", letter: "F", shape: "plus", dash: "2.5 1" },
  { colour: "#666619", letter: "G", shape: "cross", dash: "6 1.5 1 1.5 1 1.5" },
  { colour: "#8c4a5c", letter: "H", shape: "bar", dash: "1 2.5" },
];

/** The sign of the group with this place in the study; past the eighth, colours return with a doubled letter. */
export function groupSign(place: number): GroupSign {
  const sign = GROUP_SIGNS[place % GROUP_SIGNS.length];
  if (sign === undefined) throw new RangeError(`groupSign: expected a place from 0, got ${place}`);
  return { ...sign, letter: sign.letter.repeat(1 + Math.floor(place / GROUP_SIGNS.length)) };
}
