import { describe, expect, it } from "vitest";
import { estimateRanges } from "../../../../src/core/ranges/range-ends.ts";
import type { RangeMethod } from "../../../../src/core/ranges/result.ts";
import type { LocalTaxon } from "../../../../src/core/study/finds-result.ts";
import type { Section } from "../../../../src/core/study/model.ts";
import type { Settings } from "../../../../src/core/study/settings.ts";
import { candidate, covered, horizon, markers, section, study, taxon } from "./small-study.ts";

interface Setup {
  readonly place?: Section;
  readonly main?: ReturnType<typeof horizon>;
  readonly reachesTop?: boolean;
  readonly settings?: (s: Settings) => Settings;
}

function rangesOf(of: LocalTaxon, { place = section(), main, reachesTop = false, settings }: Setup = {}) {
  const ranges = estimateRanges(study([place], settings), {
    taxa: [of],
    candidates: [candidate(of, "candidate", reachesTop)],
    markers: markers(main),
  });
  const row = (method: RangeMethod, identification = "strict") => {
    const found = ranges.ends.find((e) => e.method === method && e.identification === identification);
    if (found === undefined) throw new Error(`no row of ${method}`);
    return found;
  };
  return { ranges, row, codes: ranges.cautions.map((c) => c.code) };
}

const fiveFinds = taxon("Orbula vesta", [2, 5, 9, 13, 18]);
const withBase = (base: string) => (s: Settings) => ({ ...s, ranges: { ...s.ranges, base } });

const half = (s: Settings) => ({ ...s, confidence: 0.5 });

describe("uniform", () => {
  it("extends the observed range from the first find", () => {
    const row = rangesOf(fiveFinds).row("uniform");
    expect(row).toMatchObject({ outcome: "closed", exponent: 4, horizons: 5, lowM: 18, pointM: 22 });
    expect(row.highM).toBeCloseTo(18 + 16 * (0.05 ** (-1 / 4) - 1), 10);
  });

  it("uses all finds where the base is the section's bottom", () => {
    const row = rangesOf(fiveFinds, { settings: withBase("section-bottom") }).row("uniform");
    expect(row.exponent).toBe(5);
    expect(row.highM).toBeCloseTo(18 * 0.05 ** (-1 / 5), 10);
  });

  it("keeps the first find of a taxon found below the base horizon, and says so", () => {
    const { row, codes } = rangesOf(fiveFinds, { main: horizon(7), settings: withBase("impact") });
    expect(row("uniform").exponent).toBe(4);
    expect(codes).toContain("range-base-above-finds");
  });

  it("says that a base horizon is not placed here", () => {
    const { row, codes } = rangesOf(fiveFinds, { settings: withBase("nowhere") });
    expect(row("uniform").exponent).toBe(4);
    expect(codes).toContain("range-base-not-placed");
  });

  it("is undefined for one find with unknown base, defined with a known one", () => {
    const single = taxon("Orbula una", [10]);
    expect(rangesOf(single).row("uniform").outcome).toBe("undefined");
    expect(rangesOf(single).row("uniform").highM).toBeUndefined();
    const known = rangesOf(single, { settings: withBase("section-bottom") }).row("uniform");
    expect(known).toMatchObject({ outcome: "leaves-section", exponent: 1 });
    expect(known.highM).toBeCloseTo(200, 9);
  });

  it("keeps the number above the section's top, with the outcome that it leaves the section", () => {
    const { row, codes } = rangesOf(taxon("Orbula rara", [10, 30]));
    expect(row("uniform")).toMatchObject({ outcome: "leaves-section" });
    expect(row("uniform").highM).toBeCloseTo(30 + 19 * 20, 9);
    expect(row("uniform").note).toMatch(/370 m above the section's top, reached at level 0.3333/);
    expect(codes).toContain("range-bound-above-section");
  });

  it("gives no upper end to a taxon found in the highest sample", () => {
    const row = rangesOf(taxon("Orbula alta", [10, 25, 40]), { reachesTop: true }).row("uniform");
    expect(row.outcome).toBe("leaves-section");
    expect(row.highM).toBeUndefined();
  });

  it("passes over covered rock, and ends at its top where the bound falls into it", () => {
    const place = section({ intervals: [covered(20, 23)] });
    const row = rangesOf(taxon("Orbula cava", [0, 10]), { place, settings: half }).row("uniform");
    expect(row).toMatchObject({ highM: 23, outcome: "in-hiatus" });
    expect(row.note).toMatch(/^bound falls in a gap from 20 m to 23 m/);
  });

  it("tells the level at which it reaches the main horizon", () => {
    const row = rangesOf(fiveFinds, { main: horizon(34) }).row("uniform");
    expect(row).toMatchObject({ horizon: "impact" });
    expect(row.reachLevel).toBeCloseTo(1 - 0.5 ** 4, 12);
    expect(rangesOf(fiveFinds, { main: horizon(17) }).row("uniform").reachLevel).toBeUndefined();
  });

  it("adds a row for the inclusive reading where it reaches higher", () => {
    const row = rangesOf({ ...fiveFinds, lastInclusiveM: 20 }).row("uniform", "inclusive");
    expect(row).toMatchObject({ lastM: 20, exponent: 5, identification: "inclusive" });
  });

  it("works for a published range without its finds", () => {
    const published = taxon("Orbula citata", [2, 18], {
      publishedHorizons: 11,
      samples: [undefined, undefined],
    });
    const { row, codes } = rangesOf(published);
    expect(row("uniform")).toMatchObject({ exponent: 10, horizons: 11, outcome: "closed" });
    expect(row("sampled").outcome).toBe("undefined");
    expect(codes).toContain("range-published-only");
  });
});

describe("window", () => {
  it("asks at the main horizon where it lies above the last find", () => {
    const row = rangesOf(fiveFinds, { main: horizon(34) }).row("window");
    expect(row.p).toBeCloseTo(0.5 ** 4, 12);
    expect(row.evidenceRatio).toBeCloseTo(3 / (2 ** 3 - 1), 12);
  });

  it("asks at the highest level searched where there is none, and never above what was searched", () => {
    expect(rangesOf(fiveFinds).row("window").p).toBeCloseTo((16 / 38) ** 4, 12);
    const beyond = rangesOf(fiveFinds, { main: horizon(50) }).row("window");
    expect(beyond.p).toBeCloseTo((16 / 38) ** 4, 12);
    expect(beyond.reachLevel).toBeUndefined();
  });

  it("uses 1 / ln of the ratio with one informative find", () => {
    const row = rangesOf(taxon("Orbula bina", [10, 20]), { main: horizon(30) }).row("window");
    expect(row.evidenceRatio).toBeCloseTo(1 / Math.log(2), 12);
  });
});

describe("sampled", () => {
  it("ends at the next sampled horizon above those that may lie inside", () => {
    const row = rangesOf(taxon("Orbula densa", [4, 5, 6, 7, 8, 9, 10])).row("sampled");
    // N' = 6, n' = 6: p(j) = 1 / C(6 + j, 6); p(0) = 1, p(1) = 1/7, p(2) = 1/28 < 0.05.
    expect(row).toMatchObject({ outcome: "closed", highM: 12, exponent: 6 });
  });

  it("is open where all barren horizons above may lie inside", () => {
    const { row, codes } = rangesOf(taxon("Orbula rara", [10, 30]));
    expect(row("sampled").outcome).toBe("open");
    expect(row("sampled").highM).toBeUndefined();
    expect(codes).toContain("range-bound-open");
  });

  it("does not count finds outside searched samples", () => {
    const { row, codes } = rangesOf(taxon("Orbula mixta", [4, 5, 6, 6.5, 7, 8]));
    expect(row("sampled")).toMatchObject({ horizons: 5, exponent: 4 });
    expect(codes).toContain("range-finds-outside-searches");
  });

  it("is empty where a find outside the samples lies above the bound", () => {
    const row = rangesOf(taxon("Orbula discors", [4, 5, 6, 7, 8, 9, 10, 20.5])).row("sampled");
    expect(row.outcome).toBe("empty");
    expect(row.highM).toBeUndefined();
  });

  it("takes the odds of a find in proportion to effort where efforts differ, in one unit", () => {
    const dense = taxon("Orbula densa", [4, 5, 6, 7, 8, 9, 10]);
    const { row, codes } = rangesOf(dense, { place: section({ efforts: [1, 4] }) });
    // Samples at odd levels have four times the odds; all of 5 to 10 have the taxon, 11 not: e6(w) / e6(w, 4).
    const w = [4, 1, 4, 1, 4, 1];
    const e6 = w.reduce((a, b) => a * b, 1);
    const p1 = e6 / (e6 + 4 * e6 * w.reduce((sum, odds) => sum + 1 / odds, 0));
    expect(p1).toBeLessThan(0.07);
    const at11 = rangesOf(dense, { place: section({ efforts: [1, 4] }), main: horizon(11.5) });
    expect(at11.row("sampled").p).toBeCloseTo(p1, 12);
    expect(row("sampled").note).toContain("odds of a find in proportion to effort");
    expect(codes).not.toContain("range-unequal-effort");
    expect(rangesOf(dense, { place: section({ efforts: [3] }) }).row("sampled").note).not.toContain("odds");
  });

  it("says that efforts cannot be compared", () => {
    const place = section({ efforts: [1, 2] });
    const searches = place.searches.map((s, i) => (i % 2 === 0 ? { ...s, effortUnit: "slide" } : s));
    const { row, codes } = rangesOf(fiveFinds, { place: { ...place, searches } });
    expect(codes).toContain("range-unequal-effort");
    expect(row("sampled").note).not.toContain("odds");
  });

  it("gives the posterior median, prior flat in height up to the section's end", () => {
    const row = rangesOf(taxon("Orbula densa", [4, 5, 6, 7, 8, 9, 10])).row("sampled");
    // Likelihood B(7, 1 + j) over 30 stretches of 1 m: 1/7, 1/56, 1/252 ... of which the first holds more than half.
    let likelihood = 1;
    let total = 0;
    for (let j = 0; j < 30; j++) {
      total += likelihood;
      likelihood *= (1 + j) / (8 + j);
    }
    expect(row.pointM).toBeCloseTo(10 + 0.5 * total, 9);
  });
});

const leading = (method: RangeMethod) => (s: Settings) => ({
  ...s,
  ranges: { ...s.ranges, methods: [method] },
});

describe("taper", () => {
  it.each(["uniform", "sampled", "window"] as const)("falls from 1 at the last find: %s", (method) => {
    const place = section({ intervals: [covered(21, 24)] });
    const [drawn] = rangesOf(fiveFinds, { place, settings: leading(method) }).ranges.tapers;
    expect(drawn.heightsM[0]).toBe(18);
    expect(drawn.chances[0]).toBe(1);
    expect(drawn.heightsM.length).toBeGreaterThan(20);
    for (let i = 1; i < drawn.heightsM.length; i++) {
      expect(drawn.heightsM[i]).toBeGreaterThanOrEqual(drawn.heightsM[i - 1]);
      expect(drawn.chances[i]).toBeLessThanOrEqual(drawn.chances[i - 1]);
    }
  });

  it("has the chance 1 - C where the interval ends", () => {
    const [drawn] = rangesOf(fiveFinds, { settings: leading("uniform") }).ranges.tapers;
    const end = drawn.endM ?? Number.NaN;
    const index = drawn.heightsM.findIndex((height) => height >= end);
    expect(drawn.chances[index]).toBeLessThanOrEqual(0.05);
    expect(drawn.chances[index - 1]).toBeGreaterThan(0.05);
  });

  it("falls back to uniform where the leading method is undefined", () => {
    const published = taxon("Orbula citata", [2, 18], {
      publishedHorizons: 9,
      samples: [undefined, undefined],
    });
    expect(rangesOf(published, { settings: leading("sampled") }).ranges.tapers[0].method).toBe("uniform");
    expect(rangesOf(taxon("Orbula una", [10])).ranges.tapers).toEqual([]);
  });
});
