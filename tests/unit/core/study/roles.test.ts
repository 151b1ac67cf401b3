import { describe, expect, it } from "vitest";
import type { LocalTaxon } from "../../../../src/core/study/finds-result.ts";
import { assignRoles, type Boundary, markBelowCeiling } from "../../../../src/core/study/roles.ts";
import { defaultSettings } from "../../../../src/core/study/settings.ts";
import { sampleAt, searchOf, sectionWith } from "./sections.ts";

const taxon = (heightsM: readonly number[], more: Partial<LocalTaxon> = {}): LocalTaxon => ({
  section: "orskel-ledge",
  taxon: "Orvella tenuis",
  group: "ammonoids",
  heightsM,
  samples: heightsM.map(() => undefined),
  lastStrictM: heightsM[heightsM.length - 1],
  lastInclusiveM: heightsM[heightsM.length - 1],
  ...more,
});

const unmixed: Boundary = { positionM: 10, highM: 10.2, ceilingOf: () => undefined };
const mixed: Boundary = { positionM: 10, highM: 10.02, smearBaseM: 9.9, ceilingOf: () => 10.6 };

const roleOf = (t: LocalTaxon, boundary: Boundary | undefined) => {
  const input = { section: sectionWith({}), taxa: [t], settings: defaultSettings };
  return assignRoles(boundary === undefined ? input : { ...input, boundary }).candidates[0];
};

describe("roles against the main horizon", () => {
  it("the first rule that fits decides", () => {
    expect(roleOf(taxon([10.1, 11, 12]), unmixed).role).toBe("aftermath");
    expect(roleOf(taxon([2, 5, 11]), unmixed).role).toBe("survivor");
    expect(roleOf(taxon([2, 5, 10.1]), unmixed).role).toBe("candidate");
    expect(roleOf(taxon([2, 5]), unmixed).role).toBe("too-few");
    expect(roleOf(taxon([2, 5, 9]), unmixed).role).toBe("candidate");
  });

  it("a first find within the smear is carried down from the aftermath", () => {
    expect(roleOf(taxon([9.95, 10.5, 11]), mixed).role).toBe("aftermath");
    expect(roleOf(taxon([9.95, 10.5, 11]), unmixed).role).toBe("survivor");
  });

  it("only a strict find above the ceiling makes a survivor where mixing is accepted", () => {
    expect(roleOf(taxon([2, 5, 8, 10.5]), mixed).role).toBe("candidate");
    expect(roleOf(taxon([2, 5, 10.7]), mixed).role).toBe("survivor");
    expect(roleOf(taxon([2, 5, 8, 10.7], { lastStrictM: 8 }), mixed).role).toBe("candidate");
  });

  it("a candidate's finds above H within reach of mixing are taken out and marked", () => {
    const result = assignRoles({
      section: sectionWith({}),
      taxa: [taxon([2, 5, 8, 10.5])],
      boundary: mixed,
      settings: defaultSettings,
    });
    expect(result.taxa[0].heightsM).toEqual([2, 5, 8]);
    expect(result.candidates[0]).toMatchObject({
      role: "candidate",
      findsBelowCeiling: 1,
      lastM: 8,
      horizons: 3,
    });
    const finds = [5, 10.5].map((heightM, i) => ({
      origin: { file: "occurrences.csv", row: i + 2 },
      section: "orskel-ledge",
      verbatim: "Orvella tenuis",
      accepted: "Orvella tenuis",
      heightM,
      used: "yes" as const,
      reason: "used" as const,
    }));
    const marked = markBelowCeiling(finds, result.candidates, new Map([["orskel-ledge", mixed]]));
    expect(marked.map((f) => f.reason)).toEqual(["used", "below-reworking-ceiling"]);
  });

  it("without H every taxon with enough horizons is a candidate", () => {
    expect(roleOf(taxon([2, 5, 19]), undefined)).toMatchObject({
      role: "candidate",
      reason: { rule: "no-horizon-here" },
    });
    expect(roleOf(taxon([2]), undefined).role).toBe("too-few");
  });

  it("a highest find in the highest sample searched for its group reaches the top", () => {
    const samples = [sampleAt("S1", 1), sampleAt("S2", 2), sampleAt("S3", 3)];
    const searches = [
      searchOf(samples[0], "ammonoids"),
      searchOf(samples[1], "ammonoids"),
      searchOf(samples[2], "bivalves"),
    ];
    const section = sectionWith({ samples, searches });
    const at = (heights: number[]) =>
      assignRoles({ section, taxa: [taxon(heights)], settings: defaultSettings }).candidates[0].reachesTop;
    expect(at([0.5, 1, 2])).toBe(true);
    expect(at([0.5, 0.7, 1])).toBe(false);
  });

  it("no role reads how close below H a last find lies", () => {
    for (const last of [3, 6, 9, 9.999]) expect(roleOf(taxon([1, 2, last]), unmixed).role).toBe("candidate");
  });

  it("counts horizons after the smeared finds were taken out", () => {
    expect(roleOf(taxon([1, 5, 10.05]), mixed)).toMatchObject({
      role: "too-few",
      horizons: 2,
      findsBelowCeiling: 1,
    });
  });

  it("a find above the ceiling but inside H's interval is not smeared: it stays the end", () => {
    const low: Boundary = { ...mixed, highM: 10.03, ceilingOf: () => 9.95 };
    expect(roleOf(taxon([2, 5, 10.02]), low)).toMatchObject({
      role: "candidate",
      lastM: 10.02,
      findsBelowCeiling: 0,
    });
  });

  it("the inclusive end is the highest inclusive find that is not smeared", () => {
    const t = taxon([2, 5, 8, 10.5], { inclusiveHeightsM: [2, 5, 8, 9, 10.2, 10.5], lastInclusiveM: 10.5 });
    expect(roleOf(t, mixed).lastInclusiveM).toBe(9);
    expect(roleOf(taxon([2, 5, 8, 10.5]), mixed).lastInclusiveM).toBe(8);
  });

  it("tells the find that decided, never one that was set aside", () => {
    expect(roleOf(taxon([2, 5, 8, 10.5]), mixed).reason).toEqual({
      rule: "ends-in-question",
      value: 8,
      limit: 10.02,
    });
  });
});
