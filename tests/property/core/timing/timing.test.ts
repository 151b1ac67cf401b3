import * as fc from "fast-check";
import { describe, expect, it } from "vitest";
import { centroid, rescaledInterior } from "../../../../src/core/ranges/checks/centroid.ts";
import { uniformCoordinate } from "../../../../src/core/ranges/coordinate.ts";
import type { EffectiveRange } from "../../../../src/core/ranges/pivot.ts";
import { uniformBound } from "../../../../src/core/ranges/uniform.ts";
import { commonEndGiven, commonEndJoint, commonEndTest } from "../../../../src/core/timing/common-end.ts";
import { largestLevelP, levelTest } from "../../../../src/core/timing/confidence-levels.ts";
import { durationBox, durationLowerBound } from "../../../../src/core/timing/duration.ts";

const taxon = fc.record({
  base: fc.integer({ min: 0, max: 900 }).map((x) => x / 100),
  last: fc.integer({ min: 1000, max: 3000 }).map((x) => x / 100),
  exponent: fc.integer({ min: 1, max: 40 }),
});
const assemblage = fc.array(taxon, { minLength: 2, maxLength: 12 });
const options = { seed: 7, numRuns: 60 };

const moved = (ranges: readonly EffectiveRange[], scale: number, shift: number) =>
  ranges.map(({ base, last, exponent }) => ({
    base: base * scale + shift,
    last: last * scale + shift,
    exponent,
  }));
const placed = (ranges: readonly EffectiveRange[]) => ranges.map((r) => ({ ...r, lastM: r.last }));

describe("shift, stretch and order", () => {
  it("leave tests unchanged and carry sets along", () => {
    fc.assert(
      fc.property(assemblage, (ranges) => {
        const other = moved(ranges, 2.5, -40).toReversed();
        expect(commonEndTest(other)?.statistic).toBeCloseTo(
          commonEndTest(ranges)?.statistic ?? Number.NaN,
          8,
        );
        const set = commonEndGiven(ranges, 0.95);
        const carried = commonEndGiven(other, 0.95);
        if (set.kind !== "interval" || carried.kind !== "interval") throw new Error("never empty");
        expect(carried.high).toBeCloseTo(set.high * 2.5 - 40, 8);
        const duration = durationLowerBound(placed(ranges), uniformCoordinate, 0.9) ?? Number.NaN;
        expect(durationLowerBound(placed(other), uniformCoordinate, 0.9)).toBeCloseTo(2.5 * duration, 8);
      }),
      options,
    );
  });
});

describe("a common end", () => {
  it("is at most the bound of any one taxon raised to the highest find", () => {
    fc.assert(
      fc.property(assemblage, (ranges) => {
        const set = commonEndGiven(ranges, 0.95);
        const highest = Math.max(...ranges.map((r) => r.last));
        if (set.kind !== "interval") throw new Error("never empty");
        expect(set.low).toBe(highest);
        for (const r of ranges)
          expect(set.high).toBeLessThanOrEqual((uniformBound({ ...r, last: highest }, 0.95) ?? 0) + 1e-9);
      }),
      options,
    );
  });

  it("of taxa that begin together is the bound of their pooled finds", () => {
    const lasts = [21, 17.5, 24];
    const ranges = lasts.map((last, i) => ({ base: 3, last, exponent: 4 + i }));
    const set = commonEndGiven(ranges, 0.95);
    const pooled = uniformBound({ base: 3, last: 24, exponent: 15 }, 0.95) ?? Number.NaN;
    expect(set.kind === "interval" && Math.abs(set.high - pooled)).toBeLessThan(1e-10);
  });

  it("has sets that grow with the level", () => {
    fc.assert(
      fc.property(assemblage, (ranges) => {
        const narrow = commonEndJoint(ranges, 0.8);
        const wide = commonEndJoint(ranges, 0.99);
        if (narrow.kind !== "interval") return;
        if (wide.kind !== "interval") throw new Error("the wider set holds the narrower");
        expect(wide.high).toBeGreaterThanOrEqual(narrow.high);
      }),
      options,
    );
  });
});

describe("a duration", () => {
  it("of 0 is excluded exactly where one common end is rejected", () => {
    fc.assert(
      fc.property(assemblage, fc.constantFrom(0.5, 0.9, 0.95), (ranges, confidence) => {
        const p = commonEndTest(ranges)?.p ?? Number.NaN;
        fc.pre(Math.abs(p - (1 - confidence)) > 1e-9);
        const bound = durationLowerBound(placed(ranges), uniformCoordinate, confidence);
        expect(bound === 0).toBe(p > 1 - confidence);
      }),
      options,
    );
  });

  it("has a lower bound inside its box, both growing away from the spread with the level", () => {
    fc.assert(
      fc.property(assemblage, (ranges) => {
        const low = (c: number) => durationLowerBound(placed(ranges), uniformCoordinate, c) ?? Number.NaN;
        const high = (c: number) => durationBox(placed(ranges), uniformCoordinate, c)?.highM ?? Number.NaN;
        const lasts = ranges.map((r) => r.last);
        const spread = Math.max(...lasts) - Math.min(...lasts);
        expect(low(0.95)).toBeLessThanOrEqual(low(0.5));
        expect(low(0.5)).toBeLessThanOrEqual(spread);
        expect(high(0.5)).toBeGreaterThanOrEqual(spread - 1e-9);
        expect(high(0.95)).toBeGreaterThan(high(0.5));
      }),
      options,
    );
  });
});

it("the largest p over an interval is what a fine grid finds", () => {
  fc.assert(
    fc.property(assemblage, fc.double({ min: 0, max: 5, noNaN: true }), (ranges, offset) => {
      const highest = Math.max(...ranges.map((r) => r.last));
      const low = highest - 1 + offset;
      const best = largestLevelP(ranges, low, low + 4);
      const grid = Array.from({ length: 401 }, (_, i) => levelTest(ranges, low + i / 100)?.p ?? 0);
      expect(best?.p).toBeGreaterThanOrEqual(Math.max(...grid) - 1e-9);
      expect(levelTest(ranges, best?.at ?? 0)?.p).toBeCloseTo(best?.p ?? Number.NaN, 9);
    }),
    options,
  );
});

it("the centroid of finds turned upside down has the opposite z", () => {
  const heights = fc
    .uniqueArray(fc.integer({ min: 0, max: 10_000 }), { minLength: 3, maxLength: 30 })
    .map((x) => x.toSorted((a, b) => a - b));
  fc.assert(
    fc.property(heights, (levels) => {
      const upright = centroid(rescaledInterior(levels));
      const turned = centroid(rescaledInterior(levels.map((x) => -x).toReversed()));
      expect(upright?.z).toBeCloseTo(-(turned?.z ?? Number.NaN), 9);
      expect((upright?.p ?? 0) + (turned?.p ?? 0)).toBeCloseTo(1, 9);
    }),
    options,
  );
});
