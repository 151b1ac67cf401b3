import { describe, expect, it } from "vitest";
import { uniformCoordinate } from "../../../../src/core/ranges/coordinate.ts";
import { countSampled, furthestBarren } from "../../../../src/core/ranges/sampled.ts";
import { twoEndedFactor, uniformBound } from "../../../../src/core/ranges/uniform.ts";
import { persistence } from "../../../../src/core/ranges/window.ts";
import {
  bases,
  drawFinds,
  expectRate,
  expectRateAtLeast,
  rangeOf,
  rateOf,
  rocks,
} from "./simulated-finds.ts";

const truthOf = (horizons: number) => ({ baseM: 4, endM: 31, horizons });

describe.each(rocks)("one taxon, $name", ({ coordinate }) => {
  describe.each(bases)("%s", (base) => {
    const known = base === "base known" ? 4 : undefined;
    it.each([
      [2, 0.95],
      [3, 0.5],
      [3, 0.95],
      [5, 0.95],
      [12, 0.8],
      [40, 0.95],
    ])("uniform: %i horizons cover the true end at level %f", (horizons, confidence) => {
      const rate = rateOf((g) => {
        const range = rangeOf(drawFinds(truthOf(horizons), coordinate, g), coordinate, known);
        const bound = uniformBound(range, confidence);
        if (bound === undefined) return false;
        return (coordinate.toHeight(bound, "upper") ?? Number.POSITIVE_INFINITY) >= 31;
      });
      expectRate(rate, confidence);
    });

    it.each([3, 5, 12])("window: %i horizons reject a living taxon in 5%%", (horizons) => {
      const rate = rateOf((g) => {
        const range = rangeOf(drawFinds(truthOf(horizons), coordinate, g), coordinate, known);
        return (persistence(range, coordinate.toEffective(31))?.p ?? 1) <= 0.05;
      });
      expectRate(rate, 0.05);
    });
  });
});

it.each([3, 6, 15])("uniform: equal extension at both ends covers both, %i horizons", (horizons) => {
  const a = twoEndedFactor(0.9, horizons);
  const rate = rateOf((g) => {
    const finds = drawFinds(truthOf(horizons), uniformCoordinate, g);
    const last = finds[finds.length - 1];
    const extension = a * (last - finds[0]);
    return last + extension >= 31 && finds[0] - extension <= 4;
  });
  expectRate(rate, 0.9);
});

describe("sampled: true coverage among 20 horizons, given a find", () => {
  // Exact coverages by enumeration over the binomial law, independent computation in Python 3.11 (scipy 1.10).
  it.each([
    ["base", 0.1, 0.9576671884145359],
    ["base", 0.3, 0.961943366877841],
    ["base", 0.6, 0.9687959411707785],
    ["first", 0.1, 0.9868000534822579],
    ["first", 0.3, 0.9662925239928829],
  ] as const)("mode %s, detection %f", (mode, detection, exact) => {
    const inside = 20;
    const rate = rateOf((g) => {
      const presence = Array.from({ length: inside }, () => g.uniform() < detection);
      const count = countSampled(presence, mode);
      if (count === undefined) return undefined;
      const unlimited = { ...count, barrenAbove: Number.POSITIVE_INFINITY };
      return count.barrenAbove <= furthestBarren(unlimited, 0.95);
    });
    expectRate(rate, exact);
    expectRateAtLeast(rate, 0.95);
  });
});

it("uniform: declining recovery is not covered, and more finds make it worse", () => {
  const coverage = [5, 20].map((horizons) => {
    const rate = rateOf((g) => {
      const finds = Array.from({ length: horizons }, () => 30 * (1 - Math.sqrt(g.uniform())));
      const range = { base: 0, last: Math.max(...finds), exponent: horizons };
      return (uniformBound(range, 0.95) ?? 0) >= 30;
    });
    return rate.hits / rate.trials;
  });
  // 1 - F(0.05^(1/n))^n for Beta(1, 2): 67.9% and 32.3%.
  expect(Math.abs(coverage[0] - 0.679)).toBeLessThan(0.025);
  expect(Math.abs(coverage[1] - 0.323)).toBeLessThan(0.025);
});
