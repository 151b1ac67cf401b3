import { describe, expect, it } from "vitest";
import type { Generator } from "../../../../src/core/numeric/streams.ts";
import { rescaledInterior } from "../../../../src/core/ranges/checks/centroid.ts";
import { distance } from "../../../../src/core/ranges/checks/distance.ts";
import { gapTrend } from "../../../../src/core/ranges/checks/gap-trend.ts";
import { gapsOf } from "../../../../src/core/ranges/checks/gaps.ts";
import { highestFindP } from "../../../../src/core/ranges/checks/highest-find.ts";
import { largestGap } from "../../../../src/core/ranges/checks/largest-gap.ts";
import { fisherPooled } from "../../../../src/core/ranges/checks/pooled.ts";
import { gapRuns } from "../../../../src/core/ranges/checks/runs.ts";
import { drawRanges, type Shape, samples } from "../timing/shapes.ts";
import { expectRate, expectRateAtMost, isFull, rateOf } from "./simulated-finds.ts";

const single = (n: number, g: Generator, shape: Shape = "uniform") => drawRanges([n], g, { shape })[0].levels;

describe.each([3, 5, 10, 20])("one taxon with %i uniform finds", (n) => {
  const size = (p: (levels: readonly number[]) => number | undefined) =>
    rateOf((g) => {
      const value = p(single(n, g));
      return value === undefined ? undefined : value <= 0.05;
    });

  it("fails the exact tests of continuous statistics in 5%", () => {
    expectRate(
      size((levels) => distance(rescaledInterior(levels))?.p),
      0.05,
    );
    expectRate(
      size((levels) => largestGap(gapsOf(levels))?.p),
      0.05,
    );
    expectRate(size(highestFindP), 0.05);
  });

  it("fails those of orders and runs in no more", () => {
    expectRateAtMost(
      size((levels) => gapTrend(gapsOf(levels))?.p),
      0.05,
    );
    if (n > 3)
      expectRateAtMost(
        size((levels) => gapRuns(gapsOf(levels))?.p),
        0.05,
      );
  });
});

/** Many tests of many taxa in every trial: fewer trials. */
const few = { replicates: isFull ? 20_000 : 1_000 };
const taxaOf = (horizons: readonly number[], g: Generator) =>
  drawRanges(horizons, g).map(({ levels }) => levels);

describe.each(samples)("taxa together: $name", ({ horizons }) => {
  it("fail the pooled checks in 5% or less where recovery is constant", () => {
    const pooled = (p: (levels: readonly number[]) => number | undefined) =>
      rateOf(
        (g) => (fisherPooled(taxaOf(horizons, g).flatMap((levels) => p(levels) ?? []))?.p ?? 1) <= 0.05,
        few,
      );
    expectRate(
      rateOf((g) => (distance(taxaOf(horizons, g).flatMap(rescaledInterior))?.p ?? 1) <= 0.05, few),
      0.05,
    );
    expectRate(
      pooled((levels) => largestGap(gapsOf(levels))?.p),
      0.05,
    );
    expectRateAtMost(
      pooled((levels) => gapTrend(gapsOf(levels))?.p),
      0.05,
    );
    expectRateAtMost(
      pooled((levels) => gapRuns(gapsOf(levels))?.p),
      0.05,
    );
  });
});

function lengthens(shape: Shape): number {
  const { hits, trials } = rateOf((g) => (gapTrend(gapsOf(single(20, g, shape)))?.p ?? 1) <= 0.05);
  return hits / trials;
}

it("gaps are seen to lengthen upward where recovery falls, and not where it rises", () => {
  expect(lengthens("falling")).toBeGreaterThan(0.25);
  expect(lengthens("rising")).toBeLessThan(0.02);
});
