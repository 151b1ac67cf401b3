import { describe, expect, it } from "vitest";
import { alignSections } from "../../../../src/core/alignment/align-sections.ts";
import { toCommon } from "../../../../src/core/alignment/flatten.ts";
import type { MarkerHorizon, Markers } from "../../../../src/core/markers/result.ts";
import type { Study } from "../../../../src/core/study/model.ts";
import { defaultSettings, type Settings } from "../../../../src/core/study/settings.ts";
import { sectionWith, studyOf } from "../study/sections.ts";

const horizonAt = (section: string, horizon: string, positionM: number): MarkerHorizon => ({
  section,
  name: horizon,
  horizon,
  kind: horizon === "impact" ? "impact" : "ash",
  refersTo: "level",
  source: "given",
  evidence: "",
  positionM,
  lowM: positionM - 0.1,
  highM: positionM + 0.1,
  level: 0.95,
  shape: "normal",
  sigmaM: 0.05,
  outcome: "closed",
  note: "",
});

const markersOf = (horizons: readonly MarkerHorizon[], isShared = true): Markers => ({
  horizons,
  profiles: [],
  flags: [],
  main: {
    name: "impact",
    settledBy: "setting",
    isShared,
    bySection: new Map(horizons.filter((h) => h.horizon === "impact").map((h) => [h.section, h])),
  },
  cautions: [],
  basis: [],
});

const studyWith = (names: readonly string[], alignment: Partial<Settings["alignment"]> = {}): Study => ({
  ...studyOf(sectionWith({}), {
    settings: { ...defaultSettings, alignment: { ...defaultSettings.alignment, ...alignment } },
  }),
  sections: names.map((name) => sectionWith({ name, title: name })),
});

describe("lining sections up", () => {
  it("hangs every section on the main horizon, at 0", () => {
    const markers = markersOf([horizonAt("a", "impact", 12), horizonAt("b", "impact", -40)]);
    const { sections, datum } = alignSections(studyWith(["a", "b"]), markers);
    expect(datum).toBe("impact");
    expect(sections.map((s) => toCommon(s, s.heightsM[0] + 2, { beyond: "rigid" }).common)).toEqual([2, 2]);
  });

  it("names a section that lacks the horizon and leaves it out", () => {
    const result = alignSections(studyWith(["a", "b"]), markersOf([horizonAt("a", "impact", 12)]));
    expect(result.sections.map((s) => s.section)).toEqual(["a"]);
    expect(result.cautions).toMatchObject([{ code: "section-without-datum", section: "b" }]);
  });

  it("waits while the horizon is not shared", () => {
    const markers = markersOf([horizonAt("a", "impact", 12), horizonAt("b", "impact", 9)], false);
    expect(alignSections(studyWith(["a", "b"]), markers)).toMatchObject({
      sections: [],
      cautions: [{ code: "datum-not-shared" }],
    });
  });

  it("stretches between two shared horizons to their mean thickness", () => {
    const markers = markersOf([
      horizonAt("a", "ash", 10),
      horizonAt("a", "impact", 12),
      horizonAt("b", "ash", 0),
      horizonAt("b", "impact", 4),
    ]);
    const { sections, ties } = alignSections(studyWith(["a", "b"], { horizons: ["ash"] }), markers);
    expect(sections.map((s) => s.targets)).toEqual([
      [-3, 0],
      [-3, 0],
    ]);
    expect(ties.find((tie) => tie.section === "b" && tie.horizon === "ash")?.residual).toBeCloseTo(-1, 12);
  });

  it("takes the thicknesses of a named reference section", () => {
    const markers = markersOf([
      horizonAt("a", "ash", 10),
      horizonAt("a", "impact", 12),
      horizonAt("b", "ash", 0),
      horizonAt("b", "impact", 4),
    ]);
    const { sections } = alignSections(studyWith(["a", "b"], { horizons: ["ash"], reference: "b" }), markers);
    expect(sections[0].targets).toEqual([-4, 0]);
  });

  it("refuses horizons that cross, naming both sections and both horizons", () => {
    const markers = markersOf([
      horizonAt("a", "ash", 10),
      horizonAt("a", "impact", 12),
      horizonAt("b", "ash", 9),
      horizonAt("b", "impact", 4),
    ]);
    const { sections, cautions } = alignSections(studyWith(["a", "b"], { horizons: ["ash"] }), markers);
    expect(sections).toEqual([]);
    expect(cautions).toEqual([
      { code: "horizons-cross", section: "b", numbers: { lower: "impact", upper: "ash", other: "a" } },
    ]);
  });

  it("a height at two horizons without rock between them maps to the gap, not to a point", () => {
    const markers = markersOf([
      horizonAt("a", "ash", 10),
      horizonAt("a", "impact", 12),
      horizonAt("b", "ash", 4),
      horizonAt("b", "impact", 4),
    ]);
    const { sections } = alignSections(studyWith(["a", "b"], { horizons: ["ash"] }), markers);
    const b = sections[1];
    const at = toCommon(b, 4, { beyond: "rigid" });
    expect([at.common, at.commonHigh]).toEqual([b.targets[0], b.targets[1]]);
    expect(toCommon(b, 5, { beyond: "rigid" }).common).toBe(b.targets[1] + 1);
    expect(toCommon(b, 3, { beyond: "rigid" }).common).toBe(b.targets[0] - 1);
  });
});
