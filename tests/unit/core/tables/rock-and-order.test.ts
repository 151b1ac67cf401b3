import { describe, expect, it } from "vitest";
import { lines, problemsOf, sections, studyFrom } from "./study-files.ts";

const bedsOf = (rows: readonly string[], intervals: readonly string[] = []) =>
  studyFrom({
    "sections.csv": sections,
    "beds.csv": lines("section,base,top,lithology", ...rows.map((row) => `Orskel Ledge,${row},marl`)),
    ...(intervals.length === 0
      ? {}
      : {
          "intervals.csv": lines(
            "section,kind,base,top",
            ...intervals.map((row) => `Orskel Ledge,covered,${row}`),
          ),
        }),
  });

describe("beds", () => {
  it("that overlap are told once for the section, with their number, and stay", () => {
    const study = bedsOf(["0,2", "1.5,3", "3,4", "3.2,3.4"]);
    expect(problemsOf(study, "beds-overlap")).toMatchObject([
      {
        severity: "caution",
        file: "beds.csv",
        row: 3,
        column: "base",
        found: "1.5 m, where the bed below reaches 2 m (and 1 more row)",
      },
    ]);
    expect(study.sections[0].beds).toHaveLength(4);
  });

  it("that leave gaps are told once, from the first bed above one", () => {
    expect(problemsOf(bedsOf(["0,2", "3,4", "4,5", "5.5,6"]), "beds-gap")).toMatchObject([
      { severity: "caution", row: 3, column: "base", found: "nothing from 2 m to 3 m (and 1 more row)" },
    ]);
  });

  it.each([
    ["that follow on each other", ["0,0.1", "0.1,0.3", "0.3,0.9"], []],
    ["with a covered interval between them", ["0,2", "3,4"], ["2,3"]],
    ["with a covered interval that reaches into them", ["0,2", "3,4"], ["1,3.5"]],
    ["with a covered interval apart, above the log", ["0,2"], ["5,6"]],
    ["with a covered interval apart, below the log", ["3,4"], ["0,1"]],
  ])("%s are as they should be", (_, rows, intervals) => {
    const study = bedsOf(rows, intervals);
    expect([...problemsOf(study, "beds-gap"), ...problemsOf(study, "beds-overlap")]).toEqual([]);
  });
});

const samplesOf = (...rows: readonly string[]) =>
  studyFrom({
    "sections.csv": sections,
    "legs.csv": lines(
      "section,leg,reading,position",
      ...["A", "B"].flatMap((leg) => [`Orskel Ledge,${leg},0,0`, `Orskel Ledge,${leg},9,9`]),
    ),
    "samples.csv": lines("section,sample,base,top,position,leg", ...rows.map((row) => `Orskel Ledge,${row}`)),
    "searches.csv": lines(
      "section,sample,group",
      ...rows.map((row) => `Orskel Ledge,${row.split(",")[0]},bivalves`),
    ),
  });

describe("samples that share rock", () => {
  it("are told with both names where both were searched for one group, and are kept", () => {
    const study = samplesOf("OL-1,0,1,,", "OL-2,0.9,2,,", "OL-3,2,3,,");
    expect(problemsOf(study, "samples-overlap")).toMatchObject([
      {
        severity: "caution",
        file: "samples.csv",
        row: 3,
        column: "sample",
        found: "OL-2 and OL-1",
        expected: "samples searched for bivalves that share no rock",
      },
    ]);
    expect(study.sections[0].samples).toHaveLength(3);
  });

  it.each([
    ["they touch", ["OL-1,0,1,,", "OL-2,1,2,,"]],
    ["one is a point", ["OL-1,0,1,,", "OL-2,,,0.5,"]],
    ["they lie on two legs", ["OL-1,0,1,,A", "OL-2,0.5,2,,B"]],
  ])("are none where %s", (_, rows) => {
    expect(problemsOf(samplesOf(...rows), "samples-overlap")).toEqual([]);
  });

  it("are none that matter where they were taken for different ends, until both are measured alike", () => {
    const files = {
      "sections.csv": sections,
      "samples.csv": lines("section,sample,base,top", "Orskel Ledge,OL-1,0,1", "Orskel Ledge,OL-2,0.5,2"),
      "searches.csv": lines("section,sample,group", "Orskel Ledge,OL-1,bivalves", "Orskel Ledge,OL-2,algae"),
    };
    expect(problemsOf(studyFrom(files), "samples-overlap")).toEqual([]);
    const measured = lines(
      "section,analyte,value,unit,sample",
      ...["OL-1", "OL-2"].map((sample) => `Orskel Ledge,iridium,1,ng/g,${sample}`),
    );
    const told = problemsOf(studyFrom({ ...files, "measurements.csv": measured }), "samples-overlap");
    expect(told).toMatchObject([{ row: 3, expected: "samples measured for iridium that share no rock" }]);
  });
});

const datedOf = (axis: "height" | "depth", ...rows: readonly string[]) =>
  studyFrom({
    "sections.csv": lines("section,axis,unit", `Orskel Ledge,${axis},m`),
    "horizons.csv": lines(
      "section,horizon,kind,position,age_ma,age_error_ma,age_error_kind",
      ...rows.map((row) => `Orskel Ledge,${row}`),
    ),
  });

describe("ages against height", () => {
  it("an older age above a younger one is told beyond twice the error of their difference", () => {
    const study = datedOf("height", "Rim,ash,2,83.5,0.01,1s", "Rum,ash,5,83.6,0.01,1s");
    expect(problemsOf(study, "ages-out-of-order")).toMatchObject([
      {
        severity: "caution",
        file: "horizons.csv",
        row: 3,
        column: "age_ma",
        found: "Rum at 83.6 Ma, above Rim at 83.5 Ma",
      },
    ]);
    expect(study.sections[0].horizons).toHaveLength(2);
  });

  it("is told over an undated horizon between them", () => {
    const study = datedOf("height", "Rim,ash,2,83.5,,", "Ram,ash,3,,,", "Rum,ash,5,83.6,,");
    expect(problemsOf(study, "ages-out-of-order")).toHaveLength(1);
  });

  it.each([
    ["younger above", "height", ["Rim,ash,2,83.6,0.01,1s", "Rum,ash,5,83.5,0.01,1s"]],
    ["older above within the error", "height", ["Rim,ash,2,83.5,0.05,1s", "Rum,ash,5,83.6,0.05,1s"]],
    ["older at the greater depth", "depth", ["Rim,ash,2,83.5,0.01,1s", "Rum,ash,5,83.6,0.01,1s"]],
  ] as const)("%s is as it should be", (_, axis, rows) => {
    expect(problemsOf(datedOf(axis, ...rows), "ages-out-of-order")).toEqual([]);
  });
});

const inTwo = (rows: readonly string[], settings?: unknown) =>
  problemsOf(
    studyFrom(
      {
        "sections.csv": lines("section,axis,unit", "Orskel Ledge,height,m", "Tamber Quarry,height,cm"),
        "horizons.csv": lines("section,horizon,kind,position,below,above", ...rows),
      },
      settings,
    ),
    "horizon-order",
  );
const base = ["Orskel Ledge,Rim,ash,2,,", "Orskel Ledge,Rum,ash,5,,"];

describe("the order of horizons", () => {
  it("that differs between sections is told with both", () => {
    expect(inTwo([...base, "Tamber Quarry,Rim,ash,300,,", "Tamber Quarry,Rum,ash,200,,"])).toMatchObject([
      {
        severity: "caution",
        row: 4,
        column: "horizon",
        found: "Rim above Rum in Tamber Quarry (300 cm)",
        expected: "Rim below Rum, as in Orskel Ledge",
      },
    ]);
  });

  it("is the same where one lies above the other, or their positions are not sure enough to tell", () => {
    expect(inTwo([...base, "Tamber Quarry,Rim,ash,100,,", "Tamber Quarry,Rum,ash,200,,"])).toEqual([]);
    expect(inTwo([...base, "Tamber Quarry,Rim,ash,300,30,30", "Tamber Quarry,Rum,ash,200,30,30"])).toEqual(
      [],
    );
  });

  it("goes by the one name declared for two", () => {
    const other = ["Tamber Quarry,Rim,ash,300,,", "Tamber Quarry,Ron,ash,200,,"];
    expect(inTwo([...base, ...other])).toEqual([]);
    const pairs = [
      ["Orskel Ledge", "Rum"],
      ["Tamber Quarry", "Ron"],
    ];
    const same = { boundary: { same: [{ name: "Rum", horizons: pairs }] } };
    expect(inTwo([...base, ...other], same)).toHaveLength(1);
  });
});

describe("beds and published ranges outside the section's declared ends", () => {
  it("are told with the end that lies outside; a bed that goes on beyond them is not", () => {
    const study = studyFrom({
      "sections.csv": lines("section,axis,unit,bottom,top", "Orskel Ledge,depth,m,40,10"),
      "beds.csv": lines(
        "section,base,top,lithology",
        "Orskel Ledge,42,12,marl",
        "Orskel Ledge,12,9,marl",
        "Orskel Ledge,9,8,marl",
      ),
      "published-ranges.csv": lines(
        "section,taxon,first,last,horizons",
        "Orskel Ledge,Velorites alta,41,20,5",
        "Orskel Ledge,Velorites lata,40,10,5",
      ),
    });
    expect(problemsOf(study, "outside-section")).toMatchObject([
      { severity: "caution", file: "beds.csv", row: 4, column: "base", found: "9 m depth" },
      { severity: "caution", file: "published-ranges.csv", row: 2, column: "first", found: "41 m depth" },
    ]);
    expect(study.sections[0].publishedRanges).toHaveLength(2);
  });
});
