import { describe, expect, it } from "vitest";
import { type FluenceCell, integratedExcess, tailAbove } from "../../../../src/core/markers/fluence.ts";
import { simulateFluence } from "../../../../src/core/markers/fluence-simulation.ts";
import { expectedValues } from "./expected-values.ts";
import rows from "./fluence.json" with { type: "json" };

/** The rows' source: own Python with numpy (make-fluence.py). */
const expected = expectedValues(rows);

const errors = { sigma: 0, densitySigma: 0, densityCommonSigma: 0, boundarySigmaCm: 0 };
const base = [0, 2, 4, 5, 6, 7, 8, 10, 13, 17];
const top = [2, 4, 5, 6, 7, 8, 10, 13, 17, 22];
const concentration = [0.03, 0.04, 0.35, 4.2, 2.6, 1.55, 0.88, 0.36, 0.11, 0.05];
const density = [2.35, 2.35, 2.3, 2.05, 2.05, 2.1, 2.15, 2.2, 2.3, 2.35];
const channel = {
  cells: base.map(
    (baseCm, i): FluenceCell => ({
      baseCm,
      topCm: top[i],
      value: concentration[i],
      sigma: Math.sqrt((0.05 * concentration[i]) ** 2 + 0.005 ** 2),
      density: density[i],
      densitySigma: 0.1,
      densityCommonSigma: 0.05,
      boundarySigmaCm: 0.1,
    }),
  ),
  background: { mean: 0.035, sigma: 0.008 },
  calibration: 0.03,
};
const exact = (mean: number) => ({ background: { mean, sigma: 0 }, calibration: 0 });

describe("fluence", () => {
  it("sums the worked channel samples", () => {
    expect(integratedExcess(channel).value).toBeCloseTo(expected.number("slab sum"), 9);
  });

  it("has the published variance terms", () => {
    const { variance, sigma } = integratedExcess(channel);
    expect(variance.analytic).toBeCloseTo(expected.number("variance terms", "analytic"), 9);
    expect(variance.background).toBeCloseTo(expected.number("variance terms", "background"), 9);
    expect(variance.densityIndependent).toBeCloseTo(expected.number("variance terms", "rho_independent"), 9);
    expect(variance.densityCommon).toBeCloseTo(expected.number("variance terms", "rho_common"), 9);
    expect(variance.calibration).toBeCloseTo(expected.number("variance terms", "calibration"), 9);
    expect(variance.boundaries).toBeCloseTo(expected.number("variance terms", "boundaries"), 8);
    expect(sigma).toBeCloseTo(expected.number("variance terms", "total_sd"), 8);
  });

  it("simulates the published distribution", () => {
    const got = simulateFluence(channel, { replicates: 20000, seed: 1, level: 0.95 });
    const pairs = [
      [got.mean, expected.number("Monte Carlo", "mean")],
      [got.sd, expected.number("Monte Carlo", "sd")],
      [got.low, expected.number("Monte Carlo", "q025")],
      [got.low68, expected.number("Monte Carlo", "q16")],
      [got.median, expected.number("Monte Carlo", "q50")],
      [got.high68, expected.number("Monte Carlo", "q84")],
      [got.high95, expected.number("Monte Carlo", "q975")],
    ];
    for (const [value, reference] of pairs) expect(Math.abs(value - reference)).toBeLessThan(0.15);
  });

  it("integrates point samples by the trapezoid rule", () => {
    const heights = [0, 3, 5, 6, 7, 9, 12, 16];
    const values = [0.03, 0.05, 3.8, 2.9, 1.7, 0.8, 0.2, 0.04];
    const cells = heights.map((h, i) => ({ ...errors, baseCm: h, topCm: h, value: values[i], density: 2.2 }));
    const got = integratedExcess({ cells, ...exact(0.035) });
    expect(got.value).toBeCloseTo(expected.number("point samples, trapezoid"), 9);
    expect(got.zeroFill).toBeCloseTo(got.value, 9);
    expect(got.coverage).toBe(1);
  });

  it("fills a gap in three ways", () => {
    const edges = [
      [0, 1, 2],
      [1, 2, 1],
      [3, 4, 0.4],
    ];
    const cells = edges.map(([baseCm, topCm, value]) => ({ ...errors, baseCm, topCm, value, density: 2 }));
    const got = integratedExcess({ cells, ...exact(0) });
    expect(got.zeroFill).toBeCloseTo(expected.number("gap 2-3 cm", "zero"), 9);
    expect(got.value).toBeCloseTo(expected.number("gap 2-3 cm", "linear"), 9);
    expect(got.nearestFill).toBeCloseTo(expected.number("gap 2-3 cm", "nearest"), 9);
    expect(got.coverage).toBeCloseTo(expected.number("gap 2-3 cm", "coverage"), 9);
  });

  it("bounds a slab below detection", () => {
    const cell = { ...errors, baseCm: 0, topCm: 5, value: 0.03, limit: 0.05, density: 2 };
    const got = integratedExcess({ cells: [cell], ...exact(0.02) });
    expect(got.lowCensored).toBeCloseTo(expected.number("censored slab bounds", "lo"), 9);
    expect(got.highCensored).toBeCloseTo(expected.number("censored slab bounds", "hi"), 9);
  });

  it("has the published tail and unit", () => {
    expect(tailAbove(0.2, 4, 2)).toBeCloseTo(expected.number("tail beyond"), 12);
    const cell = { ...errors, baseCm: 0, topCm: 1.5, value: 5, density: 2.2 };
    expect(integratedExcess({ cells: [cell], ...exact(0) }).value).toBeCloseTo(
      expected.number("excess 5 ng/g"),
      12,
    );
  });
});
