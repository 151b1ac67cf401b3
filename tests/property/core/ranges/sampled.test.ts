import * as fc from "fast-check";
import { expect, it } from "vitest";
import { barrenChances, countSampled, furthestBarren } from "../../../../src/core/ranges/sampled.ts";

/** All ways to place n finds on N horizons, as bit masks. */
function placements(horizons: number, finds: number): number[] {
  const masks = Array.from({ length: 2 ** horizons }, (_, mask) => mask);
  return masks.filter((mask) => bits(mask, horizons).filter(Boolean).length === finds);
}

function bits(mask: number, horizons: number): boolean[] {
  return Array.from({ length: horizons }, (_, i) => ((mask >> i) & 1) === 1);
}

it("p(j) is the share of placements of the finds that leave the highest j horizons barren", () => {
  const shape = fc.tuple(fc.integer({ min: 1, max: 7 }), fc.integer({ min: 1, max: 7 }), fc.nat(4));
  fc.assert(
    fc.property(shape, ([inRange, drawn, j]) => {
      const finds = Math.min(drawn, inRange);
      const all = placements(inRange + j, finds);
      const low = all.filter((mask) => mask < 2 ** inRange);
      const p = barrenChances({ inRange, finds, barrenAbove: j })[j];
      expect(p).toBeCloseTo(low.length / all.length, 12);
    }),
    { numRuns: 60, seed: 7 },
  );
});

it.each(["base", "first"] as const)(
  "covers with at least its level, whatever the detection: every presence list of 10 horizons, mode %s",
  (mode) => {
    const horizons = 10;
    for (const detection of [0.05, 0.2, 0.5, 0.8]) {
      let covered = 0;
      let total = 0;
      for (let mask = 1; mask < 2 ** horizons; mask++) {
        const presence = bits(mask, horizons);
        const found = presence.filter(Boolean).length;
        const weight = detection ** found * (1 - detection) ** (horizons - found);
        const count = countSampled(presence, mode);
        if (count === undefined) throw new Error("a list with a find has a count");
        const furthest = furthestBarren({ ...count, barrenAbove: 10_000 }, 0.9);
        total += weight;
        if (count.barrenAbove <= furthest) covered += weight;
      }
      expect(covered / total).toBeGreaterThanOrEqual(0.9);
    }
  },
);

it("grows with the level and with fewer finds", () => {
  const count = fc.record({
    inRange: fc.integer({ min: 2, max: 200 }),
    finds: fc.integer({ min: 2, max: 200 }),
    barrenAbove: fc.constant(5000),
  });
  fc.assert(
    fc.property(count, ({ inRange, finds, barrenAbove }) => {
      const n = Math.min(finds, inRange);
      const at = (confidence: number, k = n) =>
        furthestBarren({ inRange, finds: k, barrenAbove }, confidence);
      expect(at(0.99)).toBeGreaterThanOrEqual(at(0.95));
      expect(at(0.95)).toBeGreaterThanOrEqual(at(0.5));
      expect(at(0.95, n - 1)).toBeGreaterThanOrEqual(at(0.95));
    }),
    { seed: 7 },
  );
});

it("approaches the continuous bound where horizons are many", () => {
  // (N' / (N' + j))^n' for N' far above n'.
  const p = barrenChances({ inRange: 100_000, finds: 5, barrenAbove: 50_000 })[50_000];
  expect(p).toBeCloseTo((2 / 3) ** 5, 4);
});
