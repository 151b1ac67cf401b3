import { describe, expect, test } from "vitest";
import { FACE_IDS } from "../../src/figures/faces.ts";
import { fitText, textWidth, wrapText } from "../../src/figures/text.ts";
import measured from "./fixtures/measured-text.json" with { type: "json" };

const style = { face: "sans", size: 10 } as const;

describe.each(FACE_IDS)("the stored widths of %s", (face) => {
  // Widths in em by HarfBuzz (hb-shape) on the committed faces; written by src/figures/fonts/make-faces.py.
  test.each(Object.entries(measured[face]))("measure %j as a shaping engine does", (text, width) => {
    expect(textWidth(text, { face, size: 1 })).toBeCloseTo(width, 6);
  });
});

test("digits of the sans faces all have one width", () => {
  for (const face of ["sans", "sansSemibold"] as const) {
    const widths = Array.from("0123456789", (digit) => textWidth(digit, { face, size: 10 }));
    expect(new Set(widths).size).toBe(1);
  }
});

test("width grows with size in proportion", () => {
  expect(textWidth("Iridium", { face: "sans", size: 20 })).toBeCloseTo(2 * textWidth("Iridium", style), 10);
});

test("a character outside the face still takes room", () => {
  expect(textWidth("漢", style)).toBeGreaterThan(0);
});

describe("fitText", () => {
  test("leaves a text that fits as it is", () => {
    expect(fitText("marl", 100, style)).toBe("marl");
  });

  test("shortens a text to the width with an ellipsis", () => {
    const fitted = fitText("calcareous nannoplankton", 60, style);
    expect(fitted).toMatch(/^calc.*…$/);
    expect(textWidth(fitted, style)).toBeLessThanOrEqual(60);
    expect(textWidth(fitted.replace("…", "ou…"), style)).toBeGreaterThan(60);
  });

  test("is empty where not even an ellipsis fits", () => {
    expect(fitText("marl", 1, style)).toBe("");
  });
});

describe("wrapText", () => {
  test("breaks at spaces into lines that fit, and loses no word", () => {
    const text = "Rock patterns drawn after the standard of the survey, section 37";
    const lines = wrapText(text, 110, style);
    expect(lines.length).toBeGreaterThan(1);
    expect(lines.join(" ")).toBe(text);
    expect(lines.every((line) => textWidth(line, style) <= 110)).toBe(true);
  });

  test("stands a word too wide on a line of its own", () => {
    expect(wrapText("a nannoplankton b", 20, style)).toEqual(["a", "nannoplankton", "b"]);
  });

  test("makes no line of nothing", () => {
    expect(wrapText("  ", 50, style)).toEqual([]);
  });
});
