import { describe, expect, it } from "vitest";
import { integratedExcess } from "../../../../src/core/markers/fluence.ts";
import { boxSlabMean } from "../../../../src/core/markers/mixing.ts";
import { fitMixing } from "../../../../src/core/markers/mixing-fit.ts";
import type { ProfileInterval } from "../../../../src/core/markers/mixing-intervals.ts";
import {
  expectedAbove,
  highestFindQuantile,
  reworkingCeiling,
  reworkingP,
} from "../../../../src/core/markers/reworking.ts";
import { expectedValues } from "./expected-values.ts";
import rows from "./mixing.json" with { type: "json" };

/** The rows' source: own Python with numpy and scipy (make-mixing.py), its own optimiser. */
const expected = expectedValues(rows);
const inputsOf = rows.find((row) => row.case === "worked fit: data")?.inputs;
const column = (name: string) => expectedValues([{ case: "data", expected: inputsOf }]).numbers("data", name);
const data = { base_cm: column("base_cm"), top_cm: column("top_cm"), C_ng_g: column("C_ng_g") };
const cells = data.base_cm.map((baseCm, i) => ({
  baseCm,
  topCm: data.top_cm[i],
  value: data.C_ng_g[i],
  isCensored: false,
  sigma: Math.sqrt((0.05 * data.C_ng_g[i]) ** 2 + 0.008 ** 2),
  density: 2.1,
}));
const fit = fitMixing({
  cells,
  run: { first: 8, last: 18 },
  background: { median: 0.04, logSd: 0 },
  errors: { relative: 0.05, floor: 0.008 },
  level: 0.95,
});

const near = ({ low, high }: ProfileInterval, limits: readonly number[]) => {
  expect(Math.abs(low - limits[0])).toBeLessThan(0.002);
  expect(Math.abs(high - limits[1])).toBeLessThan(0.002);
};

describe("box mixing", () => {
  it("has the published point values", () => {
    const values = expected.numbers("box model point");
    [-0.01, 0, 0.5, 1, 2, 5].forEach((x, i) => {
      const point = { baseCm: 100 + 4 * x, topCm: 100 + 4 * x };
      expect((50 / 2) * boxSlabMean(point, { baseCm: 100, lengthCm: 4 })).toBeCloseTo(values[i], 9);
    });
  });

  it("has the published slab means, also of a thin slab far up the tail", () => {
    const mixing = { baseCm: 100, lengthCm: 4 };
    const mean = (baseCm: number, topCm: number) => 25 * boxSlabMean({ baseCm, topCm }, mixing);
    expect(mean(99, 101)).toBeCloseTo(expected.number("box model slab mean, slab"), 9);
    const thin = expected.number("box model slab mean, thin");
    expect(Math.abs(mean(140, 140.0001) / thin - 1)).toBeLessThan(1e-6);
  });

  it("leaves the published share above the event surface", () => {
    const above = boxSlabMean({ baseCm: 4, topCm: 4000 }, { baseCm: 0, lengthCm: 4 }) * 3996;
    expect(above).toBeCloseTo(expected.number("share of the spike"), 9);
  });
});

describe("the worked fit", () => {
  it("finds the published first-pass estimates", () => {
    expect(
      Math.abs(fit.m2.baseCm - expected.number("worked fit: box mixing ML, first pass", "hb")),
    ).toBeLessThan(0.02);
    expect(
      Math.abs(fit.m2.lengthCm - expected.number("worked fit: box mixing ML, first pass", "L")),
    ).toBeLessThan(0.02);
    expect(
      Math.abs(fit.m2.fluence / expected.number("worked fit: box mixing ML, first pass", "F") - 1),
    ).toBeLessThan(0.005);
    expect(
      Math.abs(fit.m2.background / expected.number("worked fit: box mixing ML, first pass", "bg") - 1),
    ).toBeLessThan(0.005);
    expect(fit.m2.logLikelihood).toBeCloseTo(
      expected.number("worked fit: box mixing ML, first pass", "loglik"),
      4,
    );
  });

  it("reports the published refitted estimates and profile intervals", () => {
    const start = "worked fit: box mixing ML, reported";
    const { reported } = fit;
    expect(Math.abs(reported.baseCm - expected.number(start, "hb"))).toBeLessThan(0.002);
    expect(Math.abs(reported.lengthCm - expected.number(start, "L"))).toBeLessThan(0.002);
    expect(Math.abs(reported.baseCm + reported.lengthCm - expected.number(start, "h0"))).toBeLessThan(0.002);
    expect(Math.abs(reported.fluence / expected.number(start, "F") - 1)).toBeLessThan(0.005);
    near(fit.length, expected.numbers(start, "L_95"));
    near(fit.base, expected.numbers(start, "hb_95"));
    near(fit.surface, expected.numbers(start, "h0_95"));
    near(fit.surface68, expected.numbers(start, "h0_68"));
    expect(fit.accepted).toBe("M2");
    expect(fit.inflation).toBe(1);
  });

  it("has the published likelihoods and AICc of M0, M1 and M2", () => {
    const pairs = [
      [fit.m0, "M0 background only"],
      [fit.m1, "M1 thin layer, no mixing"],
      [fit.m2, "M2 box mixing"],
    ] as const;
    for (const [model, name] of pairs) {
      const start = "worked fit: log-likelihoods";
      expect(model.parameters).toBe(expected.number(start, name, "k"));
      expect(Math.abs((model.aicc ?? 0) - expected.number(start, name, "AICc"))).toBeLessThan(0.05);
    }
  });

  it("finds the published thin-layer sample", () => {
    expect(fit.m1.at).toBe(expected.number("worked fit: thin layer", "index0"));
    expect(fit.m1.fluence).toBeCloseTo(expected.number("worked fit: thin layer", "F"), 5);
    expect(fit.m1.background).toBeCloseTo(expected.number("worked fit: thin layer", "bg"), 7);
  });

  it("agrees with the model-free slab sum", () => {
    const plain = cells.map((cell) => ({
      ...cell,
      densitySigma: 0,
      densityCommonSigma: 0,
      boundarySigmaCm: 0,
    }));
    const background = { mean: 0.04080254934838356, sigma: 0 };
    const { value } = integratedExcess({ cells: plain, background, calibration: 0 });
    expect(Math.abs(value / expected.number("worked fit: slab-sum", "F") - 1)).toBeLessThan(1e-6);
  });
});

describe("reworking of fossils (cm as the length unit)", () => {
  const smear = { baseM: 94.4, lengthM: 3.6, densityPerM: 3 };
  it("has the published highest finds", () => {
    expect(highestFindQuantile(0.5, smear)).toBeCloseTo(
      expected.number("highest find of a taxon", "median_cm"),
      6,
    );
    expect(highestFindQuantile(0.95, smear)).toBeCloseTo(
      expected.number("highest find of a taxon", "q95_cm"),
      6,
    );
    expect(expectedAbove({ ...smear, heightM: 98 })).toBeCloseTo(
      expected.number("highest find of a taxon", "expected_above_h0"),
      6,
    );
  });

  it("has the published p of highest finds above the event surface", () => {
    const values = expected.numbers("P(highest find");
    [5, 10, 20].forEach((d, i) =>
      expect(reworkingP({ ...smear, heightM: 98 + d })).toBeCloseTo(values[i], 9),
    );
  });

  it("has the published ceilings, none where almost nothing is expected", () => {
    const values = expected.numbers("95% reworking ceiling");
    [0.1, 1, 10, 100].forEach((rate, i) => {
      const ceiling = reworkingCeiling({ heightsM: [-1 / rate, 0], baseM: 0, lengthM: 1 });
      if (ceiling.kind === "ceiling") expect(Math.max(0, ceiling.heightM - 1)).toBeCloseTo(values[i], 6);
      else expect(values[i]).toBe(0);
    });
  });
});
