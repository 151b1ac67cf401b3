import { describe, expect, it } from "vitest";
import type { MarkerHorizon } from "../../../../src/core/markers/result.ts";
import type { Candidate, LocalTaxon, Role } from "../../../../src/core/study/finds-result.ts";
import type { Section } from "../../../../src/core/study/model.ts";
import type { Settings } from "../../../../src/core/study/settings.ts";
import { answerTiming } from "../../../../src/core/timing/answer.ts";
import type { TimingMethod } from "../../../../src/core/timing/result.ts";
import { candidate, covered, horizon, markers, section, study, taxon } from "../ranges/small-study.ts";

interface Setup {
  readonly place?: Section;
  readonly main?: MarkerHorizon;
  readonly others?: readonly MarkerHorizon[];
  readonly roles?: Readonly<Record<string, Role>>;
  readonly reachingTop?: readonly string[];
  readonly settings?: (s: Settings) => Settings;
}

function timingOf(taxa: readonly LocalTaxon[], setup: Setup = {}) {
  const { place = section(), main, others, roles = {}, reachingTop = [], settings } = setup;
  const candidates: Candidate[] = taxa.map((t) =>
    candidate(t, roles[t.taxon] ?? "candidate", reachingTop.includes(t.taxon)),
  );
  const input = { taxa, candidates, markers: markers(main, others) };
  const timing = answerTiming(study([place], settings), input);
  const rows = (method: TimingMethod, set = "candidates") =>
    timing.answers.filter((a) => a.method === method && a.set === set);
  return { timing, rows, row: (method: TimingMethod, set?: string) => rows(method, set)[0] };
}

const codesOf = ({ timing }: ReturnType<typeof timingOf>) => timing.cautions.map((c) => c.code);

const evenly = (name: string, last: number, extra: Partial<LocalTaxon> = {}) =>
  taxon(name, [1, last / 4, last / 2, (3 * last) / 4, last], extra);
const three = [evenly("Orbula vesta", 30), evenly("Lenta acuta", 28), evenly("Spiralis nova", 26)];

/** Twelve finds evenly up to the last: enough that ends a few metres apart are told apart. */
const dense = (name: string, last: number) =>
  taxon(
    name,
    Array.from({ length: 12 }, (_, i) => ((i + 1) * last) / 12),
  );

const withDivers = (s: Settings): Settings => ({
  ...s,
  timing: {
    ...s.timing,
    sets: { divers: ["Orbula vesta", "Lenta acuta", "Absens nulla"], candidates: ["x"] },
  },
});

describe("one level", () => {
  it("answers every question for candidates", () => {
    const { timing, row } = timingOf(three, { main: horizon(31) });
    const methods = new Set(timing.answers.filter((a) => a.set === "candidates").map((a) => a.method));
    expect([...methods].toSorted()).toEqual(
      expect.arrayContaining([
        "binomial",
        "centroid",
        "combined",
        "common-end",
        "common-end-given",
        "common-end-joint",
        "confidence-levels",
        "distance",
        "duration-box",
        "duration-lower",
        "gap-trend",
        "half-intervals",
        "highest-find",
        "largest-gap",
        "pulses-bootstrap",
        "rank-correlation",
        "runs",
        "separation",
        "shift",
        "two-highest",
      ]),
    );
    expect(row("common-end")).toMatchObject({ df: 4, taxa: 3, taxaOfSet: 3, outcome: "closed" });
    expect(row("common-end").testStatistic).toBeCloseTo(8 * (Math.log(29 / 27) + Math.log(29 / 25)), 12);
  });

  it("leaves survivors out, and names them beside", () => {
    const all = [...three, taxon("Perennis alta", [2, 20, 35, 39])];
    const result = timingOf(all, { main: horizon(31), roles: { "Perennis alta": "survivor" } });
    expect(result.row("common-end").taxa).toBe(3);
    const caution = result.timing.cautions.find((c) => c.code === "timing-survivors");
    expect(caution?.numbers).toEqual({ taxa: 1, names: "Perennis alta" });
  });

  it("is undefined with one taxon, whose common end is still bounded", () => {
    const { row } = timingOf([three[0]]);
    expect(row("common-end").outcome).toBe("undefined");
    expect(row("common-end").p).toBeUndefined();
    expect(row("common-end-joint")).toMatchObject({ outcome: "leaves-section", low: 30 });
    expect(row("common-end-joint").high).toBeCloseTo(row("common-end-given").high ?? 0, 9);
  });

  it("drops single finds from the statistic, but lets them bound the level", () => {
    const plain = timingOf(three);
    const result = timingOf([...three, taxon("Orbula una", [30.5])]);
    expect(result.row("common-end").testStatistic).toBe(plain.row("common-end").testStatistic);
    expect(result.row("common-end-joint")).toMatchObject({ low: 30.5, taxa: 3, taxaOfSet: 4 });
    const high = taxon("Orbula summa", [39.9]);
    expect(timingOf([...three, high]).row("common-end-given").outcome).toBe("empty");
    expect(codesOf(result)).toContain("timing-uninformative-taxa");
  });

  it("rejects ends far apart, with an empty set, and says that the given interval means little", () => {
    const result = timingOf([
      dense("Orbula vesta", 30),
      dense("Lenta acuta", 14),
      dense("Spiralis nova", 13),
    ]);
    expect(result.row("common-end").p).toBeLessThan(0.01);
    expect(result.row("common-end-joint").outcome).toBe("empty");
    expect(result.row("common-end-joint").low).toBeUndefined();
    expect(result.row("common-end-given").note).toMatch(/one level is rejected/);
    expect(codesOf(result)).toEqual(
      expect.arrayContaining(["timing-one-level-rejected", "timing-no-common-end"]),
    );
  });

  it("reports ties at the top, and ends aligned too well", () => {
    const tied = ["a", "b", "c", "d"].map((name) => evenly(`Orbula ${name}`, 30));
    const result = timingOf(tied);
    expect(result.row("common-end")).toMatchObject({ testStatistic: 0, p: 1, df: 6 });
    expect(codesOf(result)).toEqual(expect.arrayContaining(["timing-ties", "timing-aligned-too-well"]));
  });

  it("keeps a common level above the section's top, with the outcome that it leaves the section", () => {
    const { row } = timingOf([taxon("Orbula rara", [3, 35]), taxon("Lenta rara", [9, 38])]);
    expect(row("common-end-given").outcome).toBe("leaves-section");
    expect(row("common-end-given").high).toBeGreaterThan(40);
  });
});

describe("sets", () => {
  it("asks with and without taxa that reach the top, and by group", () => {
    const taxa = [...three, evenly("Spora magna", 40, { group: "spores" })];
    const { timing } = timingOf(taxa, { reachingTop: ["Spora magna"] });
    expect(timing.sets.map((s) => [s.set, s.taxa.length])).toEqual([
      ["candidates", 4],
      ["candidates-closed", 3],
      ["group:shells", 3],
      ["group:spores", 1],
    ]);
    expect(timing.cautions.map((c) => c.code)).toContain("timing-reaches-top");
  });

  it("runs declared lists, of candidates alone", () => {
    const result = timingOf(three, { settings: withDivers });
    expect(result.timing.sets.find((s) => s.set === "divers")?.taxa).toEqual(["Orbula vesta", "Lenta acuta"]);
    expect(codesOf(result)).toEqual(
      expect.arrayContaining(["timing-set-incomplete", "timing-set-name-taken"]),
    );
  });

  it("says when the answer turns on the taxa that reach the top", () => {
    const taxa = [
      dense("Orbula a", 20),
      dense("Orbula b", 20.5),
      dense("Orbula c", 21),
      dense("Orbula d", 40),
    ];
    expect(codesOf(timingOf(taxa, { reachingTop: ["Orbula d"] }))).toContain("timing-turns-on-top");
  });

  it("gives no answers for a section without candidates", () => {
    expect(timingOf([]).timing.answers).toEqual([]);
  });
});

describe("at a horizon", () => {
  it("tests a point horizon with its statistic, an interval by its largest p", () => {
    const wide = horizon(33, { name: "iridium-1", horizon: "iridium-1", lowM: 30, highM: 36 });
    const [point, interval] = timingOf(three, { main: horizon(33), others: [wide] }).rows(
      "confidence-levels",
    );
    expect(point.horizon).toBe("impact");
    expect(point.testStatistic).toBeGreaterThan(0);
    expect(interval.horizon).toBe("iridium-1");
    expect(interval.testStatistic).toBeUndefined();
    expect(interval.p).toBeGreaterThan(point.p ?? 1);
    expect(interval.estimate).toBeGreaterThanOrEqual(30);
    expect(interval.estimate).toBeLessThanOrEqual(36);
  });

  it("answers no where a last find lies above the horizon", () => {
    const { row } = timingOf(three, { main: horizon(27) });
    expect(row("confidence-levels")).toMatchObject({ p: 0, note: "2 last finds lie above the horizon" });
    expect(row("confidence-levels").estimate).toBeUndefined();
  });

  it("names two horizons that answer to one name apart, the main one keeping it", () => {
    const found = horizon(31.2, { name: "iridium-1", source: "found" });
    const rows = timingOf(three, { main: horizon(31), others: [found] }).rows("confidence-levels");
    expect(rows.map((r) => r.horizon)).toEqual(["impact", "iridium-1"]);
  });

  it("draws p along height, from the highest last find up", () => {
    const place = section({ intervals: [covered(31, 32)] });
    const [curve] = timingOf(three, { place, main: horizon(33) }).timing.curves;
    expect(curve.heightsM[0]).toBe(30);
    expect(curve.heightsM).toEqual(expect.arrayContaining([31, 32, 33]));
    const at = (height: number) => curve.p[curve.heightsM.indexOf(height)];
    expect(at(31)).toBe(at(32));
    expect(Math.max(...curve.p)).toBeGreaterThan(0.5);
    expect(curve.p[curve.p.length - 1]).toBeLessThan(0.2);
  });

  it("widens a window that does not hold all last finds", () => {
    expect(codesOf(timingOf(three, { main: horizon(31) }))).not.toContain("timing-window-widened");
    const low = timingOf([...three, evenly("Lenta prior", 8)], { main: horizon(31) });
    expect(codesOf(low)).toContain("timing-window-widened");
  });
});

describe("how gradual", () => {
  it("uses taxa with many horizons for the box, and prints all beside it", () => {
    const rich = ["a", "b"].map((name, i) =>
      taxon(
        `Orbula ${name}`,
        Array.from({ length: 12 }, (_, j) => 2 * j + i),
      ),
    );
    const result = timingOf([...rich, ...three]);
    const [chosen, all] = result.rows("duration-box");
    expect(chosen).toMatchObject({ taxa: 2, taxaOfSet: 5, unit: "m" });
    expect(chosen.note).toMatch(/^2 of 5 taxa used/);
    expect(all.taxa).toBe(5);
    expect(all.high).toBeGreaterThan(chosen.high ?? Infinity);
    expect(codesOf(result)).not.toContain("timing-box-all-taxa");
  });

  it("falls back to all taxa where fewer than two have the horizons", () => {
    const result = timingOf(three);
    expect(result.rows("duration-box")).toHaveLength(1);
    expect(codesOf(result)).toEqual(expect.arrayContaining(["timing-box-all-taxa", "timing-box-rarest"]));
  });
});

describe("can it be trusted", () => {
  it("distrusts a section whose finds crowd low in their ranges", () => {
    const low = ["a", "b", "c"].map((name) => taxon(`Orbula ${name}`, [0, 1, 2, 3, 4, 5, 30]));
    const result = timingOf(low);
    expect(result.timing.distrusted).toContainEqual({ section: "Orskel Ledge", set: "candidates" });
    expect(codesOf(result)).toContain("timing-recovery-declines");
    const pooled = result.rows("centroid").find((r) => r.taxon === undefined);
    expect(pooled?.testStatistic).toBeLessThan(-2);
    expect(result.rows("centroid")).toHaveLength(4);
  });

  it("trusts even finds, and says nothing of taxa without a find between first and last", () => {
    const result = timingOf([...three, taxon("Orbula bina", [3, 29])]);
    expect(result.timing.distrusted).toEqual([]);
    const single = result.rows("centroid").find((r) => r.taxon === "Orbula bina");
    expect(single).toMatchObject({ outcome: "undefined" });
  });
});
