import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { countsChance, countsLikelihood, countsShape } from "../../../../src/core/ranges/counts.ts";
import { breakShares } from "../../../../src/core/ranges/recovery-hiatus.ts";
import { oddsChances } from "../../../../src/core/ranges/sampled-odds.ts";
import {
  barrenLikelihood,
  effortLikelihood,
  endPosterior,
} from "../../../../src/core/ranges/sampled-posterior.ts";

interface Inputs {
  readonly N: number;
  readonly n: number;
  readonly M: number;
  readonly e: number;
  readonly uR: number;
  readonly ub: number;
  readonly D: number;
  readonly over: number;
  readonly edges: readonly number[];
  readonly present: readonly number[];
  readonly efforts: readonly number[];
  readonly inside: readonly number[];
  readonly above: readonly number[];
  readonly total: number;
  readonly S: number;
  readonly Sj: number;
  readonly k: number | null;
  readonly y: readonly number[];
}

interface Case {
  readonly case: string;
  readonly quantity: string;
  readonly inputs: Inputs;
  readonly expected: unknown;
  readonly tolerance: number;
}

const cases: readonly Case[] = JSON.parse(
  readFileSync(new URL("./samples-and-counts.json", import.meta.url), "utf8"),
);

const shares = (likelihood: Float64Array) => {
  const total = likelihood.reduce((sum, value) => sum + value, 0);
  return [...likelihood].map((value) => value / total);
};

function effortPosterior({ present, efforts, above }: Inputs) {
  const isFound = (_: number, i: number) => present[i] === 1;
  const barren = efforts.filter((_, i) => present[i] === 0).reduce((a, b) => a + b, 0);
  return shares(
    effortLikelihood({
      withTaxon: efforts.filter(isFound),
      barrenInRange: barren,
      inRange: efforts.length,
      above,
    }),
  );
}

const quantities: Record<string, (inputs: Inputs) => unknown> = {};
const define = (name: string, compute: (inputs: Inputs) => unknown) => {
  quantities[name] = compute;
};
define("break-shares", ({ e, uR, ub, D, over }) =>
  breakShares({ length: uR, exponent: e, below: ub, above: over, missing: D }),
);
define("barren-posterior", ({ N, n, M }) => shares(barrenLikelihood(N, n, M)));
define(
  "height-posterior",
  ({ N, n, edges }) => endPosterior(barrenLikelihood(N, n, edges.length - 2), edges, "height")?.chances,
);
define("effort-posterior", effortPosterior);
define("odds-chances", ({ inside, n, above }) => [...oddsChances({ inRange: inside, finds: n, above })]);
define("counts-chance", ({ total, S, Sj, k }) =>
  countsChance({ total, inside: S, further: Sj }, k ?? Number.POSITIVE_INFINITY),
);
define("counts-posterior", ({ y, efforts, above }) =>
  shares(countsLikelihood({ counts: y, efforts }, above)),
);
define("counts-shape", ({ y, efforts }) => countsShape({ counts: y, efforts }));

/** Every number of `expected` is met within tolerance x max(1, |expected|). */
function expectClose(got: unknown, expected: unknown, tolerance: number): void {
  if (typeof expected === "number") {
    expect(got).toBeTypeOf("number");
    expect(Math.abs(Number(got) - expected)).toBeLessThanOrEqual(tolerance * Math.max(1, Math.abs(expected)));
  } else {
    const found = new Map(Object.entries(Object(got)));
    const entries = Object.entries(Object(expected));
    expect(found.size).toBe(entries.length);
    for (const [key, value] of entries) expectClose(found.get(key), value, tolerance);
  }
}

describe("samples and counts against outside values (sources in samples-and-counts.json)", () => {
  it.each(cases)("$quantity: $case", ({ quantity, inputs, expected, tolerance }) => {
    const compute = quantities[quantity];
    expect(compute).toBeDefined();
    expectClose(compute(inputs), expected, tolerance);
  });
});
