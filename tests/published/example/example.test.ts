import { readdirSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import * as v from "valibot";
import { describe, expect, it } from "vitest";
import { analyse } from "../../../src/core/analysis.ts";
import { readStudy } from "../../../src/core/tables/read-study.ts";
import { resultTables } from "../../../src/report/tables/index.ts";
import type { Cell } from "../../../src/report/tables/result-table.ts";

/*
 * The Veyra Shelf example, recomputed from its raw tables by recompute.py (NumPy, SciPy, exact rationals; the versions
 * stand in example.json), which shares no line with the program.
 */
const row = v.record(v.string(), v.union([v.string(), v.number()]));
const marker = v.objectWithRest(
  { section: v.string(), aicc: v.record(v.string(), v.number()) },
  v.union([v.string(), v.number()]),
);
const finds = v.array(v.tuple([v.number(), v.string()]));
const recorded = v.parse(
  v.looseObject({
    madeBy: v.string(),
    finds,
    markers: v.array(marker),
    anomalies: v.array(row),
    alignment: v.array(row),
    candidates: v.array(row),
    ranges: v.array(row),
    timing: v.array(row),
  }),
  JSON.parse(readFileSync(new URL("./example.json", import.meta.url), "utf8")),
);

type Row = ReadonlyMap<string, Cell>;

const folder = fileURLToPath(new URL("../../../datasets/veyra-shelf", import.meta.url));
const files = readdirSync(folder).filter((name) => !name.endsWith(".md"));
const study = readStudy(
  new Map(files.map((name) => [name, new Uint8Array(readFileSync(`${folder}/${name}`))])),
);
const analysis = analyse(study);
const tables = new Map(
  resultTables(analysis).map(({ name, columns, rows }) => [
    name,
    rows.map((cells): Row => new Map(columns.map((column, i) => [column.name, cells[i]]))),
  ]),
);

/** Closed forms differ by rounding alone. */
const CLOSED = 1e-9;
/** h0 of a simplex at rest (1e-4 of ln L) carries about 3e-7 m into what is judged against H. */
const AT_MAIN_HORIZON = 2e-5;
/** Profile-likelihood limits of h0 and L by two searches: 4e-5 m where the base of the smear is at a sample's edge. */
const PROFILE = 1e-5;
/** p at an interval's end moves with that end: 4e-5 m of it are 1.5e-3 of a p of 0.016. */
const AT_INTERVAL_END = 3e-3;
/** Two streams of 20000 draws: the standard error of a 2.5 % point is 0.02 standard deviations each. */
const SIMULATED = 3e-3;

type Tolerances = Readonly<Record<string, number>>;

interface Comparison {
  readonly table: string;
  readonly rows: readonly v.InferOutput<typeof row>[];
  readonly keys: readonly string[];
  readonly words?: readonly string[];
  readonly numbers: Tolerances;
  readonly tolerancesOf?: (row: Row) => Tolerances;
}

const written = (cell: Cell) => (typeof cell === "number" ? cell.toFixed(8) : (cell ?? ""));

/** Every recorded number against the program's; a blank must be a blank. Lists what differs. */
function differences({ table, rows, keys, words = [], numbers, tolerancesOf }: Comparison): string[] {
  const keyOf = (get: (name: string) => Cell) => keys.map((name) => written(get(name))).join(" | ");
  const ours = new Map((tables.get(table) ?? []).map((r) => [keyOf((name) => r.get(name)), r]));
  return rows.flatMap((expected) => {
    const key = keyOf((name) => expected[name]);
    const got = ours.get(key);
    if (got === undefined) return [`${key}: no row`];
    const tolerances = { ...numbers, ...tolerancesOf?.(got) };
    return [
      ...words.flatMap((name) =>
        got.get(name) === expected[name] ? [] : [`${key}: ${name} ${got.get(name)}, not ${expected[name]}`],
      ),
      ...Object.entries(tolerances).flatMap(([name, tolerance]) =>
        isNear(got.get(name), expected[name], tolerance)
          ? []
          : [`${key}: ${name} ${got.get(name)}, not ${expected[name]}`],
      ),
    ];
  });
}

/** Relative, to no less than 1e-3: a level of 0.0178 known to 2e-7 is known well enough. */
function isNear(got: Cell, expected: unknown, tolerance: number): boolean {
  if (typeof expected !== "number" || typeof got !== "number") return got === expected;
  return Math.abs(got - expected) <= tolerance * Math.max(Math.abs(expected), tolerance > CLOSED ? 1e-3 : 0);
}

const rowsOf = (table: string, select: (r: Row) => boolean = () => true) =>
  (tables.get(table) ?? []).filter(select).length;

describe("the example, recomputed elsewhere", () => {
  it("sets aside the same finds for the same reasons", () => {
    const setAside = analysis.finds
      .filter((find) => find.used !== "yes")
      .map((find): [number, string] => [find.origin.row, find.reason]);
    expect(setAside.toSorted((a, b) => a[0] - b[0])).toEqual(recorded.finds);
  });

  it("gives every taxon the same role, horizons and reworking ceiling", () => {
    expect(rowsOf("candidates")).toBe(recorded.candidates.length);
    expect(
      differences({
        table: "candidates",
        rows: recorded.candidates,
        keys: ["section", "taxon"],
        words: ["role", "reaches_top", "horizons"],
        numbers: { first_m: CLOSED, last_m: CLOSED, reworking_ceiling_m: AT_MAIN_HORIZON },
      }),
    ).toEqual([]);
  });

  it("has the same background of iridium, p, q and flags", () => {
    const inText = { p: 1e-6, q: 1e-6, background: 1e-7, threshold: 1e-7 };
    expect(rowsOf("anomalies", (r) => r.get("analyte") === "iridium")).toBe(recorded.anomalies.length);
    const rows = recorded.anomalies.map((r) => ({ ...r, analyte: "iridium" }));
    const keys = ["section", "analyte", "sample"];
    expect(differences({ table: "anomalies", rows, keys, words: ["flagged"], numbers: inText })).toEqual([]);
  });

  it("finds the same event surface, mixing length and fluence", () => {
    const rows = recorded.markers.map(({ aicc: _aicc, ...r }) => ({ ...r, horizon: "iridium-1" }));
    const numbers = {
      position_m: 1e-7,
      low_m: PROFILE,
      high_m: PROFILE,
      mixing_length_m: PROFILE,
      mixing_low_m: PROFILE,
      mixing_high_m: PROFILE,
      fluence_ng_cm2: 1e-8,
      fluence_low: SIMULATED,
      fluence_high: SIMULATED,
    };
    expect(differences({ table: "markers", rows, keys: ["section", "horizon"], numbers })).toEqual([]);
  });

  it("compares the mixing models alike", () => {
    for (const { section, aicc, box_fluence, variance_analytic, variance_background } of recorded.markers) {
      const profile = analysis.markers.profiles.find((p) => p.section === section && p.analyte === "iridium");
      const [anomaly] = profile?.anomalies ?? [];
      const found = Object.fromEntries(anomaly?.models.map((model) => [model.id, model.aicc]) ?? []);
      expect(Object.keys(aicc)).toEqual(Object.keys(found));
      for (const [id, value] of Object.entries(aicc))
        expect(Math.abs((found[id] ?? Number.NaN) - value), `${section} ${id}`).toBeLessThan(1e-3);
      const box = anomaly?.models.find((model) => model.id === "M2");
      expect(isNear(box?.fluence, box_fluence, 1e-5), `${section} F`).toBe(true);
      expect(isNear(anomaly?.fluence?.variance.analytic, variance_analytic, 1e-7)).toBe(true);
      expect(isNear(anomaly?.fluence?.variance.background, variance_background, 1e-6)).toBe(true);
    }
  });

  it("lays the samples on one scale", () => {
    const numbers = { common: 1e-5, low: 5e-5, high: 5e-5 };
    const { alignment: rows } = recorded;
    expect(differences({ table: "alignment", rows, keys: ["section", "position_m"], numbers })).toEqual([]);
  });

  it("bounds every range alike by uniform, window and sampled", () => {
    const recomputed = new Set<Cell>(["uniform", "window", "sampled"]);
    const isTop = (r: Row) => r.get("end") === "top" && recomputed.has(r.get("method"));
    expect(rowsOf("range-ends", isTop)).toBe(recorded.ranges.length);
    expect(
      differences({
        table: "range-ends",
        rows: recorded.ranges.map((r) => ({ ...r, end: "top" })),
        keys: ["section", "taxon", "identification", "method", "end"],
        words: ["outcome"],
        numbers: {
          point_m: CLOSED,
          low_m: CLOSED,
          high_m: CLOSED,
          reach_level: AT_MAIN_HORIZON,
          p: AT_MAIN_HORIZON,
          evidence_ratio: AT_MAIN_HORIZON,
        },
      }),
    ).toEqual([]);
  });

  it("answers about every set alike whether one level, where, at which horizon and how gradual", () => {
    const recomputed = new Set<Cell>([
      "common-end",
      "common-end-given",
      "common-end-joint",
      "confidence-levels",
      "combined",
      "duration-lower",
      "duration-box",
      "centroid",
    ]);
    const compared = new Set<Cell>(["candidates-untrimmed", "candidates-without-isolated"]);
    const isRecomputed = (r: Row) =>
      recomputed.has(r.get("method")) && !compared.has(r.get("set")) && r.get("section") !== "joint";
    expect(rowsOf("timing", isRecomputed)).toBe(recorded.timing.length);
    const closed = {
      test_statistic: CLOSED,
      df: CLOSED,
      p: CLOSED,
      estimate: CLOSED,
      low: CLOSED,
      high: CLOSED,
    };
    expect(
      differences({
        table: "timing",
        rows: recorded.timing,
        keys: ["section", "set", "taxon", "method", "horizon", "taxa"],
        words: ["outcome"],
        numbers: closed,
        tolerancesOf: (r): Tolerances =>
          r.get("question") === "at-horizon" ? { p: AT_INTERVAL_END, estimate: PROFILE } : {},
      }),
    ).toEqual([]);
  });
});
