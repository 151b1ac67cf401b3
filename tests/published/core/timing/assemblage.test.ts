import { describe, expect, it } from "vitest";
import { poissonBinomial } from "../../../../src/core/numeric/poisson-binomial.ts";
import { pieceCoordinate, uniformCoordinate } from "../../../../src/core/ranges/coordinate.ts";
import { combinedTest } from "../../../../src/core/timing/combined.ts";
import { detectionByCounts, sampledChancesAbove } from "../../../../src/core/timing/detection.ts";
import { halfIntervals, halfTest } from "../../../../src/core/timing/half-intervals.ts";
import { chancesAbove, expectedLasts } from "../../../../src/core/timing/last-finds.ts";
import { fitPulses } from "../../../../src/core/timing/pulses.ts";
import { rarityTest } from "../../../../src/core/timing/rank-correlation.ts";
import { separation } from "../../../../src/core/timing/separation.ts";
import { surfaceClustering } from "../../../../src/core/timing/surfaces.ts";
import { twoHighestEnd } from "../../../../src/core/timing/two-highest-end.ts";
import { expectClose, readCases, readSections } from "../../outside-values.ts";

interface Inputs {
  readonly set: string;
  readonly C: number;
  readonly theta: number;
  readonly x: number;
  readonly K: number;
  readonly tail: number;
  readonly single?: number;
  readonly early: readonly string[];
  readonly late: readonly string[];
  readonly segments?: readonly (readonly [number, number, number, number])[];
  readonly abundance: readonly number[];
  readonly lasts: readonly number[];
  readonly surfaces: readonly number[];
  readonly below: number;
  readonly zone: readonly [number, number];
  readonly exponents: readonly number[];
  readonly detections: readonly (readonly number[])[];
  readonly mean: number;
  readonly shape: number;
  readonly efforts: readonly number[];
}

const sections = readSections(new URL("./synthetic-sections.csv", import.meta.url));

function rangesOf(set: string, names?: readonly string[]) {
  return [...(sections.get(set) ?? [])]
    .filter(([taxon]) => names === undefined || names.includes(taxon))
    .map(([, levels]) => ({
      levels,
      base: levels[0],
      last: levels[levels.length - 1],
      exponent: levels.length - 1,
    }));
}

function apart({ set, early, late, C, segments }: Inputs) {
  const coordinate =
    segments === undefined
      ? uniformCoordinate
      : pieceCoordinate(
          segments.map(([baseM, topM, atBase, atTop]) => ({ baseM, topM, atBase, atTop })),
          { beyond: 0, origin: 0 },
        );
  const placed = (names: readonly string[]) =>
    rangesOf(set, names).map(({ base, last, exponent }) => ({
      base: coordinate.toEffective(base),
      last: coordinate.toEffective(last),
      lastM: last,
      exponent,
    }));
  return separation({ early: placed(early), late: placed(late) }, coordinate, C);
}

function twoHighest({ set, tail, single }: Inputs) {
  const alone = single === undefined ? [] : [{ levels: [single], base: single, last: single, exponent: 0 }];
  const end = twoHighestEnd([...rangesOf(set), ...alone], 0.95, tail);
  return end.kind === "interval" ? [end.low, end.high] : null;
}

/** The local level of the simultaneous band has no part in the pointwise one. */
const levels = { confidence: 0.95, local: 0.01 };

const quantities: Readonly<Record<string, (inputs: Inputs) => unknown>> = {
  combined: ({ set, theta }) => combinedTest(rangesOf(set), theta),
  half: ({ set }) => halfIntervals(rangesOf(set), 0.95),
  "half-test": ({ set, theta }) => halfTest(rangesOf(set), theta),
  apart,
  pulses: ({ set, K }) => fitPulses(rangesOf(set), K)[K - 1],
  rarity: ({ abundance, lasts }) => rarityTest(abundance, lasts, { seed: 1, replicates: 1 }),
  "two-highest": twoHighest,
  surfaces: ({ lasts, surfaces, below, zone: [low, high] }) =>
    surfaceClustering(
      lasts,
      surfaces.map((s) => ({ low: s - below, high: s })),
      { low, high },
    ),
  envelope: ({ exponents, theta, x }) =>
    expectedLasts(
      chancesAbove(
        exponents.map((exponent) => ({ base: 0, last: theta, exponent })),
        x,
        theta,
      ),
      levels,
    ),
  samples: ({ detections }) => {
    const chances = sampledChancesAbove(detections);
    return { expected: expectedLasts(chances, levels).expected, distribution: poissonBinomial(chances) };
  },
  detection: ({ mean, shape, efforts }) => efforts.map((effort) => detectionByCounts(mean, shape, effort)),
};

describe("assemblage methods against outside values (sources in assemblage.json)", () => {
  it.each(readCases<Inputs>(new URL("./assemblage.json", import.meta.url)))("$quantity: $case", (outside) => {
    const compute = quantities[outside.quantity];
    expect(compute).toBeDefined();
    expectClose(compute(outside.inputs), outside.expected, outside.tolerance);
  });
});
