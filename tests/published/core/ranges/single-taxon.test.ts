import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { decliningPosterior } from "../../../../src/core/ranges/declining.ts";
import { gapBracket, gapsNeededForQuantile } from "../../../../src/core/ranges/gap-quantile.ts";
import { gapRank, gapsNeeded, sortedGaps } from "../../../../src/core/ranges/gap-rank.ts";
import { steppedSightingBound, steppedSightingChance } from "../../../../src/core/ranges/sighting-rate.ts";
import { topKBound, topKOmega } from "../../../../src/core/ranges/top-k.ts";
import { twoHighestFactor } from "../../../../src/core/ranges/two-highest.ts";
import { twoEndedFactor } from "../../../../src/core/ranges/uniform.ts";
import {
  bayesExtension,
  flatPriorCoverage,
  posteriorPower,
  shareBeyond,
} from "../../../../src/core/ranges/uniform-bayes.ts";
import {
  tailBound,
  tailPoint,
  tailShape,
  tailWeights,
  withoutTail,
} from "../../../../src/core/ranges/weibull-tail.ts";
import { trendChance } from "../../../../src/core/ranges/window-trend.ts";

interface Inputs {
  readonly n: number;
  readonly C: number;
  readonly b: number;
  readonly M: number;
  readonly U: number | null;
  readonly e: number;
  readonly p: number;
  readonly t: readonly number[];
  readonly T: number;
  readonly gaps: readonly number[];
  readonly h: readonly number[];
  readonly base: number;
  readonly gamma: number;
  readonly C_N: readonly (readonly [number, number])[];
  readonly k: number;
  readonly alpha: number;
  readonly x: readonly number[];
  readonly s: number;
  readonly tn: number;
  readonly beta: number;
  readonly k_beta_C: readonly (readonly [number, number, number])[];
}

function ranksOf(sorted: readonly number[], { C, gamma }: Inputs) {
  const { low, high } = gapBracket(sorted.length, { confidence: C, assurance: gamma });
  const ranked = gapRank(sorted.length, C);
  const at = (rank: number | undefined) => (rank === undefined ? undefined : sorted[rank - 1]);
  return {
    rank_low: low,
    rank_high: high,
    gap_low: at(low),
    gap_high: at(high),
    exact_rank: ranked?.rank,
    exact_gap: at(ranked?.rank),
  };
}

function tail({ t, k, alpha }: Inputs) {
  const finds = t.toSorted((a, b) => b - a).slice(0, k);
  if (withoutTail(finds) !== undefined) return undefined;
  return {
    shape: tailShape(finds),
    estimate: tailPoint(finds),
    upper_one_sided: tailBound(finds, alpha),
    ci_low: tailBound(finds, 1 - alpha / 2),
    ci_high: tailBound(finds, alpha / 2),
    weights: [...tailWeights(tailShape(finds), finds.length)],
  };
}

function declining({ x, s, U }: Inputs) {
  const last = x[x.length - 1];
  const posterior = decliningPosterior({
    shares: x.map((find) => find / last),
    spread: s,
    ...(U === null ? {} : { limit: (U - last) / last }),
  });
  const quantile = (p: number) => last * (1 + posterior.extension(p));
  return {
    falling: posterior.falling,
    "q0.5": quantile(0.5),
    "q0.9": quantile(0.9),
    "q0.95": quantile(0.95),
  };
}

function twoHighestLevels({ h }: Inputs) {
  const last = h[h.length - 1];
  const spacing = last - h[h.length - 2];
  const at = (level: number, beta: number) => last + spacing * twoHighestFactor(level, beta);
  return [at(0.5, 1), at(0.95, 1), at(0.95, 2)];
}

const limitOf = ({ b, M, U }: Inputs) => ((U ?? Number.NaN) - M) / (M - b);
const topDown = ({ t }: Inputs) => t.toSorted((a, b) => b - a);

const quantities: Record<string, (inputs: Inputs) => unknown> = {
  "flat-extension": ({ n, C }) => bayesExtension({ power: posteriorPower(n - 1, "flat") }, C),
  "flat-both": ({ n, C }) => twoEndedFactor(C, n - 1),
  "flat-coverage": ({ n, C }) => flatPriorCoverage(n - 1, C),
  "share-above": (inputs) => shareBeyond(inputs.e, limitOf(inputs)),
  "truncated-quantile": (inputs) =>
    inputs.M +
    (inputs.M - inputs.b) *
      (bayesExtension({ power: inputs.e, limit: limitOf(inputs) }, inputs.p) ?? Number.NaN),
  trend: ({ t, T }) => trendChance(t, T),
  gaps: (inputs) =>
    ranksOf(
      inputs.gaps.toSorted((a, b) => a - b),
      inputs,
    ),
  "gaps-base": (inputs) => ranksOf(sortedGaps(inputs.h, inputs.base), inputs),
  "gaps-needed": ({ C, gamma }) => gapsNeededForQuantile({ confidence: C, assurance: gamma }),
  "gaps-needed-rank": ({ C }) => gapsNeeded(C),
  "rank-levels": ({ C_N }) => C_N.map(([C, N]) => gapRank(N, C)?.level),
  "tail-point": (inputs) => tailPoint(topDown(inputs)),
  "tail-two-sided": (inputs) => tailBound(topDown(inputs), 0.025),
  tail,
  declining,
  "stepped-p": ({ n, tn, T }) => steppedSightingChance({ sightings: n, lastStep: tn }, T),
  "stepped-bound": ({ n, tn, alpha }) => steppedSightingBound({ sightings: n, lastStep: tn }, 1 - alpha),
  "two-highest": ({ C, beta }) => twoHighestFactor(C, beta),
  "two-highest-levels": twoHighestLevels,
  "top-k": ({ h, k, beta, C }) => topKBound(h, { finds: k, tail: beta }, C),
  omega: ({ k_beta_C }) => k_beta_C.map(([finds, tail, C]) => topKOmega(C, { finds, tail })),
};

interface Case {
  readonly case: string;
  readonly quantity: string;
  readonly inputs: Inputs;
  readonly expected: unknown;
  readonly tolerance: number;
}

const cases: readonly Case[] = JSON.parse(
  readFileSync(new URL("./single-taxon.json", import.meta.url), "utf8"),
);

/** Every number of `expected` is met within tolerance x max(1, |expected|); null is met by null or undefined alone. */
function expectClose(got: unknown, expected: unknown, tolerance: number): void {
  if (expected === null) expect(got ?? null).toBeNull();
  else if (typeof expected === "number") {
    expect(got).toBeTypeOf("number");
    expect(Math.abs(Number(got) - expected)).toBeLessThanOrEqual(tolerance * Math.max(1, Math.abs(expected)));
  } else
    for (const [key, value] of Object.entries(Object(expected)))
      expectClose(new Map(Object.entries(Object(got))).get(key), value, tolerance);
}

describe("one taxon's end against outside values (sources in single-taxon.json)", () => {
  it.each(cases)("$quantity: $case", ({ quantity, inputs, expected, tolerance }) => {
    const compute = quantities[quantity];
    expect(compute).toBeDefined();
    expectClose(compute(inputs), expected, tolerance);
  });
});
