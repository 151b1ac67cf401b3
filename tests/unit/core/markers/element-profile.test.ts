import { describe, expect, it } from "vitest";
import { densityOf, densityOfLithology } from "../../../../src/core/markers/densities.ts";
import { elementProfile } from "../../../../src/core/markers/element-profile.ts";
import { givenHorizons } from "../../../../src/core/markers/given-horizons.ts";
import { reworkingCeiling } from "../../../../src/core/markers/reworking.ts";
import { flaggedRuns } from "../../../../src/core/markers/runs.ts";
import { assumedSigma, fitErrorModel } from "../../../../src/core/markers/sigmas.ts";
import type { Measurement } from "../../../../src/core/study/model.ts";
import { handMadeSection, measurementsOf } from "./hand-made-section.ts";

const origin = { file: "beds.csv", row: 2 };
const profileOf = (measurements: readonly Measurement[]) =>
  elementProfile(handMadeSection({ measurements }), "iridium");

describe("an element's profile", () => {
  it("is ordered from below upward", () => {
    const { samples } = profileOf(
      measurementsOf("iridium", [
        { baseM: 2, topM: 2.1, value: 3 },
        { baseM: 1, topM: 1.1, value: 1 },
      ]),
    );
    expect(samples.map((s) => s.value)).toEqual([1, 3]);
  });

  it("takes the inverse-variance mean of replicates, its sigma floored by their scatter", () => {
    const slab = { baseM: 1, topM: 1.1 };
    const { samples } = profileOf(
      measurementsOf("iridium", [
        { ...slab, value: 2, sigma: 0.1 },
        { ...slab, value: 3, sigma: 0.2 },
      ]),
    );
    expect(samples).toHaveLength(1);
    expect(samples[0].value).toBeCloseTo(2.2, 12);
    expect(samples[0].sigma).toBeGreaterThan(0.3);
  });

  it("cautions about overlapping slabs and zeros", () => {
    const { samples, cautions } = profileOf(
      measurementsOf("iridium", [
        { baseM: 1, topM: 1.2, value: 2 },
        { baseM: 1.1, topM: 1.3, value: 3 },
        { baseM: 2, topM: 2.1, value: 0 },
        { baseM: 3, topM: 3.1, value: 0, detectionLimit: 0.02 },
      ]),
    );
    expect(cautions.map((c) => c.code)).toEqual(["zero-set-aside", "overlapping-slabs"]);
    expect(samples[2]).toMatchObject({ value: 0.02, censored: "left" });
  });

  it("assumes ten percent and a floor where no error is stated", () => {
    expect(assumedSigma(4, undefined, 0.03)).toBeCloseTo(Math.hypot(0.4, 0.0006), 12);
    expect(assumedSigma(4, 0.0329, 0.03)).toBeCloseTo(Math.hypot(0.4, 0.01), 12);
  });

  it("finds the two components of stated errors", () => {
    const values = [0.03, 0.2, 1, 4];
    const model = fitErrorModel(
      values,
      values.map((v) => Math.hypot(0.05 * v, 0.008)),
    );
    expect(model.relative).toBeCloseTo(0.05, 9);
    expect(model.floor).toBeCloseTo(0.008, 9);
  });
});

const cell = (flagged: boolean, p = 0.5) => ({ flagged, p, censored: "none" as const, value: 0.03 });

describe("density", () => {
  const [measurement] = measurementsOf("iridium", [{ baseM: 1, topM: 1.1, value: 1 }]);
  const sample = { name: "S-1", baseM: 1, topM: 1.1, heightM: 1.05, densityGCm3: 2.1, notes: "", origin };
  const bed = { baseM: 0, topM: 5, lithology: "Marly limestone", notes: "", origin };
  it("is the measurement's, else the sample's, else the section's, else its lithology's", () => {
    const section = handMadeSection({ samples: [sample], beds: [bed], densityGCm3: 2.4 });
    expect(densityOf({ ...measurement, densityGCm3: 2 }, section).value).toBe(2);
    expect(densityOf(measurement, section).value).toBe(2.1);
    expect(densityOf(measurement, { ...section, samples: [] }).value).toBe(2.4);
    const bare = { ...section, samples: [], densityGCm3: undefined };
    expect(densityOf(measurement, bare)).toEqual({ value: 2.55, sigma: 0.12, isAssumed: true });
  });
  it("reads the last word that names a rock", () => {
    expect(densityOfLithology("limy marl").value).toBe(2.3);
    expect(densityOfLithology("grey claystone").value).toBe(2.3);
    expect(densityOfLithology("boundary clay").value).toBe(1.9);
    expect(densityOfLithology("granite").sigma).toBe(0.25);
  });
});

describe("runs", () => {
  it("join adjacent flagged samples, and over one that is above background by itself", () => {
    const cells = [cell(true), cell(true), cell(false, 0.03), cell(true), cell(false), cell(true)];
    expect(flaggedRuns(cells, 0.06)).toEqual([
      { first: 0, last: 3 },
      { first: 5, last: 5 },
    ]);
  });
  it("join over a cell whose detection limit is too high to tell", () => {
    const hidden = { flagged: false, p: 1, censored: "left" as const, value: 0.5 };
    expect(flaggedRuns([cell(true), hidden, cell(true)], 0.06)).toEqual([{ first: 0, last: 2 }]);
  });
});

describe("given horizons", () => {
  const given = {
    name: "ash-1",
    kind: "ash" as const,
    heightM: 10,
    belowM: 0.1,
    aboveM: 0.2,
    notes: "",
    origin,
  };
  it("spread by the normal quantile, or over the whole half-widths", () => {
    const section = handMadeSection({
      horizons: [
        { ...given, shape: "normal" },
        { ...given, shape: "uniform" },
      ],
    });
    const [normal, uniform] = givenHorizons(section, 0.95);
    expect(normal.lowM).toBeCloseTo(10 - 0.196, 3);
    expect(normal.highM).toBeCloseTo(10 + 0.392, 3);
    expect([uniform.lowM, uniform.highM]).toEqual([9.9, 10.2]);
  });
});

describe("the reworking ceiling", () => {
  it("does not exist with fewer than two horizons up to the base of the smear", () => {
    expect(reworkingCeiling({ heightsM: [3, 12], baseM: 10, lengthM: 0.04 })).toEqual({
      kind: "no-ceiling",
      reason: "too-few",
    });
  });
  it("lies at or under the base for a rare taxon", () => {
    expect(reworkingCeiling({ heightsM: [0, 9], baseM: 10, lengthM: 0.04 })).toEqual({
      kind: "no-ceiling",
      reason: "below-base",
    });
  });
  it("counts horizons up to the base alone", () => {
    const common = { baseM: 0.944, lengthM: 0.036 };
    const heightsM = Array.from({ length: 61 }, (_, i) => 0.744 + i / 300);
    const ceiling = reworkingCeiling({ heightsM: [...heightsM, 1.2], ...common });
    expect(ceiling.kind === "ceiling" && ceiling.heightM).toBeCloseTo(1.1366, 4);
  });
});
