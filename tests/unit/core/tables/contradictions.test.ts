import { describe, expect, it } from "vitest";
import { lines, problemsOf, sections, studyFrom } from "./study-files.ts";

const finds = (...rows: readonly string[]) => lines("section,taxon,position", ...rows);
const horizonsOf = (...rows: readonly string[]) => lines("section,horizon,kind,position", ...rows);

const taxaOf = (...rows: readonly string[]) =>
  studyFrom({ "taxa.csv": lines("taxon,group,accepted", ...rows) });
const measured = (value: string, unit = "ng/g", limit = "") =>
  studyFrom({
    "sections.csv": sections,
    "measurements.csv": lines(
      "section,analyte,value,unit,position,detection_limit",
      `Orskel Ledge,iridium,${value},${unit},1,${limit}`,
    ),
  });

describe("two impact horizons", () => {
  const two = {
    "sections.csv": sections,
    "occurrences.csv": finds("Orskel Ledge,Velorites orskelensis,1.2"),
    "horizons.csv": horizonsOf("Orskel Ledge,Rim,impact,9", "Orskel Ledge,Rum,impact,7"),
  };

  it("are an error that lists them", () => {
    expect(problemsOf(studyFrom(two), "impact-ambiguous")).toMatchObject([
      { severity: "error", file: "horizons.csv", row: 3, column: "horizon", found: "Rim, Rum" },
    ]);
  });

  it("are none where the main one is named, or both are declared one horizon", () => {
    const named = studyFrom(two, { boundary: { horizon: "Rim" } });
    const pairs = [
      ["Orskel Ledge", "Rim"],
      ["Orskel Ledge", "Rum"],
    ];
    const same = studyFrom(two, { boundary: { same: [{ name: "one", horizons: pairs }] } });
    for (const study of [named, same]) expect(problemsOf(study, "impact-ambiguous")).toEqual([]);
  });
});

describe("a section named joint", () => {
  it.each([
    ["in sections.csv", { "sections.csv": lines("section,axis,unit", "joint,height,m") }],
    ["without it", {}],
  ])("is left out, %s: the results use the name", (_, files) => {
    const study = studyFrom({
      ...files,
      "occurrences.csv": lines("section,taxon,height (m)", "joint,Velorites orskelensis,1"),
    });
    expect(problemsOf(study, "reserved-section")).toHaveLength(1);
    expect(study.sections).toEqual([]);
  });
});

describe("rock, legs and names that contradict each other", () => {
  it("a find inside rock that nobody could search is told, one at its edge is not", () => {
    const study = studyFrom({
      "sections.csv": sections,
      "intervals.csv": lines("section,kind,base,top", "Orskel Ledge,covered,2,4"),
      "occurrences.csv": finds(
        "Orskel Ledge,Velorites orskelensis,2",
        "Orskel Ledge,Velorites orskelensis,3",
        "Orskel Ledge,Velorites orskelensis,3.5",
      ),
    });
    expect(problemsOf(study, "find-in-hidden-rock")).toMatchObject([
      {
        severity: "caution",
        row: 3,
        found: "Velorites orskelensis at 3 m (and 1 more row)",
        expected: "a find outside the covered interval (2 m to 4 m)",
      },
    ]);
  });

  it.each([
    ["turns back", ["0,0", "5,9", "9,2"], 1],
    ["is measured downward", ["0,9", "5,5", "9,0"], 0],
    ["runs along a bed", ["0,0", "5,4", "9,4"], 0],
  ])("a leg that %s", (_, rows, count) => {
    const study = studyFrom({
      "sections.csv": sections,
      "legs.csv": lines("section,leg,reading,position", ...rows.map((row) => `Orskel Ledge,A,${row}`)),
      "occurrences.csv": finds("Orskel Ledge,Velorites orskelensis,2"),
    });
    expect(problemsOf(study, "leg-turns-back")).toHaveLength(count);
  });

  it("synonyms that accept each other in a circle are told; a chain is none", () => {
    const circle = taxaOf("Velor a,g,Velor b", "Velor b,g,Velor a");
    expect(problemsOf(circle, "accepted-circle")).toMatchObject([
      { row: 2, found: "Velor b (and 1 more row)" },
    ]);
    expect(
      problemsOf(taxaOf("Velor a,g,Velor b", "Velor b,g,Velor c", "Velor c,g,"), "accepted-circle"),
    ).toEqual([]);
  });

  it("a declared set with a taxon that no table holds names the nearest", () => {
    const study = studyFrom(
      { "sections.csv": sections, "occurrences.csv": finds("Orskel Ledge,Velorites orskelensis,2") },
      { timing: { sets: { last: ["Velorites orskelensis", "Velorites orskelensus"] } } },
    );
    expect(problemsOf(study, "set-taxon-unknown")).toMatchObject([
      {
        column: "timing.sets.last",
        found: "Velorites orskelensus",
        mend: expect.stringContaining("Did you mean"),
      },
    ]);
  });
});

describe("contents that rock cannot have", () => {
  it.each([
    ["1e300", "ng/g", ""],
    ["101", "wt%", ""],
    ["0.1", "ng/g", "1e12"],
    ["1e-300", "ng/g", ""],
    ["<0", "ng/g", ""],
    ["bdl", "ng/g", "0"],
  ])("%s %s is an error of its row", (value, unit, limit) => {
    const study = measured(value, unit, limit);
    expect(problemsOf(study, "out-of-limits")).toHaveLength(1);
    expect(study.sections[0].measurements).toEqual([]);
  });

  it("100 wt% is not", () => {
    expect(measured("100", "wt%").sections[0].measurements).toHaveLength(1);
  });
});

const ratios = (...rows: readonly string[]) =>
  studyFrom({
    "sections.csv": lines("section,axis,unit", "Orskel Ledge,height,m", "Tamber Quarry,height,m"),
    "measurements.csv": lines("section,analyte,value,unit,position", ...rows),
  });

const mainNamed = (horizon: string, more: Record<string, string> = {}, same: readonly unknown[] = []) =>
  problemsOf(
    studyFrom(
      {
        "sections.csv": sections,
        "horizons.csv": horizonsOf("Orskel Ledge,Veyra layer,impact,9"),
        ...more,
      },
      { boundary: { horizon, same } },
    ),
    "main-horizon-unknown",
  );

describe("isotope ratios on two scales", () => {
  it("are never mixed in a section: the second is told and left out, apart it stays", () => {
    const study = ratios(
      "Orskel Ledge,d18o,-2,‰ VPDB,1",
      "Orskel Ledge,δ18O,28,‰ VSMOW,2",
      "Orskel Ledge,d13c,1,‰ VPDB,2",
      "Tamber Quarry,d18o,28,‰ VSMOW,1",
    );
    expect(problemsOf(study, "isotope-scale-mixed")).toMatchObject([
      {
        severity: "error",
        row: 3,
        column: "unit",
        found: "‰ VSMOW",
        expected: expect.stringContaining("VPDB, as in row 2"),
      },
    ]);
    expect(
      study.sections.map(({ measurements }) => measurements.map(({ unit, givenUnit }) => [unit, givenUnit])),
    ).toEqual([
      [
        ["‰ VPDB", "‰ VPDB"],
        ["‰ VPDB", "‰ VPDB"],
      ],
      [["‰ VSMOW", "‰ VSMOW"]],
    ]);
  });

  it("are told where one row leaves its scale unsaid", () => {
    const study = ratios("Orskel Ledge,d18o,-2,‰ VPDB,1", "Orskel Ledge,d18o,-1,‰,2");
    expect(problemsOf(study, "isotope-scale-unsaid")).toMatchObject([{ severity: "caution", row: 3 }]);
    expect(study.sections[0].measurements).toHaveLength(2);
    const before = ratios("Orskel Ledge,d18o,-2,‰,1", "Orskel Ledge,d18o,-1,‰ VPDB,2");
    expect(problemsOf(before, "isotope-scale-unsaid")).toMatchObject([{ row: 2, found: "‰" }]);
    expect(ratios("Orskel Ledge,d18o,-2,‰,1", "Orskel Ledge,d18o,-1,‰,2").problems).toEqual([]);
  });
});

describe("a value below its detection limit", () => {
  it.each([
    ["0.04", "0.05", 1],
    ["0.05", "0.05", 0],
    ["<0.05", "0.05", 0],
    ["bdl", "0.05", 0],
    ["-0.1", "0.05", 1],
  ])("%s against %s is told and kept", (value, limit, count) => {
    const study = measured(value, "ng/g", limit);
    expect(problemsOf(study, "below-detection-limit")).toHaveLength(count);
    expect(study.sections[0].measurements).toHaveLength(1);
  });
});

const inSamples = (header: string, ...rows: readonly string[]) =>
  studyFrom({
    "sections.csv": sections,
    "samples.csv": lines("section,sample,position", "Orskel Ledge,S1,1", "Orskel Ledge,S2,2"),
    "occurrences.csv": lines(`section,sample,taxon,${header}`, ...rows.map((row) => `Orskel Ledge,${row}`)),
  });

const coveredBeyond = (ends: string, interval: string) =>
  problemsOf(
    studyFrom({
      "sections.csv": lines("section,axis,unit,bottom,top", `Orskel Ledge,height,m,${ends}`),
      "occurrences.csv": finds("Orskel Ledge,Velor a,1", "Orskel Ledge,Velor a,9"),
      "intervals.csv": lines("section,kind,base,top", `Orskel Ledge,covered,${interval}`),
    }),
    "outside-section",
  );

describe("a find that a sample's list names twice, or with two meanings", () => {
  it("is told where only the number differs", () => {
    const study = inSamples("count", "S1,Velor a,2", "S2,Velor a,2", "S1,Velor a,5");
    expect(problemsOf(study, "find-twice")).toMatchObject([
      { severity: "caution", file: "occurrences.csv", row: 4, column: "taxon", found: "Velor a in S1" },
    ]);
    expect(study.sections[0].occurrences).toHaveLength(3);
  });

  it("is as it should be where one is qualified, reworked or doubtful and the other is not", () => {
    const rows = ["S1,Velor a,,,", "S1,Velor a,cf.,,", "S2,Velor a,,yes,", "S2,Velor a,,,"];
    expect(problemsOf(inSamples("qualifier,reworked,doubtful", ...rows), "find-twice")).toEqual([]);
  });

  it.each([
    ["0", "R", 1],
    ["3", "absent", 1],
    ["3", "-", 1],
    ["3", "R", 0],
    ["0", "0", 0],
    ["", "R", 0],
  ])("with count %j and abundance %j", (count, abundance, told) => {
    const study = inSamples("count,abundance", `S1,Velor a,${count},${abundance}`, "S2,Velor a,,R");
    expect(problemsOf(study, "count-against-abundance")).toHaveLength(told);
  });
});

describe("a covered interval outside the section", () => {
  it("is told where the section's ends are declared; one that goes on beyond them is not", () => {
    expect(coveredBeyond("0,10", "11,12")).toMatchObject([{ file: "intervals.csv", row: 2, column: "base" }]);
    expect(coveredBeyond("0,10", "-3,-1")).toMatchObject([{ file: "intervals.csv", row: 2, column: "top" }]);
    expect(coveredBeyond("0,10", "9,12")).toEqual([]);
    expect(coveredBeyond(",", "11,12")).toEqual([]);
  });
});

describe("a main horizon that nobody placed", () => {
  const iridium = {
    "measurements.csv": lines("section,analyte,value,unit,position", "Orskel Ledge,Ir,1,ng/g,2"),
  };

  it("is an error that names the nearest", () => {
    expect(mainNamed("Veyra leyer")).toMatchObject([
      {
        severity: "error",
        file: "settings.json",
        column: "boundary.horizon",
        found: "Veyra leyer",
        mend: expect.stringContaining("Did you mean Veyra layer?"),
      },
    ]);
    expect(mainNamed("nickel-1", iridium)).toHaveLength(1);
  });

  it("is none where it is placed, declared, or may be found in what was measured", () => {
    expect(mainNamed("Veyra layer")).toEqual([]);
    expect(mainNamed("iridium-2", iridium)).toEqual([]);
    expect(mainNamed("one", iridium, [{ name: "one", horizons: [["Orskel Ledge", "iridium-1"]] }])).toEqual(
      [],
    );
  });
});

describe("a claim on a section that the study does not hold", () => {
  it("is told and kept; one on all sections or on none in particular is not told", () => {
    const study = studyFrom({
      "sections.csv": sections,
      "occurrences.csv": finds("Orskel Ledge,Velor a,1"),
      "claims.csv": lines(
        "question,value,section",
        "one-level,0.2,Orskel ledge",
        "one-level,0.2,joint",
        "one-level,0.2,",
        "one-level,0.2,Orskel Ledge",
      ),
    });
    expect(problemsOf(study, "claim-elsewhere")).toMatchObject([
      {
        severity: "caution",
        row: 2,
        column: "section",
        found: "Orskel ledge",
        fix: { file: "claims.csv", row: 2, column: "section", now: "Orskel Ledge" },
      },
    ]);
    expect(study.claims).toHaveLength(4);
  });
});

describe("settings that no analysis can use", () => {
  it.each([
    [{ ranges: { methods: [] } }, "ranges.methods"],
    [{ ranges: { methods: ["window", "window"] } }, "ranges.methods"],
    [{ timing: { window: [15, -20] } }, "timing.window"],
    [JSON.parse('{"timing":{"sets":{"__proto__":["Velor a"]}}}'), "timing.sets.__proto__"],
  ])("%j is told and takes its default", (settings, column) => {
    const study = studyFrom({ "sections.csv": sections }, settings);
    expect(problemsOf(study, "bad-setting")).toMatchObject([{ severity: "error", column }]);
    expect(study.settings).toEqual(studyFrom({}).settings);
  });

  it("a file nested beyond reading is told, not thrown", () => {
    const study = studyFrom({ "settings.json": "[".repeat(20_000) + "]".repeat(20_000) });
    expect(problemsOf(study, "settings-unreadable")).toHaveLength(1);
  });
});
