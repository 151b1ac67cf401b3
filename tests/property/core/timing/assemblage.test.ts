import * as fc from "fast-check";
import { describe, expect, it } from "vitest";
import { rescaledInterior } from "../../../../src/core/ranges/checks/centroid.ts";
import { distance } from "../../../../src/core/ranges/checks/distance.ts";
import { gapTrend } from "../../../../src/core/ranges/checks/gap-trend.ts";
import { gapsOf } from "../../../../src/core/ranges/checks/gaps.ts";
import { highestFindP } from "../../../../src/core/ranges/checks/highest-find.ts";
import { largestGap, largestGapUpperTail } from "../../../../src/core/ranges/checks/largest-gap.ts";
import { gapRuns } from "../../../../src/core/ranges/checks/runs.ts";
import { uniformCoordinate } from "../../../../src/core/ranges/coordinate.ts";
import { combinedTest, largestCombinedP } from "../../../../src/core/timing/combined.ts";
import { commonEndTest } from "../../../../src/core/timing/common-end.ts";
import { halfIntervals, halfTest, largestHalfP } from "../../../../src/core/timing/half-intervals.ts";
import { secondPulseReaches } from "../../../../src/core/timing/pulse-gain.ts";
import { fitPulses } from "../../../../src/core/timing/pulses.ts";
import { pulsesBootstrap } from "../../../../src/core/timing/pulses-bootstrap.ts";
import { rarityTest } from "../../../../src/core/timing/rank-correlation.ts";
import { separation } from "../../../../src/core/timing/separation.ts";
import { surfaceClustering } from "../../../../src/core/timing/surfaces.ts";
import { type FoundRange, twoHighestEnd } from "../../../../src/core/timing/two-highest-end.ts";

const finds = fc
  .uniqueArray(fc.integer({ min: 0, max: 3000 }), { minLength: 3, maxLength: 20 })
  .map((x) => x.map((h) => h / 100).toSorted((a, b) => a - b));
const assemblage = fc.array(finds, { minLength: 2, maxLength: 9 });
const options = { seed: 7, numRuns: 60 };
const SCALE = 4;
const SHIFT = -48;

const rangeOf = (levels: readonly number[]): FoundRange & { readonly lastM: number } => {
  const last = levels[levels.length - 1];
  return { levels, base: levels[0], last, lastM: last, exponent: levels.length - 1 };
};
const moved = (levels: readonly number[]) => levels.map((h) => h * SCALE + SHIFT);
const highestOf = (taxa: readonly (readonly number[])[]) => Math.max(...taxa.flat());

function close(a: number | undefined, b: number | undefined): void {
  if (b === undefined) expect(a).toBeUndefined();
  else expect(a).toBeCloseTo(b, 7);
}

const rarityOf = (taxa: readonly (readonly number[])[]) =>
  rarityTest(
    taxa.map((levels) => levels.length),
    taxa.map((levels) => levels[levels.length - 1]),
    { seed: 1, replicates: 1 },
  );

describe("shift, stretch and order of taxa", () => {
  it("leave tests at a level unchanged, and carry sets along", () => {
    fc.assert(
      fc.property(assemblage, fc.double({ min: 0, max: 5, noNaN: true }), (taxa, above) => {
        const level = highestOf(taxa) + above;
        const ranges = taxa.map(rangeOf);
        const other = taxa.map(moved).map(rangeOf).toReversed();
        close(combinedTest(other, level * SCALE + SHIFT)?.p, combinedTest(ranges, level)?.p);
        const half = halfIntervals(ranges, 0.5);
        const otherHalf = halfIntervals(other, 0.5);
        expect(otherHalf?.set.kind).toBe(half?.set.kind);
        if (half?.set.kind === "interval" && otherHalf?.set.kind === "interval")
          close(otherHalf.set.high, half.set.high * SCALE + SHIFT);
        const end = twoHighestEnd(ranges, 0.95, 1);
        const otherEnd = twoHighestEnd(other, 0.95, 1);
        expect(otherEnd.kind).toBe(end.kind);
        if (end.kind === "interval" && otherEnd.kind === "interval")
          expect(Math.abs(otherEnd.high - (end.high * SCALE + SHIFT))).toBeLessThan(
            1e-6 * (1 + Math.abs(otherEnd.high)),
          );
      }),
      options,
    );
  });

  it("stretch a separation and leave pulses and rarity as they are", () => {
    fc.assert(
      fc.property(assemblage, (taxa) => {
        const split = (some: readonly (readonly number[])[]) => ({
          early: some.slice(0, 1).map(rangeOf),
          late: some.slice(1).map(rangeOf),
        });
        const apart = separation(split(taxa), uniformCoordinate, 0.9);
        const stretched = separation(split(taxa.map(moved)), uniformCoordinate, 0.9);
        expect(Math.abs((stretched?.lowM ?? 0) - SCALE * (apart?.lowM ?? 0))).toBeLessThan(
          1e-8 * (1 + Math.abs(stretched?.lowM ?? 0)),
        );
        const [one, two] = fitPulses(taxa.map(rangeOf), 2);
        const [otherOne, otherTwo] = fitPulses(taxa.map(moved).map(rangeOf).toReversed(), 2);
        close(otherTwo.logLikelihood - otherOne.logLikelihood, two.logLikelihood - one.logLikelihood);
        close(rarityOf(taxa.map(moved).toReversed())?.p, rarityOf(taxa)?.p);
      }),
      options,
    );
  });

  it("leave pre-checks unchanged", () => {
    fc.assert(
      fc.property(finds, (levels) => {
        const other = moved(levels);
        close(distance(rescaledInterior(other))?.p, distance(rescaledInterior(levels))?.p);
        expect(gapRuns(gapsOf(other))).toEqual(gapRuns(gapsOf(levels)));
        expect(gapTrend(gapsOf(other))?.p).toBe(gapTrend(gapsOf(levels))?.p);
        close(largestGap(gapsOf(other))?.p, largestGap(gapsOf(levels))?.p);
        close(highestFindP(other), highestFindP(levels));
      }),
      options,
    );
  });
});

describe("a section turned upside down", () => {
  it("keeps the distance, the runs and the longest gap, and turns the trend of gaps", () => {
    fc.assert(
      fc.property(finds, (levels) => {
        const turned = levels.map((h) => -h).toReversed();
        close(distance(rescaledInterior(turned))?.p, distance(rescaledInterior(levels))?.p);
        expect(gapRuns(gapsOf(turned))).toEqual(gapRuns(gapsOf(levels)));
        close(largestGap(gapsOf(turned))?.p, largestGap(gapsOf(levels))?.p);
        const tau = gapTrend(gapsOf(levels))?.tau;
        if (tau !== undefined) close(gapTrend(gapsOf(turned))?.tau, -tau);
      }),
      options,
    );
  });
});

describe("the largest p over an interval", () => {
  it("is what a fine grid finds, combined or by half intervals", () => {
    fc.assert(
      fc.property(assemblage, fc.double({ min: -1, max: 5, noNaN: true }), (taxa, offset) => {
        const ranges = taxa.map(rangeOf);
        const low = highestOf(taxa) + offset;
        const grid = Array.from({ length: 401 }, (_, i) => low + i / 100);
        const greatest = (p: (level: number) => number | undefined) =>
          Math.max(...grid.map((x) => p(x) ?? 0));
        expect(largestCombinedP(ranges, low, low + 4)?.p).toBeGreaterThanOrEqual(
          greatest((x) => combinedTest(ranges, x)?.p) - 1e-12,
        );
        const half = largestHalfP(ranges, low, low + 4);
        expect(half?.p).toBeGreaterThanOrEqual(greatest((x) => halfTest(ranges, x)?.p) - 1e-12);
        expect(halfTest(ranges, (half?.at ?? 0) + 1e-9)?.p).toBeCloseTo(half?.p ?? Number.NaN, 9);
      }),
      options,
    );
  });
});

describe("pulses", () => {
  it("gain the same by either way of computing it", () => {
    fc.assert(
      fc.property(assemblage, (taxa) => {
        const ranges = taxa.map(rangeOf).toSorted((a, b) => a.last - b.last);
        const [one, two] = fitPulses(ranges, 2);
        const gain = 2 * (two.logLikelihood - one.logLikelihood);
        const sorted = {
          lasts: Float64Array.from(ranges, (r) => r.last),
          bases: Float64Array.from(ranges, (r) => r.base),
          exponents: Float64Array.from(ranges, (r) => r.exponent),
        };
        expect(secondPulseReaches(sorted, gain * (1 + 1e-9) + 1e-9)).toBe(false);
        if (gain > 1e-6) expect(secondPulseReaches(sorted, gain * (1 - 1e-9))).toBe(true);
      }),
      options,
    );
  });

  it("never lose likelihood by one more, and each is the lowest at or above its taxa", () => {
    fc.assert(
      fc.property(assemblage, (taxa) => {
        const ranges = taxa.map(rangeOf);
        const fits = fitPulses(ranges, ranges.length);
        fits.slice(1).forEach((fit, i) => {
          expect(fit.logLikelihood).toBeGreaterThanOrEqual(fits[i].logLikelihood - 1e-9);
        });
        for (const { levels, pulseOf } of fits)
          ranges.forEach(({ last }, i) => {
            expect(levels[pulseOf[i]]).toBeGreaterThanOrEqual(last);
          });
      }),
      options,
    );
  });

  it("give the same bits for the same seed", () => {
    const ranges = [
      [0, 3, 9],
      [1, 2, 5, 7, 8],
      [0, 1, 2, 6],
    ].map(rangeOf);
    const twice = [1, 2].map(() => pulsesBootstrap(ranges, 1, { seed: 5, replicates: 500 }));
    expect(twice[0]).toEqual(twice[1]);
  });
});

it("a p of separation and of one level agree for two taxa: 0 is outside exactly where one level is rejected", () => {
  fc.assert(
    fc.property(finds, finds, (a, b) => {
      const [early, late] = [[rangeOf(a)], [rangeOf(b)]];
      const p = commonEndTest([...early, ...late])?.p ?? Number.NaN;
      fc.pre(Math.abs(p - 0.1) > 1e-9);
      const apart = separation({ early, late }, uniformCoordinate, 0.9);
      const holds = (apart?.lowM ?? 0) <= 0 && 0 <= (apart?.highM ?? 0);
      expect(holds).toBe(p > 0.1);
    }),
    options,
  );
});

it("a longer longest gap is never likelier", () => {
  fc.assert(
    fc.property(
      fc.integer({ min: 2, max: 150 }),
      fc.double({ min: 0, max: 1, noNaN: true }),
      fc.double({ min: 0, max: 1, noNaN: true }),
      (count, a, b) => {
        const [short, long] = [Math.min(a, b), Math.max(a, b)];
        expect(largestGapUpperTail(long, count)).toBeLessThanOrEqual(
          largestGapUpperTail(short, count) + 1e-9,
        );
      },
    ),
    options,
  );
});

it("clustering at surfaces does not depend on where the ring is cut when nothing lies outside", () => {
  const lasts = [1, 4.5, 5.5, 9.25];
  const clustering = surfaceClustering(lasts, [{ low: 4, high: 6 }], { low: 0, high: 10 });
  // Two finds stand 1 apart, the others 3.5 or more away: both are held by windows that start within 1 m.
  expect(clustering).toMatchObject({ count: 2, taxa: 4, share: 0.2 });
  expect(clustering?.shiftP).toBeCloseTo((1 + 0.25) / 10, 12);
});
