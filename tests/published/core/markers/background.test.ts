import { describe, expect, it } from "vitest";
import { anomalyTest } from "../../../../src/core/markers/anomaly-test.ts";
import { background, shortestHalf } from "../../../../src/core/markers/background.ts";
import { fitCensoredNormal, meanBelowLimit } from "../../../../src/core/markers/censored-normal.ts";
import { enrichmentFactor, excessOf } from "../../../../src/core/markers/enrichment.ts";
import {
  benjaminiHochberg,
  falseThreeSigmaChance,
  holm,
  sidakQuantile,
} from "../../../../src/core/markers/false-discovery.ts";
import { productLimit, productLimitQuantile } from "../../../../src/core/markers/kaplan-meier.ts";
import rows from "./background.json" with { type: "json" };
import { expectedValues } from "./expected-values.ts";

/** The rows' sources: own Python with numpy and scipy (make-background.py), the likelihood and product limit also in R. */
const concentrations = [
  0.021, 0.034, 0.028, 0.019, 0.041, 0.025, 0.03, 0.022, 0.055, 3.9, 2.4, 1.45, 0.92, 0.31, 0.06, 0.027,
  0.033, 0.024, 0.029, 0.036,
];
const samples = concentrations.map((value) => ({ value, censored: "none" as const, sigma: 0 }));
const censoredValues = [0.05, 0.05, 0.05, 0.06, 0.08, 0.09, 0.1, 0.1, 0.11, 0.14, 0.17, 0.2, 0.26, 0.35];
const isBelow = [1, 1, 1, 0, 0, 0, 1, 1, 0, 0, 0, 0, 0, 0].map((c) => c === 1);

const expected = expectedValues(rows);
const mle = (key: string) => expected.number("censored lognormal MLE", key);
const indices = (flags: readonly boolean[]) => flags.flatMap((flag, i) => (flag ? [i] : []));

function fitted() {
  const fit = background(samples);
  if (fit.kind !== "background") throw new Error(fit.reason);
  return fit;
}

describe("background of the worked profile", () => {
  it("starts from the shortest half", () => {
    const { centre, scale } = shortestHalf(concentrations.map(Math.log10));
    expect(centre).toBeCloseTo(expected.number("shorth start", "m0"), 9);
    expect(scale).toBeCloseTo(expected.number("shorth start", "s0"), 9);
  });

  it("clips to the published kept set, median and scale", () => {
    const fit = fitted();
    const start = "background by shorth start";
    expect(fit.logMedian).toBeCloseTo(expected.number(start, "median_log10"), 9);
    expect(fit.logSd).toBeCloseTo(expected.number(start, "s_log10"), 9);
    expect(fit.isKept.flatMap((kept, i) => (kept ? [i] : []))).toEqual(expected.numbers(start, "kept0"));
    expect(fit.passes).toBe(expected.number(start, "passes"));
  });

  it("has the published t and p for every sample", () => {
    const tests = anomalyTest(samples, fitted());
    const [t, p] = ["t", "p"].map((key) => expected.numbers("predictive t", key));
    tests.forEach((test, i) => {
      expect(test.t).toBeCloseTo(t[i], 6);
      expect(Math.abs(test.p / p[i] - 1)).toBeLessThan(1e-4);
    });
  });

  it("flags the published samples, by false discovery rate and strictly", () => {
    const p = anomalyTest(samples, fitted()).map((test) => test.p);
    expect(indices(benjaminiHochberg(p, 0.05).isFlagged)).toEqual(expected.numbers("BH q=0.05"));
    expect(indices(holm(p, 0.05).isFlagged)).toEqual(expected.numbers("Holm alpha"));
  });

  it("has the published enrichment and excess of the largest sample", () => {
    const measured = { value: 3.9, sigma: 0.06 * 3.9 };
    const { factor, sigmaLog } = enrichmentFactor(measured, fitted());
    expect(factor).toBeCloseTo(expected.number("enrichment factor", "EF"), 6);
    expect(sigmaLog).toBeCloseTo(expected.number("enrichment factor", "sigma_log10"), 9);
    expect(excessOf(measured, fitted()).excess).toBeCloseTo(
      expected.number("excess and sigma", "excess_ng_g"),
      9,
    );
    expect(excessOf(measured, fitted()).sigma).toBeCloseTo(
      expected.number("excess and sigma", "sigma_ng_g"),
      9,
    );
  });
});

describe("many tests", () => {
  const sizes = [20, 50, 100, 200, 500];
  it("has the published Sidak quantiles and chances of a false 3-sigma flag", () => {
    const quantiles = expected.numbers("Sidak");
    const chances = expected.numbers("chance of");
    sizes.forEach((n, i) => {
      expect(sidakQuantile(n, 0.05)).toBeCloseTo(quantiles[i], 6);
      expect(falseThreeSigmaChance(n)).toBeCloseTo(chances[i], 8);
    });
  });
});

describe("values below detection", () => {
  it("has the published product-limit table and quantiles", () => {
    const steps = productLimit(censoredValues, isBelow);
    const table = expected.table("KM left-censored");
    steps.forEach((s, i) => {
      const got = [s.value, s.atRisk, s.detects, s.atOrBelow, s.below];
      got.forEach((v, k) => expect(v).toBeCloseTo(table[i][k], 9));
    });
    expect(steps).toHaveLength(table.length);
    expect(productLimitQuantile(steps, 0.5)).toBe(expected.number("KM quantiles", "q50"));
    expect(productLimitQuantile(steps, 0.75)).toBe(expected.number("KM quantiles", "q75"));
    expect(productLimitQuantile(steps, 0.25)).toBeUndefined();
  });

  it("has the published censored lognormal maximum likelihood", () => {
    const fit = fitCensoredNormal(censoredValues.map(Math.log), isBelow);
    const jacobian = censoredValues.reduce((sum, v, i) => (isBelow[i] ? sum : sum - Math.log(v)), 0);
    expect(Math.abs(fit.mean - mle("mu_ln"))).toBeLessThan(1e-5);
    expect(Math.abs(fit.sd - mle("sigma_ln"))).toBeLessThan(1e-5);
    expect(Math.abs(fit.logLikelihood + jacobian - mle("loglik"))).toBeLessThan(1e-5);
  });

  it("has the published mean below a detection limit", () => {
    expect(meanBelowLimit(0.05, { mean: -2.5, sd: 0.7 })).toBeCloseTo(expected.number("E[C | C<DL]"), 10);
  });
});
