import { describe, expect, it } from "vitest";
import { findMarkers } from "../../../../src/core/markers/find-markers.ts";
import type { MarkerHorizon } from "../../../../src/core/markers/result.ts";
import type { Section } from "../../../../src/core/study/model.ts";
import { type HandMadeSample, handMadeSection, handMadeStudy, measurementsOf } from "./hand-made-section.ts";

const background = [
  0.031, 0.027, 0.036, 0.024, 0.041, 0.029, 0.033, 0.022, 0.038, 0.03, 0.026, 0.034, 0.028, 0.044, 0.025,
];

/** Slabs of 1 cm from 10.00 m with the given values, between two stretches of background. */
function sectionWith(values: readonly number[], part: Partial<Section> = {}): Section {
  const below = background.map((value, i) => ({ baseM: 5 + 0.3 * i, topM: 5.05 + 0.3 * i, value }));
  const thickness = 0.01;
  const peak = values.map((value, i) => ({
    baseM: 10 + thickness * i,
    topM: 10 + thickness * (i + 1),
    value,
  }));
  const above = background.map((value, i) => ({ baseM: 11 + 0.3 * i, topM: 11.05 + 0.3 * i, value }));
  const samples: readonly HandMadeSample[] = [...below, ...peak, ...above].map((sample) => ({
    ...sample,
    sigma: Math.hypot(0.06 * sample.value, 0.003),
  }));
  return handMadeSection({ measurements: measurementsOf("iridium", samples), ...part });
}

/** A box smear of 4 cm from 10.03 m: event surface at 10.07 m. */
const smear = Array.from({ length: 30 }, (_, i) =>
  i < 3 ? background[i] : background[i % 15] + 4 * Math.exp(-(i - 2.5) / 4),
);
/** The same, cut off at 10.08 m. */
const cutOff = smear.map((value, i) => (i >= 3 && i < 8 ? value : background[i % background.length]));
const thin = Array.from({ length: 12 }, (_, i) => (i === 5 ? 6 : background[i]));

const found = (section: Section): MarkerHorizon => {
  const horizons = findMarkers(handMadeStudy([section])).horizons.filter((h) => h.source === "found");
  expect(horizons).toHaveLength(1);
  return horizons[0];
};

describe("a found iridium horizon", () => {
  it("of a mixed layer is the event surface, with mixing and fluence", () => {
    const horizon = found(sectionWith(smear));
    expect(horizon).toMatchObject({ name: "iridium-1", refersTo: "event-surface", outcome: "closed" });
    expect(horizon.lowM).toBeLessThan(10.07);
    expect(horizon.highM).toBeGreaterThan(10.07);
    expect(horizon.highM - horizon.lowM).toBeLessThan(0.01);
    expect(horizon.mixing?.lengthM).toBeCloseTo(0.04, 2);
    expect(horizon.mixing?.baseM).toBeCloseTo(10.03, 2);
    expect(horizon.fluence?.value).toBeCloseTo(4 * 4 * 2.2, -0.5);
  });

  it("of a thin layer covers its sample and says level", () => {
    const horizon = found(sectionWith(thin));
    expect(horizon.refersTo).toBe("level");
    expect(horizon.lowM).toBeLessThanOrEqual(10.05);
    expect(horizon.highM).toBeGreaterThanOrEqual(10.06);
    expect(horizon.highM - horizon.lowM).toBeLessThan(0.03);
    expect(horizon.mixing).toBeUndefined();
  });

  it("cut off by a hiatus still covers the event, the misfit said", () => {
    const section = sectionWith(cutOff);
    const horizon = found(section);
    expect(horizon.lowM).toBeLessThanOrEqual(10.07);
    expect(horizon.highM).toBeGreaterThanOrEqual(10.07);
    const { cautions } = findMarkers(handMadeStudy([section]));
    expect(cautions.map((c) => c.code)).toContain("mixing-misfit");
  });

  it("below an unsampled gap may lie in the gap too, and stays finite", () => {
    const section = sectionWith([]);
    const slab = { baseM: 9.9, topM: 9.95, value: 3, sigma: 0.2 };
    const measurements = [...section.measurements, ...measurementsOf("iridium", [slab])];
    const horizon = found({ ...section, measurements });
    expect(horizon.lowM).toBeLessThanOrEqual(9.9);
    expect(horizon.highM).toBeGreaterThan(9.96);
    expect(horizon.highM).toBeLessThan(13);
  });

  it("is absent from plain background", () => {
    const { horizons, main, cautions } = findMarkers(handMadeStudy([sectionWith(background)]));
    expect(horizons).toEqual([]);
    expect(main.settledBy).toBe("none");
    expect(cautions.map((c) => c.code)).toContain("no-main-horizon");
  });

  it("is not looked for where most of the background lies below detection", () => {
    const section = sectionWith(thin);
    const measurements = section.measurements.map((m) =>
      m.reading.kind === "value" && m.reading.value < 0.044
        ? { ...m, reading: { kind: "below" as const, limit: 0.05 } }
        : m,
    );
    const { horizons, flags } = findMarkers(handMadeStudy([{ ...section, measurements }]));
    expect(horizons).toEqual([]);
    expect(flags.map((f) => f.flag)).toContain("CENSORED_HEAVY");
  });

  it("is refused with fewer than five samples, and said so", () => {
    const section = sectionWith(thin);
    const short = { ...section, measurements: section.measurements.slice(0, 4) };
    const { cautions, profiles } = findMarkers(handMadeStudy([short]));
    expect(profiles).toEqual([]);
    expect(cautions.map((c) => c.code)).toContain("profile-too-short");
  });

  it("comes from iridium alone; other elements get profiles", () => {
    const section = sectionWith(thin);
    const nickel = section.measurements.map((m) => ({ ...m, analyte: "nickel" }));
    const { horizons, profiles } = findMarkers(
      handMadeStudy([{ ...section, measurements: [...section.measurements, ...nickel] }]),
    );
    expect(horizons.map((h) => h.name)).toEqual(["iridium-1"]);
    expect(profiles.map((p) => p.analyte)).toEqual(["iridium", "nickel"]);
    expect(profiles[1].anomalies[0].name).toBe("nickel-1");
  });
});

const flagsOf = (section: Section) => findMarkers(handMadeStudy([section])).flags.map((f) => f.flag);

const width = ({ fluence }: MarkerHorizon) =>
  fluence === undefined ? 0 : (fluence.high - fluence.low) / fluence.value;

describe("flags", () => {
  const origin = { file: "beds.csv", row: 2 };
  const bed = (baseM: number, topM: number, part: object) => ({
    baseM,
    topM,
    lithology: "marl",
    notes: "",
    origin,
    ...part,
  });

  it("name the single sample, the unresolved mixing and the coarse sampling of a thin layer", () => {
    const flags = flagsOf(sectionWith(thin));
    expect(flags).toEqual(expect.arrayContaining(["SINGLE_SAMPLE", "MIXING_UNRESOLVED", "COARSE_SAMPLING"]));
  });

  it("name an erosive contact inside the interval and the missing tail above burrowed rock", () => {
    const beds = [
      bed(0, 10.055, { bioturbation: 4 }),
      bed(10.055, 20, { baseContact: "erosive", bioturbation: 4 }),
    ];
    const flags = flagsOf(sectionWith(thin, { beds }));
    expect(flags).toEqual(expect.arrayContaining(["BASE_EROSIVE", "NO_TAIL"]));
  });

  it("name assumed densities, and widen the fluence for them", () => {
    const beds = [bed(0, 20, { lithology: "soft clay" })];
    const stated = found(sectionWith(smear));
    const section = { ...sectionWith(smear, { beds }), densityGCm3: undefined };
    const assumed = found(section);
    expect(flagsOf(section)).toContain("ASSUMED_DENSITY");
    expect(width(assumed)).toBeGreaterThan(2 * width(stated));
  });

  it("name two peaks", () => {
    const double = smear.map((value, i) => value + (i >= 14 && i < 16 ? 3 : 0));
    expect(flagsOf(sectionWith(double))).toContain("MULTIPLE_PEAKS");
  });

  it("are silent on a finely sampled mixed layer of stated density", () => {
    expect(flagsOf(sectionWith(smear))).toEqual([]);
  });
});
