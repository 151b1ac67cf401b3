import { describe, expect, it } from "vitest";
import { estimateRanges } from "../../../../src/core/ranges/range-ends.ts";
import type { RangeEnd, RangeMethod } from "../../../../src/core/ranges/result.ts";
import type { LocalTaxon } from "../../../../src/core/study/finds-result.ts";
import type { Section } from "../../../../src/core/study/model.ts";
import type { Settings } from "../../../../src/core/study/settings.ts";
import { candidate, covered, horizon, markers, section, study, taxon } from "./small-study.ts";

const ofFinds = ["window-trend", "gap-rank", "gap-quantile", "weibull-tail", "declining"] as const;
const ofTop = ["two-highest", "top-k"] as const;
const ofRange = ["uniform-bayes", "sighting-rate"] as const;
const methods = [...ofRange, ...ofFinds, ...ofTop];

interface Setup {
  readonly place?: Section;
  readonly main?: ReturnType<typeof horizon>;
  readonly reachesTop?: boolean;
  readonly settings?: (s: Settings) => Settings;
}

function rangesOf(
  of: LocalTaxon,
  { place = section(), main, reachesTop = false, settings = (s) => s }: Setup = {},
) {
  const ranges = estimateRanges(
    study([place], (s) => settings({ ...s, ranges: { ...s.ranges, methods: ["uniform", ...methods] } })),
    { taxa: [of], candidates: [candidate(of, "candidate", reachesTop)], markers: markers(main) },
  );
  const row = (method: RangeMethod, end: RangeEnd["end"] = "top") => {
    const found = ranges.ends.find((e) => e.method === method && e.end === end);
    if (found === undefined) throw new Error(`no row of ${method}`);
    return found;
  };
  return { ranges, row };
}

const at =
  (confidence: number, ranges: Partial<Settings["ranges"]> = {}) =>
  (s: Settings): Settings => ({ ...s, confidence, ranges: { ...s.ranges, ...ranges } });
const fiveFinds = taxon("Orbula vesta", [2, 5, 9, 13, 18]);

function outcomes(of: LocalTaxon, setup?: Setup): ReadonlyMap<RangeMethod, string> {
  const { row } = rangesOf(of, setup);
  return new Map(methods.map((method) => [method, row(method).outcome]));
}

const undefinedOf = (found: ReadonlyMap<RangeMethod, string>) =>
  methods.filter((method) => found.get(method) === "undefined");

describe("what cannot be estimated is a named outcome", () => {
  it("one find: nothing is defined", () => {
    expect(undefinedOf(outcomes(taxon("Orbula una", [10])))).toEqual(methods);
  });

  it("two finds: no trend and no shape, the rest mostly open", () => {
    const found = outcomes(taxon("Orbula bina", [10, 12]));
    expect(undefinedOf(found)).toEqual(["window-trend", "weibull-tail"]);
    expect(found.get("gap-rank")).toBe("open");
    expect(found.get("gap-quantile")).toBe("open");
  });

  it("a range published without its finds: only what needs first, last and number", () => {
    const published = taxon("Orbula citata", [2, 18], {
      publishedHorizons: 11,
      samples: [undefined, undefined],
    });
    expect(undefinedOf(outcomes(published))).toEqual([...ofFinds, ...ofTop]);
    expect(rangesOf(published).row("declining").note).toMatch(/^published without its finds/);
  });

  it("the two highest finds on both sides of covered rock: no spacing and no shape at the top", () => {
    const found = outcomes(taxon("Orbula cava", [4, 9, 20, 23]), {
      place: section({ intervals: [covered(20, 23)] }),
    });
    expect(undefinedOf(found)).toEqual(["weibull-tail", "two-highest"]);
  });

  it("all finds but the highest at one level of recovery: no shape", () => {
    const { row } = rangesOf(taxon("Orbula saltans", [20, 23, 30]), {
      place: section({ intervals: [covered(20, 23)] }),
    });
    expect(row("weibull-tail")).toMatchObject({ outcome: "undefined" });
    expect(row("weibull-tail").note).toMatch(/all finds but one/);
  });

  it("a range of no recovered length: nothing is defined", () => {
    const found = outcomes(taxon("Orbula plana", [20, 23]), {
      place: section({ intervals: [covered(20, 23)] }),
    });
    expect(undefinedOf(found)).toEqual(methods);
  });

  it("a taxon found in the highest sample has an end open at the top, by every method", () => {
    const found = outcomes(taxon("Orbula alta", [10, 14, 19, 25, 40]), { reachesTop: true });
    for (const method of methods) expect(found.get(method)).toBe("leaves-section");
  });
});

describe("rows", () => {
  it("uniform-bayes: the classical bound, with what flat priors and the section's top would change", () => {
    const row = rangesOf(fiveFinds).row("uniform-bayes");
    expect(row.highM).toBeCloseTo(rangesOf(fiveFinds).row("uniform").highM ?? 0, 10);
    expect(row.pointM).toBeCloseTo(18 + 16 * (2 ** (1 / 4) - 1), 10);
    expect(row.note).toMatch(/with flat priors 45.431 m; if it ended short of the section's top 32.098 m/);
    expect(rangesOf(taxon("Orbula rara", [10, 14, 30])).row("uniform-bayes").note).toMatch(
      /0.4444 of the posterior lies above the section's top: that bound is driven by the prior/,
    );
  });

  it("uniform-bayes: one interval of both ends", () => {
    const [mine, classical] = (["uniform-bayes", "uniform"] as const).map((m) =>
      rangesOf(fiveFinds).row(m, "both"),
    );
    expect([mine.lowM, mine.highM]).toEqual([classical.lowM, classical.highM]);
  });

  it("window-trend: p at the horizon without the first find, its base", () => {
    const row = rangesOf(fiveFinds, { main: horizon(34) }).row("window-trend");
    const plain = 0.5 ** 4;
    expect(row.p).toBeGreaterThan(plain);
    expect(row.reachLevel).toBeCloseTo(1 - (row.p ?? 0), 12);
    expect(row.note).toMatch(/p at impact/);
  });

  it("window-trend: open where the finds may just be thinning out", () => {
    const row = rangesOf(taxon("Orbula fugax", [1, 2, 3, 5, 9, 17])).row("window-trend");
    expect(row).toMatchObject({ outcome: "open" });
    expect(row.highM).toBeUndefined();
    expect(row.note).toMatch(/no level is excluded/);
  });

  it("gap-rank: the level is that of the rank, and there is no bound with too few gaps", () => {
    const row = rangesOf(fiveFinds, { settings: at(0.7) }).row("gap-rank");
    // Gaps 3, 4, 4, 5: the fourth covers 4/5.
    expect(row).toMatchObject({ outcome: "closed", highM: 23, level: 0.8, exponent: 4 });
    const none = rangesOf(fiveFinds).row("gap-rank");
    expect(none).toMatchObject({ outcome: "open", level: 0.95 });
    expect(none.note).toMatch(/^4 gaps, and level 0.95 takes 19/);
  });

  it("gap-rank: a known base adds the gap below the lowest find", () => {
    const row = rangesOf(fiveFinds, { settings: at(0.8, { base: "section-bottom" }) }).row("gap-rank");
    expect(row).toMatchObject({ exponent: 5, level: 5 / 6, highM: 23 });
  });

  it("gap-rank: p at the horizon counts the gaps as long", () => {
    const row = rangesOf(fiveFinds, { main: horizon(22) }).row("gap-rank");
    expect(row.p).toBeCloseTo(4 / 5, 12);
  });

  it("gap-quantile: brackets the quantile and says with which chance", () => {
    const row = rangesOf(taxon("Orbula multa", [1, 2, 4, 5, 7, 8, 11, 12]), { settings: at(0.5) }).row(
      "gap-quantile",
    );
    // Gaps 1 1 1 1 2 2 3: u = 6 has P(Bin(7, 1/2) <= 5) = 0.9375 < 0.95, so u = 7.
    expect(row).toMatchObject({ outcome: "closed", highM: 15 });
    expect(row.note).toMatch(/gap 7 of 7 by size, above the 0.5 quantile of gaps with chance 0.95/);
  });

  it("weibull-tail: says what the bound covers", () => {
    const { note, outcome } = rangesOf(fiveFinds).row("weibull-tail");
    expect(outcome).not.toBe("undefined");
    expect(note).toMatch(/covers about 0.978 where finds are uniform, 0.909 where they thin out upward/);
  });

  it("sighting-rate: says what the bound covers", () => {
    const row = rangesOf(fiveFinds).row("sighting-rate");
    expect(row.highM).toBeCloseTo(18 - (16 * Math.log(0.05)) / 4, 10);
    expect(row.note).toMatch(/the bound covers 0.893\d where finds are uniform/);
  });

  it("two-highest and top-k follow the tail and the number of finds", () => {
    const { row } = rangesOf(fiveFinds, { main: horizon(23), settings: at(0.5, { tail: 1, topFinds: 3 }) });
    expect(row("two-highest")).toMatchObject({ exponent: 1, highM: 23, pointM: 23 });
    expect(row("two-highest").reachLevel).toBeCloseTo(0.5, 12);
    const omega = 1 - Math.SQRT1_2;
    expect(row("top-k").exponent).toBe(2);
    expect(row("top-k").highM).toBeCloseTo((18 - omega * 9) / (1 - omega), 10);
    const steeper = rangesOf(fiveFinds, { settings: at(0.5, { tail: 2 }) }).row("two-highest");
    expect(steeper.highM).toBeCloseTo(18 + 5 / (Math.SQRT2 - 1), 10);
  });

  it("declining: reaches its own bound at its level, and tells the slope and the other priors", () => {
    const bound = rangesOf(fiveFinds, { settings: at(0.8) }).row("declining").highM ?? Number.NaN;
    const row = rangesOf(fiveFinds, { main: horizon(bound), settings: at(0.8) }).row("declining");
    expect(row.reachLevel).toBeCloseTo(0.8, 7);
    expect(row.note).toMatch(/recovery falls upward with chance 0\.\d+; evidence for falling over rising/);
    expect(row.note).toMatch(/bound [\d.]+ m for 1, [\d.]+ m for 3/);
  });

  it.each(methods)("%s: a base is the same estimate upside down", (method) => {
    const turned = taxon("Orbula vesta", [22, 27, 31, 35, 38]);
    const top = rangesOf(fiveFinds, { settings: at(0.4) }).row(method, "top");
    const base = rangesOf(turned, { settings: at(0.4) }).row(method, "base");
    expect(base.outcome).toBe(top.outcome);
    expect(base.lowM ?? Number.NaN).toBeCloseTo(40 - (top.highM ?? Number.NaN), 8);
    expect(base.highM).toBe(22);
  });

  it.each(methods)("%s: a bound inside covered rock is its top", (method) => {
    const free = rangesOf(fiveFinds, { settings: at(0.4) }).row(method).highM ?? Number.NaN;
    const place = section({ intervals: [covered(18.001, 18.001 + 4)], topM: 60 });
    const { highM } = rangesOf(fiveFinds, { place, settings: at(0.4) }).row(method);
    expect(highM).toBeCloseTo(free + 4, 8);
  });
});

describe("leanings", () => {
  it("shows the same end under each shape of recovery, top and base", () => {
    const many = taxon("Orbula multa", [1, 3, 4, 6, 9, 10, 12, 14]);
    const { ranges, row } = rangesOf(many);
    const [top, base] = ranges.leanings;
    expect([top.end, base.end]).toEqual(["top", "base"]);
    expect(top.bounds.map(({ method, tail, finds }) => [method, tail, finds])).toEqual([
      ["uniform", undefined, undefined],
      ["declining", undefined, undefined],
      ...[1, 2].flatMap((tail) => [2, 5, 8].map((finds) => ["top-k", tail, finds])),
    ]);
    expect(top.bounds[0].boundM).toBe(row("uniform").highM);
    const heights = top.bounds.map(({ boundM }) => boundM ?? Number.NaN);
    expect(top.nearestM).toBe(Math.min(...heights));
    expect(top.furthestM).toBe(Math.max(...heights));
    expect(base.lastM).toBe(1);
    expect(base.furthestM).toBeLessThan(base.nearestM ?? Number.NaN);
    expect(base.bounds[1].boundM).toBe(row("declining", "base").lowM);
  });

  it("has a row for each number of finds there is, and no bound where none is defined", () => {
    const three = rangesOf(taxon("Orbula trina", [10, 14, 19])).ranges.leanings[0];
    expect(three.bounds.filter(({ method }) => method === "top-k").map(({ finds }) => finds)).toEqual([
      2, 3, 2, 3,
    ]);
    const single = rangesOf(taxon("Orbula una", [10])).ranges.leanings[0];
    expect(single.bounds.every(({ outcome }) => outcome === "undefined")).toBe(true);
    expect(single.nearestM).toBeUndefined();
  });
});
