import { describe, expect, it } from "vitest";
import { endsWithFinds, tapersBy } from "../../../../src/core/ranges/asked-ends.ts";
import { rangeMethods } from "../../../../src/core/ranges/methods.ts";
import { estimateRanges } from "../../../../src/core/ranges/range-ends.ts";
import type { RangeMethod } from "../../../../src/core/ranges/result.ts";
import type { LocalTaxon } from "../../../../src/core/study/finds-result.ts";
import { candidate, markers, section, sectionName, study, taxon } from "./small-study.ts";

const methods: readonly RangeMethod[] = [
  "sampled",
  "uniform",
  "recovery",
  "window",
  "declining",
  "two-highest",
  "top-k",
];
const of = (taxa: readonly LocalTaxon[], list = methods) => {
  const asked = study([section()], (s) => ({ ...s, ranges: { ...s.ranges, methods: [...list] } }));
  const input = { taxa, candidates: taxa.map((t) => candidate(t)), markers: markers() };
  return { asked, input, ranges: estimateRanges(asked, input) };
};
const even = ["alba", "nigra", "rubra"].map((name, i) =>
  taxon(
    `Orbula ${name}`,
    [2, 6, 10, 14, 18, 22].map((heightM) => heightM + i),
  ),
);
/** Finds crowd low in each range. */
const thinning = ["alba", "nigra", "rubra"].map((name, i) =>
  taxon(
    `Orbula ${name}`,
    [2, 3, 4, 5, 7, 10, 22].map((heightM) => heightM + i),
  ),
);

describe("where finds thin out upward", () => {
  const { ranges } = of(thinning);
  const tops = ranges.ends.filter((end) => end.end === "top" && end.taxon === "Orbula alba");

  const noteOf = (method: RangeMethod) => tops.find((end) => end.method === method)?.note;

  it("methods that hold under a decline lead, and the tapers are theirs", () => {
    expect(tops.slice(0, 3).map((end) => end.method)).toEqual(["declining", "two-highest", "top-k"]);
    expect(tops).toHaveLength(methods.length);
    expect(ranges.tapers.map((taper) => taper.method)).toEqual(["declining", "declining", "declining"]);
  });

  it("the others are marked, and a caution says so", () => {
    expect(noteOf("uniform")).toMatch(/^recovery declines upward \(p = 0.0\d+\): the interval is too short/);
    expect(noteOf("sampled")).toMatch(/^recovery declines upward/);
    expect(noteOf("declining")).not.toMatch(/declines upward/);
    const caution = ranges.cautions.find((c) => c.code === "range-recovery-declines");
    expect(caution?.numbers?.method).toBe("declining");
  });

  it("two-highest and top-k take finds to thin out straight to nothing at least", () => {
    const plain = estimateRanges(
      study([section()], (s) => ({ ...s, ranges: { ...s.ranges, methods: [...methods], tail: 2 } })),
      { taxa: even, candidates: even.map((t) => candidate(t)), markers: markers() },
    );
    const twoHighest = (rows: typeof ranges.ends) =>
      rows.find((end) => end.end === "top" && end.method === "two-highest")?.highM;
    // x_n + c (x_n - x_(n-1)) with c = 1 / (0.95^(-1/2) - 1).
    const c = 1 / (0.95 ** -0.5 - 1);
    expect(twoHighest(ranges.ends)).toBeCloseTo(22 + 12 * c, 8);
    expect(twoHighest(plain.ends)).toBeCloseTo(22 + 4 * c, 8);
  });

  it("the bases are left in their order: there finds crowd", () => {
    const bases = ranges.ends.filter((end) => end.end === "base" && end.taxon === "Orbula alba");
    expect(bases.map((end) => end.method)).toEqual(methods);
  });
});

it("the settings' order stands where nothing thins out", () => {
  const { ranges } = of(even);
  const tops = ranges.ends.filter((end) => end.end === "top" && end.taxon === "Orbula alba");
  expect(tops.map((end) => end.method)).toEqual(methods);
  expect(ranges.cautions.map((c) => c.code)).not.toContain("range-recovery-declines");
});

describe("tapers by any method", () => {
  const all = Object.keys(rangeMethods).filter((name): name is RangeMethod => name in rangeMethods);
  const { asked, input } = of(even, ["uniform"]);

  const tapersOf = (method: RangeMethod) => [
    ...tapersBy({ study: asked, ...input }, { section: sectionName, method }),
  ];
  const silent: ReadonlySet<RangeMethod> = new Set(["counts", "recovery", "gap-quantile"] as const);

  it.each(all.filter((method) => !silent.has(method)))("%s: falls from 1 at the last find", (method) => {
    const tapers = tapersOf(method);
    expect(tapers).toHaveLength(3);
    for (const { heightsM, chances, method: by } of tapers.flatMap(({ top }) => top ?? [])) {
      expect(by).toBe(method);
      expect(chances[0]).toBe(1);
      expect(heightsM.length).toBeGreaterThan(5);
      for (let i = 1; i < heightsM.length; i++) {
        expect(heightsM[i]).toBeGreaterThanOrEqual(heightsM[i - 1]);
        expect(chances[i]).toBeLessThanOrEqual(chances[i - 1] + 1e-12);
        expect(chances[i]).toBeGreaterThanOrEqual(0);
      }
    }
  });

  it("has none where a method says nothing", () => {
    for (const method of silent)
      expect(tapersOf(method).flatMap(({ top, base }) => [top, base])).toEqual([
        undefined,
        undefined,
        undefined,
        undefined,
        undefined,
        undefined,
      ]);
  });

  it("goes down from the first find as it goes up from the last where finds are mirrored", () => {
    for (const method of ["uniform", "top-k", "sampled"] as const)
      for (const { base } of tapersOf(method)) {
        expect(base?.chances[0]).toBe(1);
        expect(base?.heightsM).toEqual(base?.heightsM.toSorted((a, b) => b - a));
      }
  });

  it("those of the leading method are those of the analysis", () => {
    const { asked: own, input: given, ranges } = of(thinning);
    const top = [...tapersBy({ study: own, ...given }, { section: sectionName, method: "declining" })];
    expect(top.flatMap((each) => each.top ?? [])).toEqual(ranges.tapers);
    const base = [...tapersBy({ study: own, ...given }, { section: sectionName, method: methods[0] })];
    expect(base.flatMap((each) => each.base ?? [])).toEqual(ranges.baseTapers);
  });
});

describe("the ends of a taxon with other finds", () => {
  const { asked, input, ranges } = of(thinning);
  const all = { study: asked, ...input };
  const question = { section: sectionName, taxon: "Orbula alba", method: "uniform" } as const;
  const [alba] = input.taxa;
  const finds = alba.heightsM.map((heightM, i) => ({ heightM, sample: alba.samples[i] }));

  it("are those of the analysis with the same finds", () => {
    const same = endsWithFinds(all, { ...question, finds });
    const rows = ranges.ends.filter((end) => end.taxon === "Orbula alba" && end.method === "uniform");
    expect(same?.top).toEqual(rows.find((end) => end.end === "top"));
    expect(same?.base).toEqual(rows.find((end) => end.end === "base"));
  });

  it("are lower without the last find, and none without any", () => {
    const lower = endsWithFinds(all, { ...question, finds: finds.slice(0, -1) });
    expect(lower?.top.lastM).toBe(10);
    expect(lower?.top.horizons).toBe(6);
    expect(endsWithFinds(all, { ...question, finds: [] })).toBeUndefined();
  });
});
