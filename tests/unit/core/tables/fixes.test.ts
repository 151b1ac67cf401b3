import { describe, expect, it } from "vitest";
import { soundTables, texts, withCell } from "./mended-tables.ts";
import { errorsOf, problemsOf, studyFrom } from "./study-files.ts";

type WrittenCell = readonly [file: string, row: number, column: string, written: string];

const problemAt = (...[file, row, column, now]: WrittenCell) => {
  const study = studyFrom(texts(withCell(soundTables, { file, row, column, now })));
  return study.problems.find(
    (problem) => problem.file === file && problem.row === row && problem.found.startsWith(now),
  );
};

describe("a study without a problem", () => {
  it("is told of none but taxa found once", () => {
    const codes = studyFrom(texts(soundTables)).problems.map(({ code }) => code);
    expect(codes.filter((code) => code !== "one-occurrence")).toEqual([]);
  });
});

describe("a problem with one mend alone", () => {
  it.each<readonly [string, WrittenCell, string]>([
    ["a word of a list one letter off", ["occurrences.csv", 3, "reworked", "suspectd"], "suspected"],
    ["a word of a list with a space", ["horizons.csv", 3, "kind", "Sequence boundary"], "sequence-boundary"],
    ["a decimal comma among points", ["samples.csv", 2, "position", "1,25"], "1.25"],
    ["the section's unit behind the number", ["samples.csv", 2, "position", "1.25 m"], "1.25"],
    ["another section's unit behind its number", ["samples.csv", 4, "position", "20.5cm"], "20.5"],
    ["the section's unit in its own row", ["sections.csv", 2, "top", "40.5 m"], "40.5"],
    ["a fixed unit behind the number", ["horizons.csv", 2, "age_ma", "83.4 Ma"], "83.4"],
    ["comma and unit together", ["samples.csv", 3, "density_g_cm3", "2,35 g/cm3"], "2.35"],
    ["a value with its unit", ["measurements.csv", 2, "value", "0.35 ng/g"], "0.35"],
    ["a value with its unit in another spelling", ["measurements.csv", 2, "value", "0.35 ppb"], "0.35"],
    ["a value with a comma", ["measurements.csv", 2, "value", "0,35"], "0.35"],
    ["a sign of open nomenclature in full", ["occurrences.csv", 3, "qualifier", "confer"], "cf."],
    ["a sign with other points", ["occurrences.csv", 5, "qualifier", "ex gr:"], "ex gr."],
    ["a section in another case", ["occurrences.csv", 2, "section", "orskel ledge"], "Orskel Ledge"],
    ["a sample with a space", ["occurrences.csv", 2, "sample", "OL 1"], "OL-1"],
    ["a sample in lower case", ["searches.csv", 2, "sample", "ol-1"], "OL-1"],
    ["a leg in another case", ["samples.csv", 2, "leg", "East Wall"], "east wall"],
  ])("%s", (_, cell, now) => {
    const [file, row, column] = cell;
    expect(problemAt(...cell)?.fix).toEqual({ file, row, column, now });
  });

  it("calls the column as the header does, and keeps to the file's decimal sign", () => {
    const rows = [
      "section;taxon;Höhe;height (m)",
      "Orskel Ledge;Velorites alta;;1,25",
      "Orskel Ledge;Velorites alta;;2.5 m",
    ];
    const study = studyFrom({ "occurrences.csv": `${rows.join("\n")}\n` });
    expect(problemsOf(study, "not-a-number")).toMatchObject([
      { fix: { file: "occurrences.csv", row: 3, column: "height (m)", now: "2,5" } },
    ]);
  });
});

describe("a problem with more than one mend, or none", () => {
  it.each<readonly [string, WrittenCell]>([
    ["a number that could be grouped", ["samples.csv", 2, "position", "1,250"]],
    ["another unit than the section's", ["samples.csv", 2, "position", "125 cm"]],
    ["words", ["samples.csv", 2, "position", "near the top"]],
    ["a number beyond its limits when mended", ["samples.csv", 2, "thickness", "-0,04"]],
    ["a word far from the list", ["occurrences.csv", 3, "reworked", "perhaps"]],
    ["a value in another unit", ["measurements.csv", 2, "value", "0.35 ppm"]],
    ["a value that can mean two things", ["measurements.csv", 2, "value", "nd"]],
    ["an unknown qualifier", ["occurrences.csv", 3, "qualifier", "juvenile"]],
    ["another section", ["occurrences.csv", 2, "section", "Orskel Lodge"]],
    ["another sample", ["occurrences.csv", 2, "sample", "OL-9"]],
  ])("has no fix: %s", (_, cell) => {
    const problem = problemAt(...cell);
    expect(problem).toBeDefined();
    expect(problem).not.toHaveProperty("fix");
  });

  it("has none where the listed section is the one that no row names", () => {
    const cell = { file: "sections.csv", row: 3, column: "section", now: "tamber quarry" };
    const told = problemsOf(studyFrom(texts(withCell(soundTables, cell))), "unlisted-section");
    expect(told.length).toBeGreaterThan(1);
    for (const problem of told) expect(problem).not.toHaveProperty("fix");
  });

  it("has none where two names differ only by form", () => {
    const two = {
      ...soundTables,
      "samples.csv": [...soundTables["samples.csv"], ["Orskel Ledge", "ol 1", "", "9.5", "0.04", "2.35"]],
    };
    const study = studyFrom(
      texts(withCell(two, { file: "searches.csv", row: 2, column: "sample", now: "Ol-1" })),
    );
    expect(problemsOf(study, "unknown-sample")[0]).not.toHaveProperty("fix");
  });
});

describe("a qualifier that is none", () => {
  it("is a caution, and the find counts as if the cell were blank", () => {
    const cell = { file: "occurrences.csv", row: 3, column: "qualifier" };
    const odd = studyFrom(texts(withCell(soundTables, { ...cell, now: "juvenile" })));
    const blank = studyFrom(texts(withCell(soundTables, { ...cell, now: "" })));
    expect(errorsOf(odd)).toEqual([]);
    expect(odd.sections).toEqual(blank.sections);
  });
});
