import { describe, expect, it } from "vitest";
import { exp, log, log1p } from "../../../../src/core/numeric/elementary.ts";
import type { Generator } from "../../../../src/core/numeric/streams.ts";
import {
  type Coordinate,
  pieceCoordinate,
  type RecoveryPiece,
  uniformCoordinate,
} from "../../../../src/core/ranges/coordinate.ts";
import { recoveryFit } from "../../../../src/core/ranges/recovery-fit.ts";
import { coordinateOf, wholeRecovery } from "../../../../src/core/ranges/recovery-pieces.ts";
import { recoveryTrend, trendPieces } from "../../../../src/core/ranges/recovery-trend.ts";
import { uniformBound } from "../../../../src/core/ranges/uniform.ts";
import { drawFinds, expectRate, expectRateAtMost, isFull, rangeOf, rateOf } from "./simulated-finds.ts";

const BASE_M = 4;
const END_M = 31;
const extent = { gaps: [{ baseM: 18, topM: 21 }], bottomM: 0, topM: 50 };
const linear = (baseM: number, topM: number, [atBase, atTop]: readonly [number, number]): RecoveryPiece => ({
  baseM,
  topM,
  atBase,
  atTop,
});

function shaped(pieces: readonly RecoveryPiece[]): Coordinate {
  const whole = wholeRecovery(pieces, extent);
  if (whole === undefined) throw new Error("recovery somewhere");
  return coordinateOf(whole);
}

const shapes = [
  { name: "uniform", coordinate: shaped([linear(0, 50, [1, 1])]) },
  { name: "falling", coordinate: shaped([linear(0, 40, [3, 0.2]), linear(40, 50, [0.2, 0.2])]) },
  { name: "rising", coordinate: shaped([linear(0, 50, [0.1, 4])]) },
  {
    name: "stepped",
    coordinate: shaped([linear(0, 12, [1, 1]), linear(12, 28, [4, 4]), linear(28, 50, [0.5, 0.5])]),
  },
];

/** Does the 95% bound in one coordinate reach the end of finds drawn in another? */
function covers(drawnIn: Coordinate, seenIn: Coordinate, { horizons, known }: Design) {
  return (g: Generator) => {
    const finds = drawFinds({ baseM: BASE_M, endM: END_M, horizons }, drawnIn, g);
    const bound = uniformBound(rangeOf(finds, seenIn, known ? BASE_M : undefined), 0.95);
    if (bound === undefined) return false;
    return (seenIn.toHeight(bound, "upper") ?? Number.POSITIVE_INFINITY) >= END_M;
  };
}

interface Design {
  readonly horizons: number;
  readonly known: boolean;
}

describe.each(shapes)("recovery $name", ({ coordinate }) => {
  it.each([3, 5, 10, 20])("%i horizons cover the true end in the right coordinate", (horizons) => {
    expectRate(rateOf(covers(coordinate, coordinate, { horizons, known: false })), 0.95);
    expectRate(rateOf(covers(coordinate, coordinate, { horizons, known: true })), 0.95);
  });
});

describe("recovery taken as constant", () => {
  it.each([
    // 1 - F(0.05^(1/n))^n for x / theta ~ Beta(1, 2), base known.
    [5, 0.679],
    [10, 0.5],
    [20, 0.323],
  ] as const)("%i horizons under a linear decline to nothing cover %f", (horizons, exact) => {
    const decline = pieceCoordinate([linear(BASE_M, END_M, [1, 0])], { beyond: 0, origin: 0 });
    const rate = rateOf(covers(decline, uniformCoordinate, { horizons, known: true }));
    expect(Math.abs(rate.hits / rate.trials - exact)).toBeLessThan(0.025);
  });

  it("covers too little where recovery falls, and more than it says where it rises", () => {
    const design = { horizons: 10, known: false };
    expectRateAtMost(rateOf(covers(shapes[1].coordinate, uniformCoordinate, design)), 0.85);
    const rising = rateOf(covers(shapes[2].coordinate, uniformCoordinate, design));
    expect(rising.hits / rising.trials).toBeGreaterThan(0.97);
  });
});

const levelsOf = (seenIn: Coordinate, g: Generator) =>
  [8, 12, 20].map((horizons) =>
    drawFinds({ baseM: BASE_M, endM: END_M, horizons }, shapes[1].coordinate, g).map(seenIn.toEffective),
  );

it("rejects the right shape in 5%", () => {
  const rate = rateOf((g) => (recoveryFit(levelsOf(shapes[1].coordinate, g))?.p ?? 1) <= 0.05);
  expectRate(rate, 0.05);
});

describe("the fit of finds to recovery", () => {
  it("rejects a constant shape far more often where recovery falls", () => {
    const rate = rateOf((g) => (recoveryFit(levelsOf(uniformCoordinate, g))?.p ?? 1) <= 0.05);
    expect(rate.hits / rate.trials).toBeGreaterThan(0.3);
  });
});

/** A find of density exp(beta h) between two levels. */
const drawTrend = (beta: number, [low, high]: readonly [number, number], g: Generator) => {
  const rise = exp(beta * (high - low)) - 1;
  return low + (beta === 0 ? g.uniform() * (high - low) : log1p(rise * g.uniform()) / beta);
};

describe("a trend fitted to the finds of a group", () => {
  const LENGTH_M = 40;
  const TAXA = 12;
  it.each([5, 10, 20])(
    "%i horizons a taxon: covers near its level where constant recovery fails",
    (horizons) => {
      const beta = -log(20) / LENGTH_M;
      const outcome = (seenAs: "fitted" | "constant") =>
        rateOf(
          (g) => {
            const taxa = Array.from({ length: TAXA }, (_, i) => {
              const ends = [i, 26 + i] as const;
              return Array.from({ length: horizons }, () => drawTrend(beta, ends, g)).toSorted(
                (a, b) => a - b,
              );
            });
            const interior = taxa.map((finds) => ({
              heightsM: finds.slice(1, -1),
              parts: [{ baseM: finds[0], topM: finds[horizons - 1] }],
            }));
            const fitted = recoveryTrend(interior, LENGTH_M) ?? 0;
            const seenIn =
              seenAs === "fitted" ? coordinateOf(trendPieces(fitted, [0, LENGTH_M])) : uniformCoordinate;
            const bound = uniformBound(rangeOf(taxa[0], seenIn), 0.95) ?? 0;
            return (seenIn.toHeight(bound, "upper") ?? Number.POSITIVE_INFINITY) >= 26;
          },
          { replicates: isFull ? 20_000 : 1_000 },
        );
      const fitted = outcome("fitted");
      const constant = outcome("constant");
      expect(fitted.hits / fitted.trials).toBeGreaterThan(0.92);
      expect(constant.hits / constant.trials).toBeLessThan(0.9);
    },
  );
});
