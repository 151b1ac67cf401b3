import { array, assert, double, property } from "fast-check";
import { describe, expect, test } from "vitest";
import { SLANT_DEGREES, slantedNames } from "../../src/figures/layout/slanted-names.ts";
import { spaceOut } from "../../src/figures/layout/space-out.ts";
import { legendLayout } from "../../src/figures/legend.tsx";
import { textWidth } from "../../src/figures/text.ts";
import { TEXT } from "../../src/figures/theme.ts";

const smallestGap = (places: readonly number[]) => {
  const sorted = places.toSorted((a, b) => a - b);
  return Math.min(...sorted.slice(1).map((place, i) => place - (sorted[i] ?? 0)));
};

describe("spaceOut", () => {
  test("leaves what is far enough apart where it is", () => {
    expect(spaceOut([30, 0, 12], 10)).toEqual([30, 0, 12]);
  });

  test("parts a heap evenly about its middle", () => {
    expect(spaceOut([5, 5, 5], 10)).toEqual([-5, 5, 15]);
  });

  test("keeps gap, order and bounds whatever the places", () => {
    const places = array(double({ min: 0, max: 100, noNaN: true }), { minLength: 2, maxLength: 20 });
    assert(
      property(places, (positions) => {
        const placed = spaceOut(positions, 5, [0, 100]);
        expect(smallestGap(placed)).toBeGreaterThanOrEqual(5 - 1e-9);
        expect(Math.min(...placed)).toBeGreaterThanOrEqual(-1e-9);
        expect(Math.max(...placed)).toBeLessThanOrEqual(100 + 1e-9);
        positions.forEach((a, i) =>
          positions.forEach((b, j) => {
            if (a < b) expect(placed[i] ?? 0).toBeLessThan(placed[j] ?? 0);
          }),
        );
      }),
      { seed: 1, numRuns: 200 },
    );
  });
});

test("thirty slanted names at a tight pitch do not touch each other", () => {
  const names = Array.from({ length: 30 }, (_, i) => ({ text: `Palmidium arx ${i}`, x: 100 + 4 * i }));
  const placed = slantedNames({ names, style: TEXT.taxon });
  const across = placed.map(({ x }) => x * Math.sin((SLANT_DEGREES * Math.PI) / 180));
  expect(smallestGap(across)).toBeGreaterThanOrEqual(TEXT.taxon.size - 1e-9);
  expect(placed.map(({ text }) => text)).toEqual(names.map(({ text }) => text));
});

test("a legend's entries stay inside its width and apart from each other", () => {
  const entries = Array.from({ length: 14 }, (_, i) => ({
    sign: { kind: "value" } as const,
    label: "a sign of the plate ".repeat(1 + (i % 3)).trim() + i,
  }));
  const { entries: placed, height } = legendLayout(entries, 240);
  const boxes = placed.map(({ x, y, label }) => ({ x, y, right: x + 20 + textWidth(label, TEXT.unit) }));
  expect(boxes.filter(({ right }) => right > 240)).toEqual([]);
  const touching = boxes.filter((box, i) =>
    boxes.some((other, j) => j > i && other.y === box.y && other.x < box.right + 6),
  );
  expect(touching).toEqual([]);
  expect(height).toBeGreaterThan(Math.max(...boxes.map(({ y }) => y)));
});
