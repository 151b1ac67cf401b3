import { describe, expect, it } from "vitest";
import { uniformCoordinate } from "../../../../src/core/ranges/coordinate.ts";
import { defaultSettings } from "../../../../src/core/study/settings.ts";
import { effortCautions } from "../../../../src/core/timing/effort-caution.ts";
import type { SetCase } from "../../../../src/core/timing/set-case.ts";
import { sampleAt, searchOf, sectionWith } from "../study/sections.ts";

const taxon = {
  mode: "first" as const,
  baseM: 0,
  lastM: 10,
  horizons: 5,
  base: 0,
  last: 10,
  exponent: 4,
  taxon: "Orvella tenuis",
  group: "ammonoids",
  reachesTop: false,
  levels: [0, 2, 5, 8, 10],
};

const caseWith = (effortAbove: number, unitAbove = "g"): SetCase => {
  const heights = Array.from({ length: 16 }, (_, i) => i + 0.5);
  const searches = heights.map((height, i) => ({
    ...searchOf(sampleAt(`S${i}`, height), "ammonoids"),
    effort: height > 10 ? effortAbove : 100,
    effortUnit: height > 10 ? unitAbove : "g",
  }));
  return {
    section: sectionWith({ searches }),
    coordinate: uniformCoordinate,
    set: { section: "orskel-ledge", set: "candidates", taxa: [taxon.taxon], ranges: [taxon] },
    horizons: [],
    confidence: 0.95,
    durationHorizons: 10,
    settings: defaultSettings,
    originM: 0,
  };
};

describe("less effort above the highest last find", () => {
  it("is told with both efforts", () => {
    expect(effortCautions(caseWith(10))).toMatchObject([
      { code: "timing-less-effort-above", numbers: { group: "ammonoids", above: 10, below: 100, unit: "g" } },
    ]);
  });

  it("is not told where effort is alike, or counted in another unit", () => {
    expect(effortCautions(caseWith(80))).toEqual([]);
    expect(effortCautions(caseWith(10, "thin sections"))).toEqual([]);
  });
});
