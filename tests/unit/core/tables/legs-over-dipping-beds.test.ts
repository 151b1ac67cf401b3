import { describe, expect, it } from "vitest";
import type { Study } from "../../../../src/core/study/model.ts";
import { errorsOf, lines, problemsOf, sections, studyFrom } from "./study-files.ts";

const header =
  "section,leg,reading,position,tape_bearing_deg,tape_slope_deg,dip_deg,dip_direction_deg,overturned";
const finds = lines(
  "section,taxon,position,leg",
  "Orskel Ledge,Orvella tenuis,5,A",
  "Orskel Ledge,Orvella tenuis,15,A",
);
const study = (rows: readonly string[], more: Record<string, string> = {}): Study =>
  studyFrom({
    "sections.csv": sections,
    "legs.csv": lines(header, ...rows.map((row) => `Orskel Ledge,${row}`)),
    "occurrences.csv": finds,
    ...more,
  });
const legOf = (read: Study) =>
  read.sections[0].legs.map(({ readings, heightsM }) => ({
    readings,
    heightsM: heightsM.map((height) => Number(height.toFixed(9))),
  }));
const heightsOf = (read: Study) =>
  Array.from(read.sections[0].occurrences, ({ heightM }) => Number(heightM.toFixed(9)));
const codes = (read: Study) => read.problems.map(({ code }) => code).filter((code) => code !== "ungrouped");

describe("a leg over dipping beds", () => {
  it("has its positions computed from row to row, and places what was read on its tape", () => {
    const read = study(["A,0,100,,,,,", "A,10,,90,0,30,90,", "A,20,,90,-90,0,0,"]);
    expect(legOf(read)).toEqual([{ readings: [0, 10, 20], heightsM: [100, 105, 95] }]);
    const straight = study(["A,0,100,,,,,", "A,10,,90,0,30,90,", "A,20,,90,30,0,0,"]);
    expect(legOf(straight)).toEqual([{ readings: [0, 10, 20], heightsM: [100, 105, 110] }]);
    expect(heightsOf(straight)).toEqual([102.5, 107.5]);
    expect(codes(straight)).toEqual([]);
  });

  it("goes down in overturned beds that dip the way of the tape", () => {
    expect(legOf(study(["A,0,100,,,,,", "A,20,,90,0,30,90,yes"]))[0].heightsM).toEqual([100, 90]);
  });

  it("is computed back from a position given further on", () => {
    const read = study(["A,0,,90,0,30,90,", "A,10,,90,0,30,90,", "A,20,110,90,0,30,90,"]);
    expect(legOf(read)[0].heightsM).toEqual([100, 105, 110]);
    expect(codes(read)).toEqual([]);
  });

  it("may mix positions that were computed, given, and given beside the angles", () => {
    const read = study(["A,0,100,,,,,", "A,10,,90,0,30,90,", "A,20,112,,,,,", "A,30,,90,0,30,90,"]);
    expect(legOf(read)[0].heightsM).toEqual([100, 105, 112, 117]);
    expect(codes(read)).toEqual([]);
  });

  it("in a depth section gains height, not depth", () => {
    const read = study(["A,0,100,,,,,", "A,20,,90,0,30,90,"], {
      "sections.csv": lines("section,axis,unit", "Orskel Ledge,depth,ft"),
    });
    const [foot, gained] = [0.3048, 10 * 0.3048];
    expect(legOf(read)[0].heightsM).toEqual([
      Number((-100 * foot).toFixed(9)),
      Number((-100 * foot + gained).toFixed(9)),
    ]);
  });

  it("takes a strike by the right-hand rule for the dip direction, and headers as people write them", () => {
    const read = study([], {
      "legs.csv": lines(
        "section,traverse,tape,height (m),bearing (°),slope (deg),dip (°),right-hand strike (°)",
        "Orskel Ledge,A,0,100,,,,",
        "Orskel Ledge,A,20,,90,0,30,0",
      ),
    });
    expect(legOf(read)[0].heightsM).toEqual([100, 110]);
    expect(codes(read)).toEqual([]);
  });

  it("never takes a bare strike for one by the right-hand rule", () => {
    const read = study([], {
      "legs.csv": lines(
        "section,leg,reading,position,bearing,slope,dip,strike",
        "Orskel Ledge,A,0,100,,,,",
        "Orskel Ledge,A,20,,90,0,30,0",
      ),
    });
    expect(codes(read)).toContain("unknown-column");
    expect(problemsOf(read, "one-of")).toMatchObject([{ severity: "error", file: "legs.csv", row: 3 }]);
  });
});

describe("a leg that cannot be computed", () => {
  it.each([
    ["an angle lacks", ["A,0,100,,,,,", "A,10,,90,,30,90,"], "one-of", 3],
    ["no row has a position", ["A,0,,90,0,30,90,", "A,20,,90,0,30,90,"], "leg-not-tied", 2],
    ["angles lack on the way back", ["A,0,,90,0,30,90,", "A,20,100,,,,,"], "leg-not-tied", 2],
  ])("because %s is told at its row, and what was read on it once", (_, rows, code, row) => {
    const read = study(rows);
    expect(problemsOf(read, code)).toMatchObject([{ severity: "error", file: "legs.csv", row }]);
    expect(read.sections[0].legs).toEqual([]);
    expect(heightsOf(read)).toEqual([]);
    expect(problemsOf(read, "leg-left-out")).toMatchObject([
      { file: "occurrences.csv", row: 2, column: "leg", found: "A (and 1 more row)" },
    ]);
  });

  it.each([
    ["steep", "not-a-number"],
    ["95", "out-of-limits"],
  ])("from a dip of %s on ends before it, and never leaps over it", (dip, code) => {
    const read = study(["A,0,100,,,,,", "A,10,,90,0,30,90,", `A,12,,90,0,${dip},90,`, "A,20,,90,0,30,90,"]);
    expect(problemsOf(read, code)).toMatchObject([{ row: 4, column: "dip_deg", found: dip }]);
    expect(problemsOf(read, "leg-row-lost")).toMatchObject([{ severity: "error", row: 4, found: "12" }]);
    expect(legOf(read)).toEqual([{ readings: [0, 10], heightsM: [100, 105] }]);
    expect(heightsOf(read)).toEqual([102.5]);
    expect(problemsOf(read, "outside-leg")).toMatchObject([{ file: "occurrences.csv", row: 3, found: "15" }]);
  });

  it("because a reading is no number is left out whole: nobody can say where it ends", () => {
    const read = study(["A,0,100,,,,,", "A,1O,,90,0,30,90,", "A,20,,90,0,30,90,"]);
    expect(read.sections[0].legs).toEqual([]);
    expect(problemsOf(read, "leg-row-lost")).toMatchObject([{ row: 3, found: "1O" }]);
  });

  it("because one of its rows goes by another name ends before that row", () => {
    const read = study(["A,0,100,,,,,", "A,10,,90,0,30,90,", "Aa,12,,90,0,40,90,", "A,20,,90,0,30,90,"]);
    expect(problemsOf(read, "short-leg")).toMatchObject([{ row: 4, found: "Aa" }]);
    expect(problemsOf(read, "leg-row-lost")).toMatchObject([{ row: 4 }]);
    expect(legOf(read)).toEqual([{ readings: [0, 10], heightsM: [100, 105] }]);
  });

  it("takes no other leg with it", () => {
    const legB = ["B,0,0,,,,,", "B,5,,90,0,30,90,", "B,10,,90,0,x,90,"];
    const read = study([...legB, "A,0,100,,,,,", "A,20,,90,0,30,90,"]);
    expect(read.sections[0].legs.map(({ name }) => name)).toEqual(["B", "A"]);
    expect(heightsOf(read)).toEqual([102.5, 107.5]);
    expect(errorsOf(read).map(({ row }) => row)).toEqual([4, 4]);
  });

  it("because strike and dip direction contradict each other says what the strike means", () => {
    const read = study([], {
      "legs.csv": lines(
        "section,leg,reading,position,tape_bearing_deg,tape_slope_deg,dip_deg,dip_direction_deg,strike_right_hand_deg",
        "Orskel Ledge,A,0,100,,,,,",
        "Orskel Ledge,A,10,,90,0,30,90,180",
        "Orskel Ledge,A,20,,90,0,30,90,0",
      ),
    });
    expect(problemsOf(read, "strike-contradicted")).toMatchObject([
      { row: 3, column: "dip_direction_deg", found: "90", expected: expect.stringContaining("270") },
    ]);
    expect(read.sections[0].legs).toEqual([]);
  });
});

describe("a leg that is computed, but look", () => {
  it("where the tape runs along the beds", () => {
    const read = study(["A,0,100,,,,,", "A,20,,0,0,30,90,"]);
    expect(problemsOf(read, "tape-along-bedding")).toMatchObject([
      { severity: "caution", row: 3, column: "dip_deg", found: "0 m of rock on 20 m of tape" },
    ]);
  });

  it("where a given position is another than tape and dip say", () => {
    const told = problemsOf(study(["A,0,100,,,,,", "A,20,118,90,0,30,90,"]), "leg-misfit");
    expect(told).toMatchObject([
      {
        severity: "caution",
        row: 3,
        column: "position",
        found: "118",
        expected: "about 110 m, as tape and dip say",
      },
    ]);
    expect(problemsOf(study(["A,0,100,,,,,", "A,20,110.9,90,0,30,90,"]), "leg-misfit")).toEqual([]);
  });

  it("where it turns back", () => {
    const read = study(["A,0,100,,,,,", "A,10,,90,0,30,90,", "A,20,,270,0,30,90,", "A,40,,90,0,30,90,"]);
    expect(problemsOf(read, "leg-turns-back")).toMatchObject([
      { row: 4, column: "position", found: "computed: 100 m" },
    ]);
  });

  it("where its readings go back from row to row", () => {
    const rows = ["A,0,100,,,,,", "A,10,,90,0,30,90,", "A,-20,,90,0,30,90,"];
    expect(problemsOf(study(rows), "readings-out-of-order")).toMatchObject([
      { severity: "caution", row: 4, column: "reading", found: "-20" },
    ]);
    const given = ["A,10,105,,,,,", "A,0,100,,,,,", "A,20,110,,,,,"];
    expect(codes(study(given))).toEqual([]);
  });
});

describe("two legs that overlap", () => {
  const rows = ["A,0,0,,,,,", "A,40,,90,0,30,90,", "B,0,15,,,,,", "B,40,,120,5,30,90,"];
  const gainB =
    40 *
    (Math.cos(Math.PI / 6) * Math.sin(Math.PI / 36) + 0.5 * Math.cos(Math.PI / 36) * Math.cos(Math.PI / 6));

  it("hold one horizon where a level is met on both", () => {
    const onB = ((18 - 15) / gainB) * 40;
    const read = study(rows, {
      "occurrences.csv": lines(
        "section,taxon,position,leg",
        "Orskel Ledge,Orvella tenuis,36,A",
        `Orskel Ledge,Orvella tenuis,${onB},B`,
        "Orskel Ledge,Orvella tenuis,10,A",
      ),
    });
    expect(read.sections[0].legs[1].heightsM[1]).toBeCloseTo(15 + gainB, 9);
    const heights = Array.from(read.sections[0].occurrences, ({ heightM }) => heightM);
    expect(heights[1]).toBe(heights[0]);
    expect(codes(read)).toEqual([]);
  });
});
