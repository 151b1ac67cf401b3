import { describe, expect, it } from "vitest";
import type { Generator } from "../../../../src/core/numeric/streams.ts";
import { centroid, rescaledInterior } from "../../../../src/core/ranges/checks/centroid.ts";
import type { Coordinate } from "../../../../src/core/ranges/coordinate.ts";
import {
  commonEndGiven,
  commonEndJoint,
  commonEndTest,
  type EndSet,
} from "../../../../src/core/timing/common-end.ts";
import { largestLevelP, levelTest } from "../../../../src/core/timing/confidence-levels.ts";
import { durationBox, durationLowerBound } from "../../../../src/core/timing/duration.ts";
import {
  bases,
  drawFinds,
  expectRate,
  expectRateAtLeast,
  expectRateAtMost,
  rangeOf,
  rateOf,
  rocks,
  withCover,
} from "../ranges/simulated-finds.ts";

const END_M = 30;
const starts = [0, 3, 7, 1, 12, 5, 2, 9];
const samples = [
  { name: "many and unequal", horizons: [25, 18, 14, 12, 10, 8, 6, 5] },
  { name: "few and small", horizons: [3, 2, 4] },
];

interface Assemblage {
  readonly horizons: readonly number[];
  readonly endsM: readonly number[];
  readonly isBaseKnown: boolean;
  readonly coordinate: Coordinate;
}

function draw({ horizons, endsM, isBaseKnown, coordinate }: Assemblage, g: Generator) {
  return horizons.map((n, i) => {
    const baseM = starts[i % starts.length];
    const finds = drawFinds({ baseM, endM: endsM[i], horizons: n }, coordinate, g);
    return rangeOf(finds, coordinate, isBaseKnown ? baseM : undefined);
  });
}

function holds(set: EndSet, end: number): boolean {
  return set.kind === "interval" && set.low <= end && end <= set.high;
}

describe.each(rocks)("$name", ({ coordinate }) => {
  describe.each(bases)("%s", (base) => {
    describe.each(samples)("$name", ({ horizons }) => {
      const isBaseKnown = base === "base known";
      const endsM = horizons.map(() => END_M);
      const together = { horizons, endsM, isBaseKnown, coordinate };
      const end = coordinate.toEffective(END_M);

      it("common-end rejects one true level in 5%", () => {
        expectRate(
          rateOf((g) => (commonEndTest(draw(together, g))?.p ?? 1) <= 0.05),
          0.05,
        );
      });

      it("common-end-given covers the common end", () => {
        expectRate(
          rateOf((g) => holds(commonEndGiven(draw(together, g), 0.95), end)),
          0.95,
        );
      });

      it("common-end-joint covers the common end", () => {
        expectRate(
          rateOf((g) => holds(commonEndJoint(draw(together, g), 0.9), end)),
          0.9,
        );
      });

      it("confidence-levels rejects the true level in 5%, and an interval about it no more often", () => {
        expectRate(
          rateOf((g) => (levelTest(draw(together, g), end)?.p ?? 1) <= 0.05),
          0.05,
        );
        expectRateAtMost(
          rateOf((g) => (largestLevelP(draw(together, g), end - 0.5, end + 0.5)?.p ?? 1) <= 0.05),
          0.05,
        );
      });

      it("duration-lower covers a duration of 0 at its level", () => {
        expectRate(
          rateOf((g) => durationLowerBound(draw(together, g), coordinate, 0.95) === 0),
          0.95,
        );
      });

      it("duration-lower covers staggered ends", () => {
        const staggered = { ...together, endsM: horizons.map((_, i) => END_M - 1.5 * i) };
        const truthM = 1.5 * (horizons.length - 1);
        expectRateAtLeast(
          rateOf((g) => (durationLowerBound(draw(staggered, g), coordinate, 0.95) ?? 0) <= truthM),
          0.95,
        );
      });

      it("duration-box covers staggered ends on both sides", () => {
        const staggered = { ...together, endsM: horizons.map((_, i) => END_M - 1.5 * i) };
        const truthM = 1.5 * (horizons.length - 1);
        expectRateAtLeast(
          rateOf((g) => {
            const box = durationBox(draw(staggered, g), coordinate, 0.95);
            return box !== undefined && box.lowM <= truthM && truthM <= (box.highM ?? Infinity);
          }),
          0.95,
        );
      });

      it("centroid says decline in 10% where recovery is constant", () => {
        const rate = rateOf((g) => {
          const interior = horizons.flatMap((n, i) => {
            const truth = { baseM: starts[i], endM: END_M - i, horizons: n };
            return rescaledInterior(drawFinds(truth, coordinate, g).map(coordinate.toEffective));
          });
          const test = centroid(interior);
          return test === undefined ? undefined : test.p <= 0.1;
        });
        expectRate(rate, 0.1);
      });
    });
  });
});

it("duration-lower is nearly sharp, and still covers, with one well sampled taxon above seven", () => {
  const horizons = [10, 10, 10, 10, 10, 10, 10, 200];
  const worst = {
    horizons,
    endsM: horizons.map((n) => (n === 200 ? END_M : 24)),
    isBaseKnown: true,
    coordinate: rocks[0].coordinate,
  };
  expectRateAtLeast(
    rateOf((g) => (durationLowerBound(draw(worst, g), worst.coordinate, 0.95) ?? 0) <= END_M - 24),
    0.95,
  );
});

describe("20 taxa that end together at 30 m, and 3 survivors found up to 45 m", () => {
  const candidates = {
    horizons: Array<number>(20).fill(10),
    endsM: Array<number>(20).fill(30),
    isBaseKnown: false,
    coordinate: withCover,
  };
  const survivors = { ...candidates, horizons: [15, 15, 15], endsM: [45, 45, 45] };

  it("are rejected in 5% with the survivors left out", () => {
    expectRate(
      rateOf((g) => (commonEndTest(draw(candidates, g))?.p ?? 1) <= 0.05),
      0.05,
    );
  });

  it("are rejected nearly always with the survivors in the list", () => {
    const { hits, trials } = rateOf(
      (g) => (commonEndTest([...draw(candidates, g), ...draw(survivors, g)])?.p ?? 1) <= 0.05,
    );
    expect(hits / trials).toBeGreaterThan(0.99);
  });
});

const declining = (n: number, g: Generator) =>
  Array.from({ length: n }, () => 1 - Math.sqrt(g.uniform())).toSorted((a, b) => a - b);

it("centroid gains power by pooling: a linear decline is seen in most assemblages, in few single taxa", () => {
  const single = rateOf((g) => (centroid(rescaledInterior(declining(10, g)))?.p ?? 1) <= 0.05);
  const pooled = rateOf((g) => {
    const interior = Array.from({ length: 12 }, () => rescaledInterior(declining(10, g))).flat();
    return (centroid(interior)?.p ?? 1) <= 0.05;
  });
  // Single taxon, 10 finds: 0.24, Monte Carlo of 100000 in Python (numpy 1.24).
  expect(Math.abs(single.hits / single.trials - 0.244)).toBeLessThan(0.03);
  expect(pooled.hits / pooled.trials).toBeGreaterThan(0.85);
});
