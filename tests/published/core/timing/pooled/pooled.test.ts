import { describe, expect, it } from "vitest";
import { uniformCoordinate } from "../../../../../src/core/ranges/coordinate.ts";
import { commonEndGiven } from "../../../../../src/core/timing/common-end.ts";
import { betweenSections } from "../../../../../src/core/timing/pooled/between-sections.ts";
import { fromHorizon } from "../../../../../src/core/timing/pooled/common-scale.ts";
import { highestDensity } from "../../../../../src/core/timing/pooled/highest-density.ts";
import { pooledLevel } from "../../../../../src/core/timing/pooled/pooled-level.ts";
import { type PooledSection, sectionLevel } from "../../../../../src/core/timing/pooled/section-level.ts";
import { endLikelihood } from "../../../../../src/core/timing/scenarios/end-likelihood.ts";
import { horizon } from "../../../../unit/core/ranges/small-study.ts";
import { expectClose, readCases } from "../../../outside-values.ts";

/** Base, highest find and number of finds that tell of the end, of each taxon; heights from the pick. */
type Taxa = readonly (readonly [number, number, number])[];

interface Inputs {
  readonly sections: readonly {
    readonly taxa: Taxa;
    readonly pick: { readonly shape: "normal" | "uniform"; readonly size: number };
  }[];
  readonly window: readonly [number, number];
  readonly sharedSd: number;
  readonly levels: readonly number[];
  readonly rate: number;
  readonly spread: number;
  readonly ends: readonly Taxa[];
  readonly level: number;
  readonly base: number;
  readonly last: number;
  readonly exponent: number;
  readonly meanM: number;
  readonly sdM: number;
  readonly top: number;
}

const rangesOf = (taxa: Taxa) =>
  taxa.map(([base, last, exponent]) => ({ base, last, lastM: last, exponent }));

function sectionsOf({ sections, rate, spread }: Inputs): readonly PooledSection[] {
  return sections.map(({ taxa, pick: { shape, size } }, s) => {
    const place = { shape, sigmaM: size, lowM: -size, highM: size };
    const picks = new Map([["here", horizon(0, place)]]);
    const rates = rate === undefined ? undefined : new Map([["here", { rate, spread }]]);
    return {
      section: `s${s}`,
      taxa: rangesOf(taxa).map((range) => endLikelihood({ ...range, taxon: "t" }, uniformCoordinate)),
      maps: fromHorizon(picks, rates).mapsOf("here"),
    };
  });
}

function posterior(inputs: Inputs) {
  const [low, top] = inputs.window;
  const found = pooledLevel({ sections: sectionsOf(inputs), low, tops: [top], sharedSd: inputs.sharedSd });
  const level = found.posterior;
  if (level === undefined) return undefined;
  const pieces = highestDensity(level, 0.95);
  return {
    q025: level.quantile(0.025),
    q50: level.quantile(0.5),
    q975: level.quantile(0.975),
    after: 1 - level.cdf(0),
    logZ: found.common[0],
    densest: [pieces[0].low, pieces[pieces.length - 1].high],
  };
}

function logLikelihoods(inputs: Inputs): readonly number[] {
  const levels = sectionLevel(sectionsOf(inputs)[0], {
    low: Math.min(-10, ...inputs.levels),
    high: Math.max(15, ...inputs.levels),
  });
  return inputs.levels.map(levels.log);
}

const ownLevels = { levelsOf: (low: number) => ({ low, high: low }), toEffective: (level: number) => level };

const quantities: Readonly<Record<string, (inputs: Inputs) => unknown>> = {
  posterior,
  free: (inputs) =>
    pooledLevel({
      sections: sectionsOf(inputs),
      low: inputs.window[0],
      tops: [inputs.window[1]],
      sharedSd: 0,
    }).free[0],
  likelihood: (inputs) => logLikelihoods(inputs).map(Math.exp),
  "log-likelihood": logLikelihoods,
  "rate-likelihood": (inputs) => logLikelihoods(inputs).map(Math.exp),
  between: ({ ends }) => betweenSections(ends.map((taxa) => ({ ...ownLevels, ranges: rangesOf(taxa) }))),
  upper: ({ ends, level }) => {
    const set = commonEndGiven(ends.flatMap(rangesOf), level);
    return set.kind === "interval" ? set.high : undefined;
  },
  "after-marker": ({ base, last, exponent, meanM, sdM, top }) => {
    const taxon = { taxon: "t", base, last, lastM: last, exponent };
    const picks = new Map([["here", horizon(meanM, { shape: "normal", sigmaM: sdM })]]);
    const section = {
      section: "here",
      taxa: [endLikelihood(taxon, uniformCoordinate)],
      maps: fromHorizon(picks).mapsOf("here"),
    };
    const window = { low: -10, tops: [top - meanM] };
    const { posterior: level } = pooledLevel({ ...window, sections: [section], sharedSd: 0 });
    return level && 1 - level.cdf(0);
  },
};

const cases = readCases<Inputs>(new URL("./pooled.json", import.meta.url));

describe("sections together, as worked out elsewhere", () => {
  it.each(cases)("$case", ({ quantity, inputs, expected, tolerance }) => {
    expectClose(quantities[quantity](inputs), expected, tolerance);
  });

  it("holds every quantity", () => {
    expect(new Set(cases.map(({ quantity }) => quantity))).toEqual(new Set(Object.keys(quantities)));
  });
});
