import { describe, expect, it } from "vitest";
import { normalQuantile } from "../../../../../src/core/numeric/normal.ts";
import type { Generator } from "../../../../../src/core/numeric/streams.ts";
import { uniformCoordinate } from "../../../../../src/core/ranges/coordinate.ts";
import { betweenSections } from "../../../../../src/core/timing/pooled/between-sections.ts";
import { fromHorizon } from "../../../../../src/core/timing/pooled/common-scale.ts";
import { pooledLevel } from "../../../../../src/core/timing/pooled/pooled-level.ts";
import { endLikelihood } from "../../../../../src/core/timing/scenarios/end-likelihood.ts";
import { horizon } from "../../../../unit/core/ranges/small-study.ts";
import {
  drawFinds,
  expectRate,
  expectRateAtMost,
  isFull,
  rangeOf,
  rateOf,
} from "../../ranges/simulated-finds.ts";

/** Finds of each taxon in each section, and the error of its pick. */
const designs = [
  {
    name: "two sections",
    finds: [
      [20, 12, 8, 5],
      [10, 6],
    ],
    sds: [0.3, 0.8],
  },
  { name: "three sections", finds: [[25, 14, 6], [8, 5, 4], [12]], sds: [0.2, 1, 0.5] },
  {
    name: "five sections",
    finds: [[18, 9], [6, 5], [30], [7, 4, 4], [10, 8, 6, 5]],
    sds: [0.4, 0.1, 1.2, 0.6, 0.3],
  },
] as const;
const LENGTH = 30;
const WINDOW = { low: -20, tops: [20] };
const trials = isFull ? 4000 : 100;
const testTrials = isFull ? 100_000 : 4000;

interface Truth {
  readonly finds: readonly (readonly number[])[];
  readonly sds: readonly number[];
  readonly deltas: readonly number[];
}

/** Ranges of each section in metres from its pick: the true horizon lies at the error, the true end delta above that. */
function draw({ finds, sds, deltas }: Truth, g: Generator) {
  return finds.map((counts, s) => {
    const endM = deltas[s] + sds[s] * normalQuantile(g.uniform());
    return counts.map((horizons) =>
      rangeOf(drawFinds({ baseM: endM - LENGTH, endM, horizons }, uniformCoordinate, g), uniformCoordinate),
    );
  });
}

function pooled(sections: ReturnType<typeof draw>, sds: readonly number[]) {
  return pooledLevel({
    ...WINDOW,
    sections: sections.map((ranges, s) => ({
      section: `s${s}`,
      taxa: ranges.map((range, i) => endLikelihood({ ...range, taxon: `t${i}` }, uniformCoordinate)),
      maps: fromHorizon(new Map([["here", horizon(0, { shape: "normal", sigmaM: sds[s] })]])).mapsOf("here"),
    })),
    sharedSd: 0,
  });
}

const ends = (sections: ReturnType<typeof draw>, sds: readonly number[], confidence: number) =>
  betweenSections(
    sections.map((ranges, s) => {
      const errorM = normalQuantile(0.5 * (1 + confidence)) * sds[s];
      return {
        ranges,
        levelsOf: (heightM: number) => ({ low: heightM - errorM, high: heightM + errorM }),
        toEffective: (level: number, placed: { readonly heightM: number; readonly level: number }) =>
          placed.heightM + level - placed.level,
      };
    }),
  );

/** With the true offset drawn from the flat prior, which reaches far beyond the data, a level covers as it says. */
describe("the level common to sections covers the true one", () => {
  it.each(designs)("$name, errors of picks as declared", ({ finds, sds }) => {
    const rate = rateOf(
      (g) => {
        const delta = -8 + 16 * g.uniform();
        const { posterior } = pooled(draw({ finds, sds, deltas: finds.map(() => delta) }, g), sds);
        if (posterior === undefined) return false;
        return posterior.quantile(0.05) <= delta && delta <= posterior.quantile(0.95);
      },
      { replicates: trials },
    );
    expectRate(rate, 0.9);
  });

  it("too seldom where errors of picks are not declared", () => {
    const { finds, sds } = designs[1];
    const rate = rateOf(
      (g) => {
        const none = sds.map(() => 0);
        const { posterior } = pooled(draw({ finds, sds, deltas: [1, 1, 1] }, g), none);
        return posterior !== undefined && posterior.quantile(0.05) <= 1 && posterior.quantile(0.95) >= 1;
      },
      { replicates: trials },
    );
    expect(rate.hits / rate.trials).toBeLessThan(0.75);
  });
});

const exact = (finds: Truth["finds"]) => finds.map(() => 0);

describe("the test of one level in all sections", () => {
  it.each(designs)("has its size at exact picks, $name", ({ finds }) => {
    const sds = exact(finds);
    const rate = rateOf(
      (g) => (ends(draw({ finds, sds, deltas: finds.map(() => 2) }, g), sds, 0.95)?.p ?? 1) <= 0.05,
      { replicates: testTrials },
    );
    expectRate(rate, 0.05);
  });

  it.each(designs)("rejects no more often at uncertain picks, $name", ({ finds, sds }) => {
    const rate = rateOf(
      (g) => (ends(draw({ finds, sds, deltas: finds.map(() => 2) }, g), sds, 0.95)?.p ?? 1) <= 0.05,
      { replicates: testTrials },
    );
    expectRateAtMost(rate, 0.05);
  });

  it("finds sections that ended at levels of their own, as the evidence does", () => {
    const { finds } = designs[1];
    const sds = finds.map(() => 0.2);
    const shares = { test: 0, free: 0 };
    const { trials: drawn } = rateOf(
      (g) => {
        const sections = draw({ finds, sds, deltas: [-6, 0, 6] }, g);
        const { common, free } = pooled(sections, sds);
        if ((ends(sections, sds, 0.95)?.p ?? 1) <= 0.05) shares.test++;
        if (free[0] > common[0]) shares.free++;
        return true;
      },
      { replicates: 100 },
    );
    expect(shares.test / drawn).toBeGreaterThan(0.9);
    expect(shares.free / drawn).toBeGreaterThan(0.8);
  });

  it("and the evidence prefers one level where there is one", () => {
    const { finds, sds } = designs[0];
    const rate = rateOf(
      (g) => {
        const { common, free } = pooled(draw({ finds, sds, deltas: [1, 1] }, g), sds);
        return common[0] > free[0];
      },
      { replicates: 100 },
    );
    expect(rate.hits / rate.trials).toBeGreaterThan(0.85);
  });
});
