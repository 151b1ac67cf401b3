import { describe, expect, test } from "vitest";
import { COLOURS, GROUP_SIGNS, groupSign, SMALLEST_TEXT, TEXT } from "../../src/figures/theme.ts";

/** Relative luminance and contrast after WCAG 2.2, section "relative luminance" (w3.org/TR/WCAG22). */
function luminance(hex: string): number {
  const [red = 0, green = 0, blue = 0] = [1, 3, 5].map((at) => {
    const channel = Number.parseInt(hex.slice(at, at + 2), 16) / 255;
    return channel <= 0.04045 ? channel / 12.92 : ((channel + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
}

function contrast(a: string, b: string): number {
  const [light, dark] = [luminance(a), luminance(b)].toSorted((x, y) => y - x);
  return ((light ?? 0) + 0.05) / ((dark ?? 0) + 0.05);
}

test("black on white has the contrast the standard states", () => {
  expect(contrast("#000000", "#ffffff")).toBeCloseTo(21, 6);
});

const texts = [
  COLOURS.ink,
  COLOURS.soft,
  COLOURS.rust,
  COLOURS.blue,
  ...GROUP_SIGNS.map((sign) => sign.colour),
];

describe.each([COLOURS.paper, COLOURS.column])("text on %s", (ground) => {
  test.each(texts)("in %s reads at 4.5 to 1", (colour) => {
    expect(contrast(colour, ground)).toBeGreaterThanOrEqual(4.5);
  });
});

test("groups differ in letter, shape and dash, not in colour alone", () => {
  for (const sign of ["colour", "letter", "shape", "dash"] as const) {
    expect(new Set(GROUP_SIGNS.map((group) => group[sign])).size).toBe(GROUP_SIGNS.length);
  }
});

test("a ninth group takes the first colour again with another letter", () => {
  expect(groupSign(8)).toMatchObject({ colour: groupSign(0).colour, letter: "AA" });
  expect(() => groupSign(-1)).toThrow(/expected a place from 0/);
});

test("no style of text is under 7 points", () => {
  for (const { size } of Object.values(TEXT)) expect(size).toBeGreaterThanOrEqual(SMALLEST_TEXT);
});
