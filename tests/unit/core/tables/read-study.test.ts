import { describe, expect, it } from "vitest";
import { errorsOf, lines, onlySection, problemsOf, sections, studyFrom } from "./study-files.ts";

const one = (header: string, cells = "Orskel Ledge,Orvella tenuis,100") =>
  studyFrom({ "occurrences.csv": lines(header, cells) });

describe("axis and unit", () => {
  it.each([
    ["section,taxon,height (m)", "height", "m", 100],
    ["Locality,Species,Depth [ft]", "depth", "ft", -30.48],
    ["site,scientificName,depth_ft", "depth", "ft", -30.48],
    ["section,taxon,HEIGHT_CM", "height", "cm", 1],
    ["section,taxon,stratigraphic height (metres)", "height", "m", 100],
  ])("are read from the header %s", (header, axis, unit, heightM) => {
    const section = onlySection(one(header));
    expect([section.axis, section.unit]).toEqual([axis, unit]);
    expect(section.occurrences.at(0)?.heightM).toBeCloseTo(heightM, 10);
  });

  it("are never assumed: a header without them is an error, until the settings say", () => {
    for (const header of ["section,taxon,position", "section,taxon,height", "section,taxon,position_cm"]) {
      const study = one(header);
      expect(problemsOf(study, "axis-unknown")).toMatchObject([
        { severity: "error", file: "occurrences.csv", row: 2, found: "Orskel Ledge" },
      ]);
      expect(study.sections).toEqual([]);
    }
    const told = studyFrom(
      { "occurrences.csv": lines("section,taxon,position", "Orskel Ledge,Orvella tenuis,100") },
      { sections: { axis: "depth", unit: "cm" } },
    );
    expect(onlySection(told)).toMatchObject({ axis: "depth", unit: "cm", bottomM: -1, topM: -1 });
  });

  it("a header that contradicts the section leaves its rows out", () => {
    const study = studyFrom({
      "sections.csv": sections,
      "occurrences.csv": lines(
        "section,taxon,depth (m)",
        "Orskel Ledge,Orvella tenuis,1",
        "Orskel Ledge,Orvella tenuis,2",
      ),
    });
    expect(problemsOf(study, "axis-contradicted")).toMatchObject([
      { severity: "error", column: "depth (m)", found: "depth (m) (and 1 more row)" },
    ]);
    expect([...onlySection(study).occurrences]).toEqual([]);
  });

  it("a section whose own row is wrong says so at the rows that need it", () => {
    const study = studyFrom({
      "sections.csv": lines("section,axis,unit", "Orskel Ledge,height,furlong", "Tarn Cut,height,m"),
      "occurrences.csv": lines(
        "section,taxon,position",
        "Orskel Ledge,Orvella tenuis,1",
        "Tarn Cut,Orvella tenuis,1",
      ),
    });
    expect(errorsOf(study).map(({ code, file }) => [code, file])).toEqual([
      ["not-in-list", "sections.csv"],
      ["section-left-out", "occurrences.csv"],
    ]);
    expect(onlySection(study).name).toBe("Tarn Cut");
  });
});

describe("columns", () => {
  it("prefers the declared name to a synonym, and keeps unknown columns unused", () => {
    const study = studyFrom({
      "occurrences.csv": lines(
        "section,taxon,species,height (m),colour",
        "Orskel Ledge,Orvella tenuis,Orvella robusta,1,grey",
      ),
    });
    expect(onlySection(study).occurrences.at(0)?.taxon).toBe("Orvella tenuis");
    expect(problemsOf(study, "unknown-column").map(({ found }) => found)).toEqual(["species", "colour"]);
    expect([...study.sheets[0].rows]).toEqual([
      ["Orskel Ledge", "Orvella tenuis", "Orvella robusta", "1", "grey"],
    ]);
    expect(study.sheets[0].columns).toEqual(["section", "taxon", undefined, "position", undefined]);
  });

  it.each([
    ["density (g/cm³)", true],
    ["density (g cm−3)", true],
    ["density (kg/m3)", false],
    ["water depth (m)", true],
    ["water_depth_m", true],
    ["water depth (ft)", false],
    ["water_depth_cm", false],
  ])("takes a fixed unit in the header %s only where it is the column's own", (header, isGood) => {
    const isBed = header.startsWith("water");
    const study = studyFrom({
      "sections.csv": sections,
      [isBed ? "beds.csv" : "samples.csv"]: isBed
        ? lines(`section,base,top,lithology,${header}`, "Orskel Ledge,1,2,marl,30")
        : lines(`section,sample,position,${header}`, "Orskel Ledge,A,1,2.3"),
      "occurrences.csv": lines("section,taxon,position", "Orskel Ledge,Orvella tenuis,1"),
    });
    expect(errorsOf(study).map(({ code, column }) => [code, column])).toEqual(
      isGood ? [] : [["unknown-unit", header]],
    );
    const { beds, samples } = onlySection(study);
    if (isGood) expect(isBed ? beds[0].waterDepthM : samples[0].densityGCm3).toBe(isBed ? 30 : 2.3);
  });

  it("names the nearest for a missing column and an unknown file", () => {
    const study = studyFrom({
      "occurrences.csv": lines("section,taxn,height (m)", "Orskel Ledge,Orvella tenuis,1"),
      "sample.csv": "x\n",
      "notes.txt": "x",
      "README.md": "x",
      LICENSE: "x",
    });
    expect(problemsOf(study, "missing-column")[0]).toMatchObject({
      severity: "error",
      expected: "a column taxon",
    });
    expect(problemsOf(study, "missing-column")[0].mend).toContain("taxn");
    expect(problemsOf(study, "unknown-file").map(({ file }) => file)).toEqual(["sample.csv", "notes.txt"]);
    expect(problemsOf(study, "unknown-file")[0].mend).toContain("samples.csv");
  });

  it("takes file names with folders, and the second file of a table for an error", () => {
    const text = lines("section,taxon,height (m)", "Orskel Ledge,Orvella tenuis,1");
    const study = studyFrom({ "veyra/occurrences.csv": text, "veyra/old/Occurrences.csv": text });
    expect(problemsOf(study, "duplicate-table")).toMatchObject([
      { severity: "error", file: "veyra/old/Occurrences.csv" },
    ]);
    expect(studyFrom({ "veyra/occurrences.csv": text }).name).toBe("veyra");
  });
});

describe("legs and depth", () => {
  it("gives a horizon met in two legs one level", () => {
    const study = studyFrom({
      "sections.csv": sections,
      "legs.csv": lines(
        "section,leg,reading,position",
        "Orskel Ledge,A,0,0",
        "Orskel Ledge,A,10,9.1",
        "Orskel Ledge,B,0,5",
        "Orskel Ledge,B,10,14.1",
      ),
      "samples.csv": lines(
        "section,sample,leg,position",
        "Orskel Ledge,S1,A,7",
        "Orskel Ledge,S1,B,1.5054945054945055",
        "Orskel Ledge,S2,B,1.5054945054945055",
      ),
      "occurrences.csv": lines(
        "section,taxon,sample",
        "Orskel Ledge,Orvella tenuis,S1",
        "Orskel Ledge,Orvella tenuis,S2",
      ),
    });
    expect(errorsOf(study)).toEqual([]);
    const { samples, occurrences } = onlySection(study);
    expect(samples.map(({ name }) => name)).toEqual(["S1", "S2"]);
    expect(occurrences.at(0)?.heightM).toBe(occurrences.at(1)?.heightM);
    expect(occurrences.at(0)?.heightM).toBeCloseTo(6.37, 9);
  });

  it("reads a core in feet of depth: slabs, lengths, ends and horizons", () => {
    const study = studyFrom({
      "sections.csv": lines("section,axis,unit,bottom,top", "V-2,depth,ft,200,100"),
      "samples.csv": lines(
        "section,sample,base,top,position,thickness,position_error",
        "V-2,a,151,150,,,0.1",
        "V-2,b,,,120,2,",
      ),
      "horizons.csv": lines(
        "section,horizon,kind,position,below,above,shape,age_ma,age_error_ma,age_error_kind",
        "V-2,ash,ash,130,1,0.5,uniform,83.5,0.04,2s",
      ),
      "occurrences.csv": lines("section,taxon,sample", "V-2,Orvella tenuis,a"),
    });
    expect(errorsOf(study)).toEqual([]);
    const section = onlySection(study);
    expect(section.bottomM).toBeCloseTo(-60.96, 10);
    expect(section.topM).toBeCloseTo(-30.48, 10);
    expect(section.samples.map(({ name }) => name)).toEqual(["a", "b"]);
    expect(section.samples[0].heightM).toBeCloseTo(-150.5 * 0.3048, 10);
    expect(section.samples[0].positionErrorM).toBeCloseTo(0.03048, 12);
    expect(section.samples[1].baseM).toBeCloseTo(-121 * 0.3048, 10);
    expect(section.samples[1].topM).toBeCloseTo(-119 * 0.3048, 10);
    expect(section.horizons[0]).toMatchObject({
      name: "ash",
      shape: "uniform",
      ageMa: 83.5,
      ageSigmaMa: 0.02,
    });
    expect(section.horizons[0].belowM).toBeCloseTo(0.3048, 12);
    expect(section.horizons[0].aboveM).toBeCloseTo(0.1524, 12);
  });

  it("takes the ends from what was sampled, measured, logged and found", () => {
    const study = studyFrom({
      "sections.csv": sections,
      "beds.csv": lines("section,base,top,lithology", "Orskel Ledge,0.5,2,marl"),
      "samples.csv": lines("section,sample,position,thickness", "Orskel Ledge,a,9,0.2"),
      "measurements.csv": lines("section,analyte,value,unit,position", "Orskel Ledge,Ir,0.2,ppb,3"),
    });
    expect(onlySection(study)).toMatchObject({ bottomM: 0.5, topM: 9.1 });
  });
});

describe("searches", () => {
  const base = {
    "sections.csv": sections,
    "taxa.csv": lines(
      "taxon,group,accepted",
      "Orvella tenuis,foraminifera,",
      "Velorites orskelensis,ammonites,",
      "Orvella gracilis,,Orvella tenuis",
    ),
    "samples.csv": lines("section,sample,position", "Orskel Ledge,a,1", "Orskel Ledge,b,2"),
    "occurrences.csv": lines(
      "section,taxon,sample",
      "Orskel Ledge,Orvella gracilis,a",
      "Orskel Ledge,Orvella sp.,b",
    ),
  };

  it("without searches.csv every sample counts as searched for every group found there", () => {
    const study = studyFrom(base);
    expect(problemsOf(study, "searches-derived")).toMatchObject([
      { severity: "caution", file: "searches.csv" },
    ]);
    expect(onlySection(study).searches).toEqual([
      { sample: "a", group: "foraminifera", heightM: 1, counting: "presence", derived: true },
      { sample: "b", group: "foraminifera", heightM: 2, counting: "presence", derived: true },
    ]);
    expect(problemsOf(study, "ungrouped")).toEqual([]);
  });

  it("tells a search of an unknown sample and a find nobody searched for", () => {
    const study = studyFrom({
      ...base,
      "searches.csv": lines(
        "section,sample,group,effort,effort_unit,counting",
        "Orskel Ledge,a,foraminifera,20,g,count",
        "Orskel Ledge,z,foraminifera,20,g,count",
      ),
    });
    expect(problemsOf(study, "unknown-sample")).toMatchObject([
      { severity: "error", file: "searches.csv", row: 3, found: "z" },
    ]);
    expect(problemsOf(study, "not-searched")).toMatchObject([
      { severity: "caution", file: "occurrences.csv", row: 3, found: "Orvella in b" },
    ]);
    expect(onlySection(study).searches).toMatchObject([
      { sample: "a", effort: 20, effortUnit: "g", counting: "count", derived: false },
    ]);
  });

  it("gives an accepted name without a row the group of its synonym, with a caution", () => {
    const study = studyFrom({
      ...base,
      "taxa.csv": lines("taxon,group,accepted", "Orvella gracilis,foraminifera,Orvella tenuis"),
    });
    expect(problemsOf(study, "accepted-unlisted")).toMatchObject([
      { severity: "caution", row: 2, found: "Orvella tenuis" },
    ]);
    expect(study.taxa.get("Orvella tenuis")?.group).toBe("foraminifera");
  });

  it("tells taxa without a group once", () => {
    const study = studyFrom({ ...base, "taxa.csv": lines("taxon,group", "Velorites orskelensis,ammonites") });
    expect(problemsOf(study, "ungrouped")).toMatchObject([
      { severity: "caution", found: "Orvella gracilis (and 1 more row)" },
    ]);
    expect(study.taxa.get("Orvella gracilis")?.group).toBe("ungrouped");
  });
});

const measured = (...rows: readonly string[]) =>
  studyFrom({
    "sections.csv": lines("section,axis,unit,density_g_cm3", "Orskel Ledge,height,m,2.3"),
    "samples.csv": lines(
      "section,sample,position,thickness,density_g_cm3",
      "Orskel Ledge,a,1,0.1,",
      "Orskel Ledge,b,2,0.1,2.5",
    ),
    "measurements.csv": lines(
      "section,sample,analyte,value,unit,error,error_kind,detection_limit,trials",
      ...rows,
    ),
  });

describe("measurements", () => {
  it("come in the canonical unit with one standard deviation, the text as written kept", () => {
    const study = measured(
      "Orskel Ledge,a,Ir,2.5,ppm,10,2s%,0.01,",
      "Orskel Ledge,b,d13C,-1.2,‰,0.1,2s,,",
      "Orskel Ledge,b,shocked quartz,3,grains,,,,40",
      "Orskel Ledge,b,iridium,bdl,ppb,,,0.05,",
    );
    expect(errorsOf(study)).toEqual([]);
    const [iridium, carbon, quartz, below] = onlySection(study).measurements;
    expect(iridium).toMatchObject({
      analyte: "iridium",
      quantity: "mass-fraction",
      unit: "ng/g",
      reading: { kind: "value", value: 2500 },
      sigma: 125,
      detectionLimit: 10,
      givenValue: "2.5",
      givenUnit: "ppm",
      densityGCm3: 2.3,
    });
    expect(carbon).toMatchObject({
      analyte: "d13c",
      quantity: "per-mil",
      reading: { kind: "value", value: -1.2 },
      sigma: 0.05,
      densityGCm3: 2.5,
    });
    expect(quartz).toMatchObject({ analyte: "shocked-quartz", quantity: "count", trials: 40 });
    expect(below).toMatchObject({ reading: { kind: "below", limit: 0.05 }, baseM: 1.95, topM: 2.05 });
  });

  it.each([
    ["Orskel Ledge,a,Ir,1,furlongs,,,,", "unknown-unit", "unit"],
    ["Orskel Ledge,a,Ir,1,,,,,", "blank-cell", "unit"],
    ["Orskel Ledge,a,d13C,1,ppt,,,,", "ambiguous-ppt", "unit"],
    ["Orskel Ledge,a,Ir,nd,ppb,,,,", "nd-ambiguous", "value"],
    ["Orskel Ledge,a,Ir,bdl,ppb,,,,", "no-detection-limit", "value"],
    ["Orskel Ledge,a,Ir,tr,ppb,,,,", "trace-limits", "value"],
    ["Orskel Ledge,a,Ir,1,ppb,0.1,,,", "error-kind-missing", "error_kind"],
    ["Orskel Ledge,a,shocked-quartz,9,grains,,,,8", "more-successes", "value"],
  ])("leave out %s", (row, code, column) => {
    const study = measured(row, "Orskel Ledge,b,Ir,1,ppb,,,,");
    expect(errorsOf(study)).toMatchObject([{ code, column, row: 2, file: "measurements.csv" }]);
    expect(onlySection(study).measurements).toHaveLength(1);
  });

  it("ask about a plain 0 of a trace element and tell missing values, once each", () => {
    const study = measured(
      "Orskel Ledge,a,Ir,0,ppb,,,,",
      "Orskel Ledge,b,Ir,0,ppb,,,,",
      "Orskel Ledge,b,Ni,,ppm,,,,",
      "Orskel Ledge,b,spherules,0,count,,,,",
    );
    expect(problemsOf(study, "trace-zero")).toMatchObject([
      { severity: "caution", row: 2, found: "0 (and 1 more row)" },
    ]);
    expect(problemsOf(study, "value-missing")).toMatchObject([{ severity: "caution", row: 4 }]);
    expect(onlySection(study).measurements).toHaveLength(3);
  });
});
