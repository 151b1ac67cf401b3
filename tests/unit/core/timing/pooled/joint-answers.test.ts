import { describe, expect, it } from "vitest";
import type { Candidate, LocalTaxon, Role } from "../../../../../src/core/study/finds-result.ts";
import type { Settings } from "../../../../../src/core/study/settings.ts";
import { jointAnswers } from "../../../../../src/core/timing/pooled/joint-answers.ts";
import { sectionCases } from "../../../../../src/core/timing/section-cases.ts";
import { candidate, horizon, markers, section, study, taxon } from "../../ranges/small-study.ts";

const places = ["Orskel Ledge", "Tamber Quarry", "Nirrel Cut"];

/** Twelve finds evenly up to the last. */
const evenly = (place: string, name: string, last: number) =>
  taxon(
    name,
    Array.from({ length: 12 }, (_, i) => ((i + 1) * last) / 12),
    { section: place, samples: Array.from({ length: 12 }, () => undefined) },
  );

interface Setup {
  readonly taxa?: readonly LocalTaxon[];
  readonly picks?: Readonly<Record<string, number>>;
  readonly sigmaM?: number;
  readonly isShared?: boolean;
  readonly roles?: Readonly<Record<string, Role>>;
  readonly reaching?: readonly string[];
  readonly timing?: Partial<Settings["timing"]>;
}

const three = [
  evenly("Orskel Ledge", "Orbula vesta", 29.4),
  evenly("Orskel Ledge", "Lenta acuta", 28),
  evenly("Tamber Quarry", "Orbula vesta", 19.5),
  evenly("Tamber Quarry", "Lenta acuta", 18.8),
  evenly("Nirrel Cut", "Orbula vesta", 24.6),
];

function joint(setup: Setup = {}) {
  const { taxa = three, sigmaM = 0.2, isShared = true, roles = {}, reaching = [], timing = {} } = setup;
  const picks = setup.picks ?? { "Orskel Ledge": 30, "Tamber Quarry": 20, "Nirrel Cut": 25 };
  const sections = places.map((name) => section({ name, title: name, searches: [] }));
  const whole = study(sections, (s) => ({ ...s, timing: { ...s.timing, ...timing } }));
  const horizons = Object.entries(picks).map(([place, at]) =>
    horizon(at, {
      section: place,
      shape: "normal",
      sigmaM,
      lowM: at - 2 * sigmaM,
      highM: at + 2 * sigmaM,
    }),
  );
  const candidates: Candidate[] = taxa.map((one) =>
    candidate(
      one,
      roles[`${one.section} ${one.taxon}`] ?? "candidate",
      reaching.includes(`${one.section} ${one.taxon}`),
    ),
  );
  const main = {
    ...markers().main,
    ...(isShared ? { name: "impact" } : {}),
    isShared,
    bySection: new Map(horizons.map((one) => [one.section, one])),
  };
  const input = { taxa, candidates, markers: { ...markers(), horizons, main } };
  const cases = sections.flatMap(
    (one) =>
      sectionCases(one, whole, { ...input, candidates: candidates.filter((c) => c.section === one.name) })
        .cases,
  );
  const found = jointAnswers(cases, whole, { ...input, progress: undefined });
  const codes = found.cautions.map(({ code }) => code);
  const row = (method: string, set = "candidates") =>
    found.answers.find((answer) => answer.method === method && answer.set === set);
  return { found, codes, row };
}

describe("sections answered together", () => {
  it("gives one level from the horizon, and the same without each section", () => {
    const { found, row } = joint();
    const where = row("pooled-offset");
    expect(where).toMatchObject({
      section: "joint",
      horizon: "impact",
      taxa: 2,
      unit: "m",
      outcome: "closed",
    });
    expect(where?.low).toBeLessThan(where?.estimate ?? 0);
    expect(found.leftOut.filter(({ set }) => set === "candidates").map(({ without }) => without)).toEqual(
      places,
    );
    expect(found.offsets).toContainEqual(
      expect.objectContaining({ section: "joint", set: "candidates", scenario: "single", horizon: "impact" }),
    );
    expect(found.sets).toContainEqual({
      section: "joint",
      set: "candidates",
      taxa: ["Orbula vesta", "Lenta acuta"],
    });
    const [density] = found.densities.filter(({ set }) => set === "candidates");
    expect(Math.min(...density.heightsM)).toBeGreaterThan(-3);
    expect(Math.max(...density.heightsM)).toBeLessThan(4);
  });

  it("weighs one level for all against one a section, under each window", () => {
    const { found } = joint();
    const rows = found.scenarios.filter(({ set }) => set === "candidates");
    expect(rows.map(({ scenario, variant }) => [scenario, variant])).toEqual([
      ["single", undefined],
      ["independent", undefined],
      ["single", "window-halved"],
      ["independent", "window-halved"],
      ["single", "window-doubled"],
      ["independent", "window-doubled"],
    ]);
    expect((rows[0].probability ?? 0) + (rows[1].probability ?? 0)).toBeCloseTo(1, 12);
    expect(rows[0].probability).toBeGreaterThan(0.9);
    expect(rows[4].probability).toBeGreaterThan(rows[2].probability ?? 1);
  });

  it("tests between sections exactly at exact picks alone", () => {
    expect(joint({ sigmaM: 0 }).row("common-end")).toMatchObject({ df: 4, outcome: "closed" });
    const uncertain = joint().row("common-end");
    expect(uncertain?.df).toBeUndefined();
    expect(uncertain?.p).toBeGreaterThan(joint({ sigmaM: 0 }).row("common-end")?.p ?? 1);
  });

  it("is silent and says why where the main horizon is not one horizon", () => {
    const { found, codes } = joint({ isShared: false });
    expect(found.answers).toEqual([]);
    expect(found.sets).toEqual([]);
    expect(codes).toEqual(["joint-horizon-not-shared"]);
  });

  it("leaves out a section without the horizon, by name", () => {
    const { found, row } = joint({ picks: { "Orskel Ledge": 30, "Tamber Quarry": 20 } });
    expect(row("pooled-offset")?.note).toBe("2 sections: Orskel Ledge, Tamber Quarry");
    expect(found.cautions).toContainEqual(
      expect.objectContaining({
        code: "joint-sections-left-out",
        numbers: expect.objectContaining({ names: "Nirrel Cut" }),
      }),
    );
  });

  it("asks nothing of one section alone", () => {
    const { found } = joint({ picks: { "Orskel Ledge": 30 } });
    expect(found.answers).toEqual([]);
  });

  it("counts survivors beside, and names those that end elsewhere", () => {
    const { found, codes } = joint({ roles: { "Tamber Quarry Lenta acuta": "survivor" } });
    expect(codes).toEqual(expect.arrayContaining(["joint-survivors", "joint-survive-elsewhere"]));
    expect(found.sets[0].taxa).toEqual(["Orbula vesta", "Lenta acuta"]);
  });

  it("takes the candidates of other sections into the set without those that reach a top", () => {
    const { row } = joint({ reaching: ["Orskel Ledge Orbula vesta"] });
    expect(row("pooled-offset", "candidates-closed")?.note).toBe(
      "3 sections: Orskel Ledge, Tamber Quarry, Nirrel Cut",
    );
  });

  it("tells where sections do not share one distance, and on which it turns", () => {
    const { codes } = joint({ picks: { "Orskel Ledge": 30, "Tamber Quarry": 36, "Nirrel Cut": 29 } });
    expect(codes).toContain("joint-sections-differ");
    expect(codes).toContain("joint-turns-on-section");
  });

  it("measures time by the rates of sections, and leaves out one without", () => {
    const rates = {
      "Orskel Ledge": { rate: 0.1, spread: 0 },
      "Tamber Quarry": { rate: 0.1, spread: 0 },
      "Nirrel Cut": { rate: 0.1, spread: 0 },
    };
    const inTime = joint({ timing: { jointScale: "time", rates } }).row("pooled-offset");
    const inMetres = joint().row("pooled-offset");
    expect(inTime?.unit).toBe("ka");
    expect(inTime?.low).toBeCloseTo(10 * (inMetres?.low ?? 0), 4);
    expect(inTime?.high).toBeCloseTo(10 * (inMetres?.high ?? 0), 4);
    const { "Nirrel Cut": _without, ...two } = rates;
    expect(joint({ timing: { jointScale: "time", rates: two } }).codes).toContain("joint-sections-left-out");
  });

  it("asks the horizons searched only where they are listed", () => {
    expect(joint().row("pooled-offset-sampled")).toBeUndefined();
  });
});
