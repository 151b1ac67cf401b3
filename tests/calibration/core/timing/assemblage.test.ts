import { describe, expect, it } from "vitest";
import { binomialUpperTail } from "../../../../src/core/numeric/binomial.ts";
import type { Generator } from "../../../../src/core/numeric/streams.ts";
import { centroid, rescaledInterior } from "../../../../src/core/ranges/checks/centroid.ts";
import { pieceCoordinate, uniformCoordinate } from "../../../../src/core/ranges/coordinate.ts";
import { combinedTest, largestCombinedP } from "../../../../src/core/timing/combined.ts";
import { commonEndTest, type EndSet } from "../../../../src/core/timing/common-end.ts";
import { halfIntervals, halfTest, largestHalfP } from "../../../../src/core/timing/half-intervals.ts";
import { DECLINE_GATE } from "../../../../src/core/timing/recovery-answers.ts";
import { separation } from "../../../../src/core/timing/separation.ts";
import { twoHighestEnd } from "../../../../src/core/timing/two-highest-end.ts";
import { expectRate, expectRateAtMost, type Rate, rateOf } from "../ranges/simulated-finds.ts";
import { drawRanges, END, type Shape, samples } from "./shapes.ts";

const holds = (set: EndSet) => set.kind === "interval" && set.low <= END && END <= set.high;
const share = ({ hits, trials }: Rate) => hits / trials;

describe.each(samples)("$name, ends at one level", ({ horizons }) => {
  it("combined rejects the true level in 5%, and an interval about it no more often", () => {
    expectRate(
      rateOf((g) => (combinedTest(drawRanges(horizons, g), END)?.p ?? 1) <= 0.05),
      0.05,
    );
    expectRateAtMost(
      rateOf((g) => (largestCombinedP(drawRanges(horizons, g), END - 0.5, END + 0.5)?.p ?? 1) <= 0.05),
      0.05,
    );
  });

  it("half-intervals covers at the level it prints", () => {
    const printed = 1 - 2 * binomialUpperTail(7, 8, 0.5);
    expectRate(
      rateOf((g) => {
        const half = halfIntervals(drawRanges(horizons, g), 0.9);
        expect(half?.coverage).toBeCloseTo(printed, 12);
        return holds(half?.set ?? { kind: "undefined" });
      }),
      printed,
    );
  });

  it("half-intervals rejects the true level as often as a binomial can, an interval about it no more often", () => {
    const size = 2 * binomialUpperTail(8, 8, 0.5);
    expectRate(
      rateOf((g) => (halfTest(drawRanges(horizons, g), END)?.p ?? 1) <= 0.05),
      size,
    );
    expectRateAtMost(
      rateOf((g) => (largestHalfP(drawRanges(horizons, g), END - 0.5, END + 0.5)?.p ?? 1) <= 0.05),
      size,
    );
  });

  it("two-highest of uniform finds covers at its level, with a steeper tail more often", () => {
    expectRate(
      rateOf((g) => holds(twoHighestEnd(drawRanges(horizons, g), 0.95, 1))),
      0.95,
    );
    expect(share(rateOf((g) => holds(twoHighestEnd(drawRanges(horizons, g), 0.95, 2))))).toBeGreaterThan(
      0.95,
    );
  });

  it("separation covers 0, and 6 m between two groups", () => {
    expectRate(rateOf(covers(horizons, 0)), 0.95);
    expectRate(rateOf(covers(horizons, 6)), 0.95);
  });
});

function covers(horizons: readonly number[], apart: number) {
  const ends = horizons.map((_, i) => (i % 2 === 0 ? END - apart : END));
  return (g: Generator) => {
    const ranges = drawRanges(horizons, g, { ends });
    const groups = {
      early: ranges.filter((_, i) => i % 2 === 0),
      late: ranges.filter((_, i) => i % 2 === 1),
    };
    const found = separation(groups, uniformCoordinate, 0.95);
    return found !== undefined && (found.lowM ?? -Infinity) <= apart && apart <= (found.highM ?? Infinity);
  };
}

it("separation covers in metres where recovery is three times higher above 10 m", () => {
  const coordinate = pieceCoordinate(
    [
      { baseM: 0, topM: 10, atBase: 1, atTop: 1 },
      { baseM: 10, topM: 60, atBase: 3, atTop: 3 },
    ],
    { beyond: 3, origin: 0 },
  );
  const group = (endM: number, exponent: number, g: Generator) => {
    const last = coordinate.toEffective(endM) * g.uniform() ** (1 / exponent);
    return [{ base: 0, last, lastM: coordinate.toHeight(last, "upper") ?? 0, exponent }];
  };
  const rate = rateOf((g) => {
    const found = separation({ early: group(9, 16, g), late: group(13, 10, g) }, coordinate, 0.95);
    return found !== undefined && (found.lowM ?? -Infinity) <= 4 && 4 <= (found.highM ?? Infinity);
  });
  expectRate(rate, 0.95);
});

it("half-intervals of ten taxa cover at 97.85%, however many finds they have", () => {
  // 1 - 22 / 1024 by the binomial distribution.
  for (const n of [5, 10, 30]) {
    const horizons = Array<number>(10).fill(n);
    expectRate(
      rateOf((g) =>
        holds(
          halfIntervals(drawRanges(horizons, g, { isBaseKnown: true }), 0.95)?.set ?? { kind: "undefined" },
        ),
      ),
      1 - 22 / 1024,
    );
  }
});

const ten = Array<number>(8).fill(10);
const unequal = [25, 18, 14, 12, 10, 8, 6, 5];
const falling = (g: Generator) => drawRanges(ten, g, { shape: "falling" });

const coverageOfTail = (tail: number) => rateOf((g) => holds(twoHighestEnd(falling(g), 0.95, tail)));

function rejects(horizons: readonly number[], shape: Shape): Rate {
  return rateOf((g) => {
    const ranges = drawRanges(horizons, g, { shape, isStartShared: true });
    return (commonEndTest(ranges)?.p ?? 1) <= 0.05;
  });
}

function gate(horizons: readonly number[], shape: Shape): Rate {
  return rateOf((g) => {
    const interior = drawRanges(horizons, g, { shape }).flatMap(({ levels }) => rescaledInterior(levels));
    return (centroid(interior)?.p ?? 1) < DECLINE_GATE;
  });
}

describe("recovery that is not uniform, eight taxa that end together", () => {
  it("common-end rejects one true level nearly always where it falls, next to never where it rises", () => {
    // Monte Carlo of 50000 in Python (numpy 2.4): 0.868 with ten horizons each, 0.888 with 25 to 5, 0.001 rising.
    expect(Math.abs(share(rejects(ten, "falling")) - 0.868)).toBeLessThan(0.025);
    expect(Math.abs(share(rejects(unequal, "falling")) - 0.888)).toBeLessThan(0.025);
    expect(share(rejects(ten, "rising"))).toBeLessThan(0.005);
  });

  it("the gate fires where recovery falls, at its level where it is uniform, and not where it rises", () => {
    expect(share(gate(ten, "falling"))).toBeGreaterThan(0.85);
    expect(share(gate(unequal, "falling"))).toBeGreaterThan(0.85);
    expectRate(gate(ten, "uniform"), DECLINE_GATE);
    expect(share(gate(ten, "rising"))).toBeLessThan(0.005);
  });

  it("two-highest covers where its tail is as steep as the decline, and fails where it is less steep", () => {
    // Monte Carlo of 20000 in Python (numpy 2.4): 0.953 with tail 2, 0.672 with tail 1.
    expect(Math.abs(share(coverageOfTail(2)) - 0.953)).toBeLessThan(0.015);
    expect(Math.abs(share(coverageOfTail(1)) - 0.672)).toBeLessThan(0.025);
  });

  it("combined and half-intervals are as misled by a decline as the common end", () => {
    expect(share(rateOf((g) => (combinedTest(falling(g), END)?.p ?? 1) <= 0.05))).toBeGreaterThan(0.8);
    expect(share(rateOf((g) => (halfTest(falling(g), END)?.p ?? 1) <= 0.05))).toBeGreaterThan(0.2);
  });
});
