import { describe, expect, test } from "vitest";
import { linearColumn, logColumn } from "../../src/figures/columns/value-scale.ts";
import { axisTicks, readingAt } from "../../src/figures/height-axis.tsx";
import { clippedSpan, heightScale } from "../../src/figures/height-scale.ts";
import { scaleBarLength } from "../../src/figures/marks/scale-bar.tsx";
import { taperPath } from "../../src/figures/marks/taper.tsx";
import { round } from "../../src/figures/numbers.ts";
import { textWidth } from "../../src/figures/text.ts";
import { TEXT } from "../../src/figures/theme.ts";

const extent = { bottomM: -10, topM: 10, top: 0, bottom: 200 };
const labels = (ticks: readonly { readonly label: string }[]) => ticks.map(({ label }) => label);

describe("heightScale", () => {
  test("puts higher rock further up", () => {
    const y = heightScale(extent);
    expect([y(-10), y(0), y(10)]).toEqual([200, 100, 0]);
  });

  test("magnifies a lens as told and keeps the whole section", () => {
    const y = heightScale(extent, { baseM: -0.5, topM: 0.5, magnification: 10 });
    const inside = (y(0) - y(0.1)) / 0.1;
    const outside = (y(5) - y(6)) / 1;
    expect(inside / outside).toBeCloseTo(10, 9);
    expect([y(-10), y(10)]).toEqual([200, 0]);
    expect(y.invert(y(0.2))).toBeCloseTo(0.2, 12);
  });

  test("refuses a section without thickness", () => {
    expect(() => heightScale({ ...extent, topM: -10 })).toThrow(/expected a top above/);
  });

  test("cuts a stretch at the frame, and knows one outside", () => {
    const y = heightScale(extent);
    expect(clippedSpan(y, 5, 40)).toEqual({ top: 0, bottom: 50 });
    expect(clippedSpan(y, 11, 40)).toBeUndefined();
  });
});

describe("the height axis", () => {
  const y = heightScale(extent);

  test("reads a depth section downward in its own unit", () => {
    const feet = { unit: "ft", metresPerUnit: 0.3048, zeroM: 0, direction: "depth" } as const;
    expect(readingAt(feet, -3.048)).toBeCloseTo(10, 12);
    const { labelled } = axisTicks(y, feet);
    const ten = labelled.find(({ label }) => label === "10");
    expect(ten?.y).toBeCloseTo(y(-3.048), 9);
  });

  test("signs distances from a horizon", () => {
    const { labelled, between } = axisTicks(y, {
      unit: "m",
      metresPerUnit: 1,
      zeroM: 2,
      direction: "height",
      signed: true,
    });
    expect(labels(labelled)).toEqual(["−12", "−10", "−8", "−6", "−4", "−2", "0", "+2", "+4", "+6", "+8"]);
    expect(labelled.map((tick) => tick.y).slice(0, 3)).toEqual([200, 180, 160]);
    expect(between.map(round)).toEqual([190, 170, 150, 130, 110, 90, 70, 50, 30, 10]);
  });

  test("has finer ticks inside a lens, and each height once", () => {
    const lensed = heightScale(extent, { baseM: -1, topM: 1, magnification: 20 });
    const { labelled } = axisTicks(lensed, { unit: "m", metresPerUnit: 1, zeroM: 0, direction: "height" });
    expect(labels(labelled)).toEqual(expect.arrayContaining(["−10", "−1.0", "0.0", "0.5", "10"]));
    expect(new Set(labelled.map((tick) => round(tick.y))).size).toBe(labelled.length);
  });
});

describe("value scales", () => {
  test("label powers of ten as far as they do not touch", () => {
    const { scale, tickLabels } = logColumn([0.001, 100], 46);
    expect(tickLabels.length).toBeGreaterThan(1);
    tickLabels.slice(1).forEach((tick, i) => {
      const before = tickLabels[i] ?? tick;
      const halves = (textWidth(tick.label, TEXT.unit) + textWidth(before.label, TEXT.unit)) / 2;
      expect(scale(tick.value) - scale(before.value)).toBeGreaterThan(halves);
    });
  });

  test("hold every value inside the column", () => {
    const { scale } = logColumn([0.01, 10], 50);
    expect([scale(0.0001), scale(0.01), scale(10), scale(1e6)]).toEqual([4, 4, 46, 46]);
    expect(linearColumn([0, 10], 50).scale(5)).toBe(25);
  });

  test("refuse a logarithm of nothing", () => {
    expect(() => logColumn([0, 10], 50)).toThrow(/expected 0 < low < high/);
  });
});

describe("the taper", () => {
  const y = heightScale(extent);
  const bar = { x: 50, width: 8, y, colour: "#000000", firstM: -5, lastM: 0, occurrencesM: [-5, 0] };

  test("is as wide as one minus the confidence", () => {
    const path = taperPath({ ...bar, above: [{ heightM: 2, confidence: 0.75 }] });
    expect(path).toBe("M54 150L54 100L51 80L49 80L46 100L46 150z");
  });

  test("is cut off at the frame with the width it has there", () => {
    const path = taperPath({ ...bar, lastM: 8, above: [{ heightM: 12, confidence: 1 }] });
    expect(path).toBe("M54 150L54 20L52 0L48 0L46 20L46 150z");
  });

  test("narrows below a first find too", () => {
    expect(taperPath({ ...bar, below: [{ heightM: -7, confidence: 0.5 }] })).toMatch(
      /^M52 170L54 150L54 100/,
    );
  });

  test("is nothing where the whole range is outside the frame", () => {
    expect(taperPath({ ...bar, firstM: 20, lastM: 30 })).toBe("");
  });
});

test("a scale bar is 1, 2 or 5 times a power of ten", () => {
  expect([18, 7, 0.4, 1200].map(scaleBarLength)).toEqual([5, 2, 0.1, 500]);
});

test("coordinates have three decimals and no negative zero", () => {
  expect(round(1.23456)).toBe(1.235);
  expect(Object.is(round(-0.0001), 0)).toBe(true);
});
