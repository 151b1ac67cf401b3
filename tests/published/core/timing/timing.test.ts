import { describe, expect, it } from "vitest";
import { centroid, rescaledInterior } from "../../../../src/core/ranges/checks/centroid.ts";
import { pieceCoordinate, uniformCoordinate } from "../../../../src/core/ranges/coordinate.ts";
import { type EffectiveRange, pivot } from "../../../../src/core/ranges/pivot.ts";
import {
  commonEndGiven,
  commonEndJoint,
  commonEndTest,
  type EndSet,
  highestLast,
} from "../../../../src/core/timing/common-end.ts";
import { levelTest } from "../../../../src/core/timing/confidence-levels.ts";
import { durationBox, durationLowerBound } from "../../../../src/core/timing/duration.ts";
import { expectClose, readCases, readSections } from "../../outside-values.ts";

interface Inputs {
  readonly set: string;
  readonly taxon: string;
  readonly C: number;
  readonly theta: number;
  readonly x: number;
  readonly segments?: readonly (readonly [number, number, number, number])[];
  readonly taxa: readonly (readonly [number, number, number])[];
}

const findsOf = readSections(new URL("./synthetic-sections.csv", import.meta.url));
const taxaOf = (set: string) => [...(findsOf.get(set)?.values() ?? [])];
const fromFirst = (set: string): EffectiveRange[] =>
  taxaOf(set).map((h) => ({ base: h[0], last: h[h.length - 1], exponent: h.length - 1 }));
const fromZero = (set: string): EffectiveRange[] =>
  taxaOf(set).map((h) => ({ base: 0, last: h[h.length - 1], exponent: h.length }));
const listed = (taxa: Inputs["taxa"]): EffectiveRange[] =>
  taxa.map(([base, last, exponent]) => ({ base, last, exponent }));

function commonEnd(ranges: readonly EffectiveRange[]) {
  const test = commonEndTest(ranges);
  return { M: highestLast(ranges), T: test?.statistic, df: test?.df, p: test?.p };
}

function placed({ set, segments }: Inputs) {
  const coordinate =
    segments === undefined
      ? uniformCoordinate
      : pieceCoordinate(
          segments.map(([baseM, topM, atBase, atTop]) => ({ baseM, topM, atBase, atTop })),
          { beyond: 0, origin: 0 },
        );
  const ranges = fromFirst(set).map(({ base, last, exponent }) => ({
    base: coordinate.toEffective(base),
    last: coordinate.toEffective(last),
    lastM: last,
    exponent,
  }));
  return { coordinate, ranges };
}

function box(inputs: Inputs) {
  const { coordinate, ranges } = placed(inputs);
  const result = durationBox(ranges, coordinate, inputs.C);
  return {
    per_taxon_level: result?.perTaxonLevel,
    uppers: result?.boundsM,
    lower: result?.lowM,
    upper: result?.highM ?? null,
  };
}

function singleton({ set, x, C }: Inputs) {
  const ranges = [...fromFirst(set), { base: x, last: x, exponent: 0 }];
  const { T, df } = commonEnd(ranges);
  return { T, df, given: asPair(commonEndGiven(ranges, C)), joint: asPair(commonEndJoint(ranges, C)) };
}

function asPair(set: EndSet): readonly [number, number] | null {
  return set.kind === "interval" ? [set.low, set.high] : null;
}

function levels({ set, theta }: Inputs) {
  const ranges = fromFirst(set);
  const test = levelTest(ranges, theta);
  return { levels: ranges.map((range) => pivot(range, theta)), ks: test?.statistic, ks_p: test?.p };
}

const quantities: Record<string, (inputs: Inputs) => unknown> = {
  "common-end": ({ set }) => commonEnd(fromFirst(set)),
  "common-end-base0": ({ set }) => commonEnd(fromZero(set)),
  "common-end-tiny": ({ taxa }) => commonEnd(listed(taxa)),
  "tiny-by-hand": ({ taxa }) => commonEndTest(listed(taxa))?.statistic,
  given: ({ set, C }) => asPair(commonEndGiven(fromFirst(set), C))?.[1],
  joint: ({ set, C }) => asPair(commonEndJoint(fromFirst(set), C)),
  levels,
  singleton,
  "duration-lower": (inputs) => {
    const { coordinate, ranges } = placed(inputs);
    return durationLowerBound(ranges, coordinate, inputs.C);
  },
  "duration-box": box,
  centroid: ({ set, taxon }) => {
    const z = centroid(rescaledInterior(findsOf.get(set)?.get(taxon) ?? []))?.z;
    return { z };
  },
  pooled: ({ set }) => centroid(taxaOf(set).flatMap(rescaledInterior))?.z,
};

const cases = readCases<Inputs>(new URL("./timing.json", import.meta.url));

describe("timing against outside values (sources in timing.json)", () => {
  it.each(cases)("$quantity: $case", ({ quantity, inputs, expected, tolerance }) => {
    const compute = quantities[quantity];
    expect(compute).toBeDefined();
    expectClose(compute(inputs), expected, tolerance);
  });
});
