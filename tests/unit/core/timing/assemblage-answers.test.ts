import { describe, expect, it } from "vitest";
import type { MarkerHorizon } from "../../../../src/core/markers/result.ts";
import type { LocalTaxon } from "../../../../src/core/study/finds-result.ts";
import type { Section } from "../../../../src/core/study/model.ts";
import type { Settings } from "../../../../src/core/study/settings.ts";
import { answerTiming } from "../../../../src/core/timing/answer.ts";
import type { TimingMethod } from "../../../../src/core/timing/result.ts";
import { candidate, horizon, markers, section, study, taxon } from "../ranges/small-study.ts";

interface Setup {
  readonly place?: Section;
  readonly horizons?: readonly MarkerHorizon[];
  readonly untrimmed?: readonly LocalTaxon[];
  readonly timing?: Partial<Settings["timing"]>;
}

function timingOf(
  taxa: readonly LocalTaxon[],
  { place = section(), horizons = [], untrimmed, timing }: Setup = {},
) {
  const result = answerTiming(
    study([place], (s) => ({ ...s, replicates: 1000, timing: { ...s.timing, ...timing } })),
    {
      taxa,
      candidates: taxa.map((t) => candidate(t)),
      markers: markers(horizon(31), horizons),
      ...(untrimmed === undefined ? {} : { untrimmed }),
    },
  );
  const rows = (method: TimingMethod, set = "candidates") =>
    result.answers.filter((a) => a.method === method && a.set === set);
  const caution = (code: string) => result.cautions.find((c) => c.code === code);
  return { result, rows, caution, sets: result.sets.map(({ set }) => set) };
}

/** Finds evenly from 1 m to the last. */
const evenly = (name: string, last: number, count = 12, extra: Partial<LocalTaxon> = {}) =>
  taxon(
    name,
    Array.from({ length: count }, (_, i) => 1 + ((last - 1) * i) / (count - 1)),
    extra,
  );
const six = [30, 29, 28.5, 29.5, 27, 28].map((last, i) => evenly(`Orvella ${"abcdef"[i]}`, last, 6 + i));

describe("where all could have ended", () => {
  it("is told by half intervals at the coverage that the number of taxa allows", () => {
    const [row] = timingOf(six)
      .rows("half-intervals")
      .filter((a) => a.question === "where");
    expect(row).toMatchObject({ outcome: "closed", low: 30, taxa: 6 });
    expect(row.level).toBeCloseTo(1 - 2 / 64, 12);
    const [few] = timingOf(six.slice(0, 5)).rows("half-intervals");
    expect(few.outcome).toBe("undefined");
    expect(few.low).toBeUndefined();
  });

  it("is told by the two highest finds for two tails, the declared one first", () => {
    const rows = timingOf(six).rows("two-highest");
    expect(rows.map(({ note }) => note.match(/tail \d/)?.[0])).toEqual(["tail 1", "tail 2"]);
    expect(rows[1].high).toBeGreaterThan(rows[0].high ?? Infinity);
  });

  it("leaves a single find out of the statistic and cuts the set at it", () => {
    const [row] = timingOf([...six, taxon("Lenta una", [30.4])]).rows("two-highest");
    expect(row).toMatchObject({ low: 30.4, taxa: 6, taxaOfSet: 7 });
  });
});

describe("two declared steps", () => {
  it("are not asked about undeclared, and it says how to", () => {
    const [row] = timingOf(six).rows("separation");
    expect(row).toMatchObject({ outcome: "not-applicable", taxa: 0 });
    expect(row.note).toMatch(/timing\.steps\.early/);
    expect(row.low).toBeUndefined();
  });

  const late = [30, 29.5, 29.8].map((last, i) => evenly(`Serus ${"abc"[i]}`, last, 15, { group: "spores" }));
  const early = [18, 17.6, 18.2].map((last, i) => evenly(`Prius ${"abc"[i]}`, last, 15));

  it("are apart, later minus earlier, and each is a set of its own", () => {
    const steps = { early: ["Prius a", "Prius b", "Prius c"], late: ["group:spores"] };
    const { rows, sets } = timingOf([...early, ...late], { timing: { steps } });
    const [row] = rows("separation");
    expect(row).toMatchObject({ outcome: "closed", taxa: 6, unit: "m" });
    expect(row.low).toBeGreaterThan(5);
    expect(row.high).toBeLessThan(18);
    expect(sets).toEqual(expect.arrayContaining(["step:early", "step:late"]));
    expect(rows("common-end", "step:early")[0].p).toBeGreaterThan(0.05);
  });

  it("that overlap or name nobody are told", () => {
    const steps = { early: ["Prius a", "Prius b", "Serus a"], late: ["group:spores", "Absens nulla"] };
    const { rows, caution } = timingOf([...early, ...late], { timing: { steps } });
    expect(caution("timing-steps-overlap")?.numbers).toEqual({ taxa: 1, names: "Serus a" });
    expect(caution("timing-steps-incomplete")?.numbers).toEqual({ taxa: 1, names: "Absens nulla" });
    expect(rows("separation")[0].taxa).toBe(4);
  });

  it("without a taxon in one of them have no separation", () => {
    const [row] = timingOf(early, { timing: { steps: { early: ["Prius a"], late: [] } } }).rows("separation");
    expect(row.outcome).toBe("undefined");
  });
});

describe("the number of pulses", () => {
  it("goes on while a count is rejected, with its Monte Carlo error", () => {
    const far = [30, 29.9, 29.8, 29.7, 14, 13.9, 13.8, 13.7].map((last, i) =>
      evenly(`Orvella ${i}`, last, 20),
    );
    const rows = timingOf(far).rows("pulses-bootstrap");
    expect(rows.map(({ part }) => part)).toEqual([1, 2]);
    expect(rows[0].p).toBeLessThanOrEqual(0.05);
    expect(rows[1].p).toBeGreaterThan(0.05);
    for (const { mcError } of rows) expect(mcError).toBeGreaterThan(0);
    expect(rows[1].note).toMatch(/14 m, 30 m/);
  });

  it("is undefined with one taxon", () => {
    const [row, ...others] = timingOf(six.slice(0, 1)).rows("pulses-bootstrap");
    expect(row).toMatchObject({ outcome: "undefined", part: 1 });
    expect(others).toEqual([]);
  });
});

describe("surfaces", () => {
  const surface = horizon(28.6, { name: "floor", horizon: "floor", kind: "hiatus" });
  const zone: [number, number] = [-11, 0];

  it("are not asked about without a declared zone, and it says how to", () => {
    const { rows } = timingOf(six, { horizons: [surface] });
    expect(rows("shift")[0]).toMatchObject({ outcome: "not-applicable" });
    expect(rows("shift")[0].note).toMatch(/timing\.surfaces\.zone/);
  });

  it("count last finds in the windows below them", () => {
    const timing = { surfaces: { horizons: [], below: 0.7, zone } };
    const { rows } = timingOf(six, { horizons: [surface], timing });
    expect(rows("binomial")[0]).toMatchObject({ testStatistic: 2, taxa: 6, outcome: "closed" });
    expect(rows("binomial")[0].note).toMatch(/floor: 6\.4% of the zone/);
    expect(rows("shift")[0].p).toBeGreaterThan(0);
  });

  it("may be contacts of beds, and a clear cluster is told", () => {
    const bed = {
      baseM: 28.1,
      topM: 29,
      lithology: "limestone",
      baseContact: "hardground" as const,
      notes: "",
    };
    const place = section({ beds: [{ ...bed, origin: { file: "beds.csv", row: 2 } }] });
    const clustered = [28, 28.05, 28.02, 28.08, 27.99].map((last, i) => evenly(`Orvella ${i}`, last));
    const { rows, caution } = timingOf(clustered, {
      place,
      timing: { surfaces: { horizons: [], below: 0.2, zone } },
    });
    expect(rows("shift")[0]).toMatchObject({ testStatistic: 5, taxa: 5 });
    expect(caution("timing-clustered-at-surfaces")?.numbers).toMatchObject({ count: 5, taxa: 5 });
  });

  it("that are named but not placed are told", () => {
    const { caution, rows } = timingOf(six, { timing: { surfaces: { horizons: ["roof"], below: 1, zone } } });
    expect(caution("timing-surface-not-placed")?.numbers).toEqual({ name: "roof" });
    expect(rows("shift")[0].outcome).toBe("not-applicable");
  });
});

describe("an isolated highest find", () => {
  const leaked = taxon("Leaka alta", [1, 2, 2.5, 3, 4, 4.4, 5, 5.2, 6, 6.5, 7, 30.5]);

  it("is told, and every question is answered with and without it", () => {
    const { rows, caution, result } = timingOf([...six, leaked]);
    const row = rows("highest-find").find((a) => a.taxon === "Leaka alta");
    expect(row?.p).toBeCloseTo((6 / 29.5) ** 10, 15);
    expect(row?.note).toMatch(/isolated/);
    expect(caution("timing-isolated-finds")?.numbers).toEqual({ taxa: 1, names: "Leaka alta" });
    const without = result.answers.filter((a) => a.set === "candidates-without-isolated");
    expect(without.find((a) => a.method === "common-end-given")?.low).toBe(30);
    expect(rows("common-end-given")[0].low).toBe(30.5);
    expect(caution("timing-turns-on-isolated")?.numbers?.all).toBeGreaterThan(0.05);
  });

  it("that nothing has makes no other set", () => {
    expect(timingOf(six).sets).not.toContain("candidates-without-isolated");
  });
});

describe("finds that a reworking ceiling took out", () => {
  it("come back in a set of their own", () => {
    const before = [taxon(six[0].taxon, [...six[0].heightsM, 31.2]), ...six.slice(1)];
    const { rows, caution, sets } = timingOf(six, { untrimmed: before });
    expect(sets).toContain("candidates-untrimmed");
    expect(rows("common-end-given", "candidates-untrimmed")[0].low).toBe(31.2);
    expect(caution("timing-trimmed-finds")?.numbers).toEqual({ taxa: 1, names: six[0].taxon });
  });

  it("are not compared where none were", () => {
    expect(timingOf(six, { untrimmed: six }).sets).not.toContain("candidates-untrimmed");
  });
});

describe("pre-checks", () => {
  it("are pooled over taxa and told taxon by taxon, with the least decline that would be seen", () => {
    const { rows } = timingOf(six);
    for (const method of ["centroid", "distance", "gap-trend", "runs", "largest-gap"] as const)
      expect(rows(method)).toHaveLength(7);
    expect(rows("centroid")[0].note).toMatch(/decline/);
    expect(rows("gap-trend").at(-1)).toMatchObject({ taxon: "Orvella f", outcome: "undefined" });
  });
});

describe("the curve of last finds", () => {
  it("is given for the candidates and declared lists, observed and expected falling to none", () => {
    const sets = { few: six.slice(0, 3).map((t) => t.taxon) };
    const { result } = timingOf(six, { timing: { sets } });
    expect([...new Set(result.lastFinds.map(({ set }) => set))]).toEqual(["candidates", "few"]);
    const curve = result.lastFinds.filter(({ set }) => set === "candidates");
    expect(curve[0].positionM).toBe(27);
    expect(curve[0].observed).toBe(5);
    expect(curve.at(-1)).toMatchObject({ observed: 0, expected: 0, high: 0, highAll: 0 });
    curve.slice(1).forEach((point, i) => {
      expect(point.expected).toBeLessThanOrEqual(curve[i].expected);
      expect(point.lowAll).toBeLessThanOrEqual(point.low);
      expect(point.highAll).toBeGreaterThanOrEqual(point.high);
    });
  });
});
