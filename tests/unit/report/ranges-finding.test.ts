import { describe, expect, it } from "vitest";
import type { Analysis } from "../../../src/core/analysis-result.ts";
import type { Outcome } from "../../../src/core/basis.ts";
import type { RangeEnd } from "../../../src/core/ranges/result.ts";
import { standingOf } from "../../../src/report/findings/end-words.ts";
import { rangesFinding } from "../../../src/report/findings/ranges.ts";
import { taxonFinding } from "../../../src/report/findings/taxon.ts";
import { plain } from "../../../src/report/wordings/words.ts";
import { smallAnalysis } from "../../figures/plates/fixtures.ts";
import { withEnds } from "../../figures/plates/range-fixtures.ts";

const small = withEnds(smallAnalysis());
const section = small.study.sections.find(({ name }) => name === "cliff");
if (section === undefined) throw new Error("the fixture has lost its cliff");
const steady: Analysis = { ...small, ranges: { ...small.ranges, cautions: [] } };

/** Tops by the leading method alone, with these outcomes and bounds in the order of the candidates. */
function withTops(tops: readonly { readonly outcome: Outcome; readonly highM?: number }[]): Analysis {
  const candidates = small.candidates.filter((c) => c.section === "cliff" && c.role === "candidate");
  const ends = candidates.flatMap(({ taxon }, i): RangeEnd[] => {
    const row = small.ranges.ends.find((one) => one.taxon === taxon && one.end === "top");
    const top = tops[i];
    if (row === undefined || top === undefined) return [];
    const { highM: _, ...rest } = row;
    return [{ ...rest, ...top }];
  });
  return { ...steady, ranges: { ...steady.ranges, ends } };
}

describe("what the ends say about the main horizon", () => {
  it("counts intervals that reach it, those without a bound among them, and those below", () => {
    const analysis = withTops([
      { outcome: "closed", highM: 11 },
      { outcome: "leaves-section", highM: 40 },
      { outcome: "closed", highM: 13 },
    ]);
    expect(plain(rangesFinding(analysis, section).sentence)).toMatch(
      /By sampled at 95.% the intervals of 2 of 3 reach the main horizon, 1 of them without a bound inside the section; 1 ends below it\.$/,
    );
  });

  it("what cannot be told is no evidence either way", () => {
    const analysis = withTops([
      { outcome: "undefined" },
      { outcome: "open" },
      { outcome: "closed", highM: 12.1 },
    ]);
    expect(plain(rangesFinding(analysis, section).sentence)).toMatch(
      /2 of 2 reach the main horizon, 1 of them without a bound inside the section; 0 end below it; 1 cannot be told\.$/,
    );
  });

  it("tells the gate first where finds thin out upward", () => {
    const text = plain(rangesFinding(small, section).sentence);
    expect(text).toMatch(/^Finds thin out upward \(p.=.0\.010\), so intervals that take recovery as even/);
    expect(plain(rangesFinding(steady, section).sentence)).not.toContain("thin out");
    const even = rangesFinding(small, section).numbers.find(({ label }) => label === "By uniform");
    expect(even?.note).toContain("too short where recovery declines");
  });

  it("has a line for each method, and its counts add up to the candidates", () => {
    const lines = rangesFinding(steady, section).numbers.filter(({ label }) => label.startsWith("By "));
    expect(lines).toHaveLength(small.study.settings.ranges.methods.length);
    for (const { value, note = "" } of lines) {
      const counts = [...value.matchAll(/\d+/g), ...note.matchAll(/not told for (\d+)/g)];
      const sum = counts.reduce((total, match) => total + Number(match[1] ?? match[0]), 0);
      expect(sum, value).toBe(3);
    }
  });

  it("a last find at or above the horizon reaches it whatever the bound", () => {
    const row = small.ranges.ends.find(({ end, outcome }) => end === "top" && outcome === "closed");
    if (row === undefined) throw new Error("the fixture has no closed top");
    expect(standingOf({ ...row, lastM: 13, highM: 12 }, 12.5)).toBe("reaches");
    expect(standingOf({ ...row, lastM: 10, highM: 12 }, 12.5)).toBe("short");
  });
});

describe("what is said of one taxon", () => {
  it("names its last find, its bound by the leading method, and over what the bound moves", () => {
    const found = taxonFinding(steady, section, "Aurea prima");
    const text = plain(found?.sentence ?? []);
    expect(text).toContain("last found at 8.50\u00a0m, in 4\u00a0horizons".replace("4\u00a0", "4 "));
    expect(text).toContain(
      "By sampled its end lies no higher than 9.50\u00a0m (95\u00a0%), −2.60\u00a0m from",
    );
    expect(text).toMatch(
      /the bound moves over 1\.50.m, from 9\.50.m to 11\.00.m; 1 of 3 shapes give no bound\.$/,
    );
    expect(found?.methods.map(({ label }) => label)).toEqual(small.study.settings.ranges.methods);
  });

  it("says so where there is no interval, and nothing of a taxon that is not here", () => {
    const text = plain(
      taxonFinding(withTops([{ outcome: "leaves-section" }]), section, "Aurea prima")?.sentence ?? [],
    );
    expect(text).toContain("By sampled: beyond the section's top at 95");
    expect(taxonFinding(steady, section, "Nobody's shell")).toBeUndefined();
  });
});
