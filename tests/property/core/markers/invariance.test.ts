import * as fc from "fast-check";
import { describe, expect, it } from "vitest";
import { background } from "../../../../src/core/markers/background.ts";
import { benjaminiHochberg, holm } from "../../../../src/core/markers/false-discovery.ts";
import { findMarkers } from "../../../../src/core/markers/find-markers.ts";
import { boxSlabMean } from "../../../../src/core/markers/mixing.ts";
import {
  handMadeSection,
  handMadeStudy,
  measurementsOf,
} from "../../../unit/core/markers/hand-made-section.ts";

const levels = [0.031, 0.027, 0.036, 0.024, 0.041, 0.029, 0.033, 0.022, 0.038, 0.03];
const values = [
  ...levels,
  2.6,
  3.9,
  2.4,
  1.5,
  0.9,
  0.55,
  0.34,
  0.2,
  0.13,
  0.09,
  0.06,
  ...levels.toReversed(),
];

function horizonOf(shiftM: number, scale: number) {
  const samples = values.map((v, i) => ({
    baseM: 5 + shiftM + 0.02 * i,
    topM: 5 + shiftM + 0.02 * (i + 1),
    value: scale * v,
    sigma: scale * Math.hypot(0.06 * v, 0.003),
  }));
  const section = handMadeSection({ measurements: measurementsOf("iridium", samples) });
  return findMarkers(handMadeStudy([section], { replicates: 50 })).horizons[0];
}
const reference = horizonOf(0, 1);
const near = (got: number | undefined, expected: number | undefined, tolerance: number) =>
  expect(Math.abs((got ?? Number.NaN) - (expected ?? Number.NaN))).toBeLessThan(tolerance);

describe("a found horizon", () => {
  it("moves with the heights and keeps all else", () => {
    fc.assert(
      fc.property(fc.double({ min: -300, max: 300, noNaN: true }), (shift) => {
        const moved = horizonOf(shift, 1);
        near(moved.positionM - shift, reference.positionM, 2e-5);
        near(moved.lowM - shift, reference.lowM, 2e-5);
        near(moved.highM - shift, reference.highM, 2e-5);
        near(moved.fluence?.value, reference.fluence?.value, 1e-6);
      }),
      { numRuns: 8, seed: 3 },
    );
  });

  it("keeps its position and enrichment when concentrations change their unit; fluence scales", () => {
    fc.assert(
      fc.property(fc.double({ min: 0.01, max: 1000, noNaN: true }), (scale) => {
        const scaled = horizonOf(0, scale);
        near(scaled.positionM, reference.positionM, 2e-5);
        near(scaled.highM, reference.highM, 2e-5);
        near(scaled.enrichment, reference.enrichment, 1e-6);
        near((scaled.fluence?.value ?? 0) / scale, reference.fluence?.value, 1e-6);
      }),
      { numRuns: 8, seed: 4 },
    );
  });

  it("is the same bit for bit when computed again", () => {
    expect(horizonOf(0, 1)).toEqual(reference);
  });
});

describe("parts", () => {
  it("background does not depend on the order of samples", () => {
    const cells = values.map((value) => ({ value, censored: "none" as const }));
    const fit = background(cells);
    fc.assert(
      fc.property(fc.shuffledSubarray(cells, { minLength: cells.length }), (shuffled) => {
        const again = background(shuffled);
        if (fit.kind !== "background" || again.kind !== "background") throw new Error("no background");
        expect(again.median).toBe(fit.median);
        expect(again.logSd).toBe(fit.logSd);
      }),
    );
  });

  it("flags are those whose adjusted p is within the level, Holm's among Benjamini and Hochberg's", () => {
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: 0, max: 1, noNaN: true }), { minLength: 1, maxLength: 40 }),
        (p) => {
          const rate = benjaminiHochberg(p, 0.05);
          const strict = holm(p, 0.05);
          p.forEach((_, i) => {
            if (Math.abs(rate.adjusted[i] - 0.05) > 1e-12)
              expect(rate.isFlagged[i]).toBe(rate.adjusted[i] <= 0.05);
            if (strict.isFlagged[i]) expect(rate.isFlagged[i]).toBe(true);
          });
        },
      ),
    );
  });

  it("box mixing conserves mass over any partition of the section", () => {
    const positive = fc.double({ min: 0.05, max: 9, noNaN: true });
    fc.assert(
      fc.property(
        fc.array(positive, { minLength: 3, maxLength: 30 }),
        positive,
        positive,
        (widths, base, length) => {
          let edge = 0;
          const slabs = widths.map((width) => {
            const slab = { baseCm: edge, topCm: edge + width };
            edge += width;
            return slab;
          });
          const mixing = { baseCm: base, lengthCm: length };
          const sum = slabs.reduce((a, s) => a + boxSlabMean(s, mixing) * (s.topCm - s.baseCm), 0);
          expect(sum).toBeCloseTo(edge > base ? -Math.expm1(-(edge - base) / length) : 0, 10);
        },
      ),
    );
  });
});
