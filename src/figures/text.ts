import type { FaceId } from "./faces.ts";
import { FACE_METRICS } from "./fonts/generated/face-metrics.ts";

/** How a text is set: its face, and its size in points. */
export interface TextStyle {
  readonly face: FaceId;
  readonly size: number;
}

interface Measure {
  readonly advances: ReadonlyMap<string, number>;
  readonly kerning: ReadonlyMap<string, number>;
  readonly unknownAdvance: number;
}

const MEASURES: Readonly<Record<FaceId, Measure>> = {
  sans: measureOf("sans"),
  sansSemibold: measureOf("sansSemibold"),
  serifItalic: measureOf("serifItalic"),
};

function measureOf(face: FaceId): Measure {
  const { unitsPerEm, unknownAdvance, advances, kerning } = FACE_METRICS[face];
  return {
    advances: valuesByText(advances, 1, unitsPerEm),
    kerning: valuesByText(kerning, 2, unitsPerEm),
    unknownAdvance: unknownAdvance / unitsPerEm,
  };
}

function valuesByText(lists: Readonly<Record<string, string>>, length: number, unitsPerEm: number) {
  const values = new Map<string, number>();
  for (const [value, list] of Object.entries(lists)) {
    for (let i = 0; i < list.length; i += length) {
      values.set(list.slice(i, i + length), Number(value) / unitsPerEm);
    }
  }
  return values;
}

/** Width in points, from the stored advance and kerning tables alone: the same on every machine. */
export function textWidth(text: string, { face, size }: TextStyle): number {
  const { advances, kerning, unknownAdvance } = MEASURES[face];
  let width = 0;
  let before = "";
  for (const character of text) {
    width += (advances.get(character) ?? unknownAdvance) + (kerning.get(before + character) ?? 0);
    before = character;
  }
  return width * size;
}

/** Height of a capital letter in points: what centres a line of text on a mark. */
export function capHeight({ face, size }: TextStyle): number {
  const { capHeight: height, unitsPerEm } = FACE_METRICS[face];
  return (height / unitsPerEm) * size;
}

/** Kerning never narrows a line by more than this. */
const KERNING_ALLOWANCE = 1.25;

/** The text, or as much of it as fits `width` with an ellipsis. */
export function fitText(text: string, width: number, style: TextStyle): string {
  if (textWidth(text, style) <= width) return text;
  const characters = charactersWithin(text, width, style);
  while (characters.length > 0) {
    characters.pop();
    const shortened = `${characters.join("").trimEnd()}…`;
    if (textWidth(shortened, style) <= width) return shortened;
  }
  return "";
}

/** The characters from the left that `width` has room for, one too many at most: a cell of any length is cut in one pass. */
function charactersWithin(text: string, width: number, style: TextStyle): string[] {
  const characters: string[] = [];
  let total = 0;
  for (const character of text) {
    characters.push(character);
    total += textWidth(character, style);
    if (total > width * KERNING_ALLOWANCE + style.size) break;
  }
  return characters;
}

/** Lines of at most `width`, broken at spaces; one word wider than that stands alone on its line. */
export function wrapText(text: string, width: number, style: TextStyle): readonly string[] {
  const lines: string[] = [];
  let line = "";
  for (const word of text.split(/\s+/).filter((part) => part !== "")) {
    const longer = line === "" ? word : `${line} ${word}`;
    if (line !== "" && textWidth(longer, style) > width) {
      lines.push(line);
      line = word;
    } else {
      line = longer;
    }
  }
  return line === "" ? lines : [...lines, line];
}
