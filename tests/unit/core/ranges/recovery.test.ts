import { describe, expect, it } from "vitest";
import { interiorFinds } from "../../../../src/core/ranges/interior-finds.ts";
import { estimateRanges } from "../../../../src/core/ranges/range-ends.ts";
import { coordinateFor, recoveryOf } from "../../../../src/core/ranges/recovery.ts";
import { faciesRecovery, faciesStretches } from "../../../../src/core/ranges/recovery-facies.ts";
import { recoveryTrend } from "../../../../src/core/ranges/recovery-trend.ts";
import type { LocalTaxon } from "../../../../src/core/study/finds-result.ts";
import type { Bed, RecoveryPoint, Section } from "../../../../src/core/study/model.ts";
import type { Settings } from "../../../../src/core/study/settings.ts";
import { candidate, covered, horizon, markers, section, study, taxon } from "./small-study.ts";

const origin = { file: "test.csv", row: 2 };
const bed = (baseM: number, topM: number, facies: string): Bed => ({
  baseM,
  topM,
  lithology: "marl",
  facies,
  notes: "",
  origin,
});
const point = (heightM: number, recovery: number, group = "shells"): RecoveryPoint => ({
  group,
  heightM,
  recovery,
  origin,
});
const placeOf = (of: Section, taxa: readonly LocalTaxon[] = []) => ({ section: of, group: "shells", taxa });
const from = (recovery: Settings["ranges"]["recovery"]) => (s: Settings) => ({
  ...s,
  ranges: { ...s.ranges, recovery, methods: ["recovery", "uniform", "window"] as const satisfies string[] },
});

function rangesOf(of: LocalTaxon, place: Section, recovery: Settings["ranges"]["recovery"]) {
  const ranges = estimateRanges(
    study([place], (s) => ({ ...from(recovery)(s), ranges: { ...from(recovery)(s).ranges } })),
    { taxa: [of], candidates: [candidate(of)], markers: markers() },
  );
  const row = (method: string, end = "top") => {
    const found = ranges.ends.find((e) => e.method === method && e.end === end);
    if (found === undefined) throw new Error(`no row of ${method}`);
    return found;
  };
  return { row, codes: ranges.cautions.map((c) => c.code) };
}

describe("recovery from a table", () => {
  const rows = [point(0, 1), point(10, 1), point(10, 3), point(40, 3)];

  it("is linear between rows, a repeated position a jump, whichever way the rows run", () => {
    const up = coordinateFor(placeOf(section({ recovery: rows })), "table");
    const down = coordinateFor(placeOf(section({ recovery: rows.toReversed() })), "table");
    const ratio = (c: typeof up) =>
      (c.toEffective(20) - c.toEffective(10)) / (c.toEffective(10) - c.toEffective(0));
    expect(ratio(up)).toBeCloseTo(3, 12);
    expect(ratio(down)).toBeCloseTo(3, 12);
    const ramp = coordinateFor(placeOf(section({ recovery: [point(0, 0), point(40, 2)] })), "table");
    expect(ramp.toEffective(20) / ramp.toEffective(40)).toBeCloseTo(0.25, 12);
  });

  it("has a mean of 1 over searchable rock, and stays as at its edges beyond", () => {
    const place = section({ recovery: rows, intervals: [covered(20, 24)] });
    const coordinate = coordinateFor(placeOf(place), "table");
    expect(coordinate.toEffective(40) - coordinate.toEffective(0)).toBeCloseTo(36, 12);
    expect(coordinate.toEffective(20)).toBe(coordinate.toEffective(24));
    const beyond = coordinate.toEffective(41) - coordinate.toEffective(40);
    expect(beyond).toBeCloseTo(coordinate.toEffective(40) - coordinate.toEffective(39), 12);
  });

  it("speaks of its own group alone", () => {
    const place = section({ recovery: [point(0, 1, "spores")] });
    expect(recoveryOf(placeOf(place), "table")).toMatchObject({ kind: "unavailable" });
  });

  it("moves the bound of every method but uniform, and tells how much it leans on recovery", () => {
    const place = section({ recovery: [point(0, 1), point(16, 1), point(16, 0.2), point(40, 0.2)] });
    const { row } = rangesOf(taxon("Orbula vesta", [2, 4, 7, 11, 15]), place, "table");
    const plain = 15 + 13 * (0.05 ** (-1 / 4) - 1);
    expect(row("uniform").highM).toBeCloseTo(plain, 9);
    expect(row("recovery").highM).toBeCloseTo(16 + (plain - 16) / 0.2, 9);
    expect(row("window").highM).toBeCloseTo(row("recovery").highM ?? 0, 9);
    expect(row("recovery").note).toMatch(/recovery from table.*fit of 3 finds.*recovery constant 29.492 m/);
  });

  it("gives no bound where finds lie in rock of declared recovery 0, and says so", () => {
    const place = section({ recovery: [point(0, 1), point(6, 1), point(6, 0), point(9, 0), point(9, 1)] });
    const { row, codes } = rangesOf(taxon("Orbula vana", [2, 4, 7, 11]), place, "table");
    expect(row("recovery").outcome).toBe("undefined");
    expect(row("uniform").outcome).not.toBe("undefined");
    expect(codes).toContain("range-recovery-contradicted");
  });

  it("is told to misfit where finds crowd where it says that there are few", () => {
    const crowd = taxon("Orbula densa", [2, 20, 21, 22, 23, 24, 25, 26, 27, 30]);
    const codes = (rows: readonly RecoveryPoint[]) =>
      rangesOf(crowd, section({ recovery: rows }), "table").codes;
    expect(codes([point(0, 5), point(19, 5), point(19, 1), point(40, 1)])).toContain("range-recovery-misfit");
    expect(codes([point(0, 0.1), point(19, 0.1), point(19, 5), point(40, 5)])).not.toContain(
      "range-recovery-misfit",
    );
  });

  it("is open where recovery ends at 0, with the level reached at the section's top", () => {
    const place = section({ recovery: [point(0, 1), point(30, 1), point(40, 0)] });
    const { row } = rangesOf(taxon("Orbula rara", [10, 28]), place, "table");
    expect(row("recovery").outcome).toBe("open");
    // U from 10 to 28 is 18, from 28 to the top 2 + 5: C = 1 - 18 / 25.
    expect(row("recovery").note).toMatch(/section's top is reached at level 0.28/);
  });
});

describe("recovery from effort", () => {
  it("is effort per metre: equal steps of U between levels of equal effort, whatever their distance", () => {
    const place = section();
    const searches = [0, 1, 2, 10, 20, 40].map((heightM) => ({
      sample: `s${heightM}`,
      group: "shells",
      heightM,
      effort: 2,
      effortUnit: "kg",
      counting: "presence" as const,
      derived: false,
    }));
    const u = coordinateFor(placeOf({ ...place, searches }), "effort").toEffective;
    const steps = [1, 2, 10, 20, 40].map((top, i) => u(top) - u([0, 1, 2, 10, 20][i]));
    for (const step of steps) expect(step).toBeCloseTo(8, 12);
  });

  it("needs every effort, in one unit", () => {
    expect(recoveryOf(placeOf(section()), "effort")).toMatchObject({ reason: "no effort given" });
    const place = section({ efforts: [1, 2] });
    const mixed = place.searches.map((s, i) => (i === 3 ? { ...s, effortUnit: "g" } : s));
    expect(recoveryOf(placeOf({ ...place, searches: mixed }), "effort")).toMatchObject({
      reason: "efforts in different units",
    });
    const { codes } = rangesOf(taxon("Orbula vesta", [2, 4, 7]), section(), "effort");
    expect(codes).toContain("range-recovery-unavailable");
  });
});

describe("recovery from facies", () => {
  it("is the density of finds between first and last ones, drawn towards the mean by one find", () => {
    const stretches = faciesStretches([bed(0, 20, "shelf"), bed(20, 40, "basin")], [0, 40]);
    const finds = taxon("Orbula facilis", [0, 2, 4, 6, 8, 10, 12, 14, 16, 30, 40]);
    const interior = interiorFinds(finds, []);
    if (interior === undefined) throw new Error("finds between first and last");
    const [shelf, basin] = faciesRecovery([interior], stretches);
    expect([shelf.finds, basin.finds]).toEqual([8, 1]);
    expect(shelf.expected).toBeCloseTo(4.5, 12);
    // r_f (E_f + 1) = N_f + 1 with E_f = 9 * 20 / (20 r_1 + 20 r_2).
    const e = 9 / (shelf.recovery + basin.recovery);
    expect(shelf.recovery * (e + 1)).toBeCloseTo(9, 6);
    expect(basin.recovery * (e + 1)).toBeCloseTo(2, 6);
  });

  it("uses the lithology where no facies is given, and is not to be had without beds", () => {
    const plain = { ...bed(0, 20, ""), facies: undefined };
    expect(faciesStretches([plain], [0, 40]).map((s) => s.facies)).toEqual(["marl", ""]);
    expect(recoveryOf(placeOf(section(), [taxon("Orbula a", [1, 2, 3])]), "facies")).toMatchObject({
      reason: "no beds",
    });
  });
});

describe("recovery as a fitted trend", () => {
  it("is flat for finds placed evenly, and steep where they crowd at one end", () => {
    const even = interiorFinds(taxon("Orbula a", [0, 10, 20, 30, 40]), []);
    const low = interiorFinds(taxon("Orbula b", [0, 1, 2, 3, 5, 9, 40]), []);
    if (even === undefined || low === undefined) throw new Error("finds between first and last");
    expect(recoveryTrend([even, even], 40)).toBeCloseTo(0, 8);
    const beta = recoveryTrend([low], 40) ?? 0;
    // Mean of an exponential with rate 0.25 cut at 40 is 4 - 40 / (e^10 - 1); the finds' mean is 4.
    expect(4 + 1 / beta).toBeLessThan(0.02);
    expect(recoveryTrend([even], 40)).toBeUndefined();
  });
});

describe("missing rock", () => {
  it("is named with the level that reaches it, and with the chance that a fault hides the end", () => {
    const hiatus = {
      name: "gap-1",
      kind: "hiatus" as const,
      heightM: 20,
      belowM: 0,
      aboveM: 0,
      shape: "normal" as const,
      notes: "",
      origin,
    };
    const cut = { ...covered(21, 21), kind: "fault-cut" as const, thicknessLowM: 0.5, thicknessHighM: 3 };
    const place = section({ horizons: [hiatus], intervals: [cut] });
    const { row } = rangesOf(taxon("Orbula vesta", [2, 5, 9, 13, 18]), place, "uniform");
    expect(row("uniform").note).toMatch(/hiatus gap-1 at 20 m lies inside, as for every level above 0.3757/);
    expect(row("uniform").note).toMatch(/fault at 21 m hides 0.5 m to 3 m of rock/);
  });
});

it("asks of a base only where the main horizon lies below the first find", () => {
  const of = taxon("Orbula nova", [20, 24, 30]);
  const rowsWith = (positionM: number) =>
    estimateRanges(study([section()], from("uniform")), {
      taxa: [of],
      candidates: [candidate(of)],
      markers: markers(horizon(positionM)),
    }).ends.filter((e) => e.end === "base");
  expect(rowsWith(35).map((e) => e.horizon)).toEqual([undefined, undefined, undefined]);
  const below = rowsWith(15).find((e) => e.method === "uniform");
  expect(below?.reachLevel).toBeCloseTo(1 - (10 / 15) ** 2, 12);
});
