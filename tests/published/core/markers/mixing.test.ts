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
import rows from "./mixing.json" with { type: "json" };

/** The rows' source: own Python with numpy and scipy (make-mixing.py), its own optimiser. */
function rowOf(start: string) {
  const row = rows.find((r) => r.case.startsWith(start));
  if (row === undefined) throw new Error(`no row ${start}`);
  return row;
}
const expectedOf = (start: string) => rowOf(start).expected as unknown as Record<string, number>;

interface Worked {
  readonly base_cm: readonly number[];
  readonly top_cm: readonly number[];
  readonly C_ng_g: readonly number[];
}
const data = rowOf("worked fit: data").inputs as unknown as Worked;
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

describe("box mixing", () => {
  it("has the published point values", () => {
    const expected = rowOf("box model point").expected as unknown as number[];
    [-0.01, 0, 0.5, 1, 2, 5].forEach((x, i) => {
      const point = { baseCm: 100 + 4 * x, topCm: 100 + 4 * x };
      expect((50 / 2) * boxSlabMean(point, { baseCm: 100, lengthCm: 4 })).toBeCloseTo(expected[i], 9);
    });
  });

  it("has the published slab means, also of a thin slab far up the tail", () => {
    const mixing = { baseCm: 100, lengthCm: 4 };
    const mean = (baseCm: number, topCm: number) => 25 * boxSlabMean({ baseCm, topCm }, mixing);
    expect(mean(99, 101)).toBeCloseTo(Number(rowOf("box model slab mean, slab").expected), 9);
    const thin = Number(rowOf("box model slab mean, thin").expected);
    expect(Math.abs(mean(140, 140.0001) / thin - 1)).toBeLessThan(1e-6);
  });

  it("leaves the published share above the event surface", () => {
    const above = boxSlabMean({ baseCm: 4, topCm: 4000 }, { baseCm: 0, lengthCm: 4 }) * 3996;
    expect(above).toBeCloseTo(Number(rowOf("share of the spike").expected), 9);
  });
});

describe("the worked fit", () => {
  it("finds the published first-pass estimates", () => {
    const expected = expectedOf("worked fit: box mixing ML, first pass");
    expect(Math.abs(fit.m2.baseCm - expected.hb)).toBeLessThan(0.02);
    expect(Math.abs(fit.m2.lengthCm - expected.L)).toBeLessThan(0.02);
    expect(Math.abs(fit.m2.fluence / expected.F - 1)).toBeLessThan(0.005);
    expect(Math.abs(fit.m2.background / expected.bg - 1)).toBeLessThan(0.005);
    expect(fit.m2.logLikelihood).toBeCloseTo(expected.loglik, 4);
  });

  it("reports the published refitted estimates and profile intervals", () => {
    const expected = rowOf("worked fit: box mixing ML, reported").expected as unknown as Record<
      string,
      number & readonly number[]
    >;
    const { reported } = fit;
    expect(Math.abs(reported.baseCm - expected.hb)).toBeLessThan(0.002);
    expect(Math.abs(reported.lengthCm - expected.L)).toBeLessThan(0.002);
    expect(Math.abs(reported.baseCm + reported.lengthCm - expected.h0)).toBeLessThan(0.002);
    expect(Math.abs(reported.fluence / expected.F - 1)).toBeLessThan(0.005);
    const near = ({ low, high }: ProfileInterval, limits: readonly number[]) => {
      expect(Math.abs(low - limits[0])).toBeLessThan(0.002);
      expect(Math.abs(high - limits[1])).toBeLessThan(0.002);
    };
    near(fit.length, expected.L_95);
    near(fit.base, expected.hb_95);
    near(fit.surface, expected.h0_95);
    near(fit.surface68, expected.h0_68);
    expect(fit.accepted).toBe("M2");
    expect(fit.inflation).toBe(1);
  });

  it("has the published likelihoods and AICc of M0, M1 and M2", () => {
    const expected = rowOf("worked fit: log-likelihoods").expected as unknown as Record<
      string,
      { AICc: number; k: number }
    >;
    const pairs = [
      [fit.m0, expected["M0 background only"]],
      [fit.m1, expected["M1 thin layer, no mixing"]],
      [fit.m2, expected["M2 box mixing"]],
    ] as const;
    for (const [model, reference] of pairs) {
      expect(model.parameters).toBe(reference.k);
      expect(Math.abs((model.aicc ?? 0) - reference.AICc)).toBeLessThan(0.05);
    }
  });

  it("finds the published thin-layer sample", () => {
    const expected = expectedOf("worked fit: thin layer");
    expect(fit.m1.at).toBe(expected.index0);
    expect(fit.m1.fluence).toBeCloseTo(expected.F, 5);
    expect(fit.m1.background).toBeCloseTo(expected.bg, 7);
  });

  it("agrees with the model-free slab sum", () => {
    const expected = expectedOf("worked fit: slab-sum");
    const plain = cells.map((cell) => ({
      ...cell,
      densitySigma: 0,
      densityCommonSigma: 0,
      boundarySigmaCm: 0,
    }));
    const background = { mean: 0.04080254934838356, sigma: 0 };
    const { value } = integratedExcess({ cells: plain, background, calibration: 0 });
    expect(Math.abs(value / expected.F - 1)).toBeLessThan(1e-6);
  });
});

describe("reworking of fossils (cm as the length unit)", () => {
  const smear = { baseM: 94.4, lengthM: 3.6, densityPerM: 3 };
  it("has the published highest finds", () => {
    const expected = expectedOf("highest find of a taxon");
    expect(highestFindQuantile(0.5, smear)).toBeCloseTo(expected.median_cm, 6);
    expect(highestFindQuantile(0.95, smear)).toBeCloseTo(expected.q95_cm, 6);
    expect(expectedAbove({ ...smear, heightM: 98 })).toBeCloseTo(expected.expected_above_h0, 6);
  });

  it("has the published p of highest finds above the event surface", () => {
    const expected = rowOf("P(highest find").expected as unknown as number[];
    [5, 10, 20].forEach((d, i) =>
      expect(reworkingP({ ...smear, heightM: 98 + d })).toBeCloseTo(expected[i], 9),
    );
  });

  it("has the published ceilings, none where almost nothing is expected", () => {
    const expected = rowOf("95% reworking ceiling").expected as unknown as number[];
    [0.1, 1, 10, 100].forEach((rate, i) => {
      const ceiling = reworkingCeiling({ heightsM: [-1 / rate, 0], baseM: 0, lengthM: 1 });
      if (ceiling.kind === "ceiling") expect(Math.max(0, ceiling.heightM - 1)).toBeCloseTo(expected[i], 6);
      else expect(expected[i]).toBe(0);
    });
  });
});
