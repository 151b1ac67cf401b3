import { describe, expect, it } from "vitest";
import { lines, problemsOf, sections, studyFrom } from "./study-files.ts";

const finds = (...rows: readonly string[]) => lines("section,taxon,position", ...rows);
const found = {
  "sections.csv": sections,
  "occurrences.csv": finds(
    "Orskel Ledge,Velorites orskelensis,1",
    "Orskel Ledge,Velorites orskelensus,2",
    "Orskel Ledge,Velorites orskelensis,3",
    "Orskel Ledge,Velorites orskelensus,3",
    "Orskel Ledge,Velorites orskelensis,4",
  ),
};
const withTaxa = (...rows: readonly string[]) =>
  studyFrom({ ...found, "taxa.csv": lines("taxon,group,accepted", ...rows) });

describe("taxa that are almost alike", () => {
  it("are told once, at the first find of the rarer one, and stay apart", () => {
    const study = studyFrom(found);
    expect(problemsOf(study, "similar-name")).toMatchObject([
      {
        severity: "caution",
        file: "occurrences.csv",
        row: 3,
        column: "taxon",
        found: "Velorites orskelensus",
        expected: "one spelling of each taxon",
        mend: expect.stringContaining("Velorites orskelensis is written almost the same"),
      },
    ]);
    expect(new Set(Array.from(study.sections[0].occurrences, ({ taxon }) => taxon)).size).toBe(2);
  });

  it("are told of the one that taxa.csv does not list", () => {
    const study = withTaxa("Velorites orskelensus,ammonoids,");
    expect(problemsOf(study, "similar-name")).toMatchObject([{ row: 2, found: "Velorites orskelensis" }]);
  });

  it.each([
    ["one accepts the other", "Velorites orskelensus,ammonoids,Velorites orskelensis"],
    ["one accepts itself", "Velorites orskelensus,ammonoids,Velorites orskelensus"],
  ])("are settled where %s", (_, row) => {
    expect(problemsOf(withTaxa(row, "Velorites orskelensis,ammonoids,"), "similar-name")).toEqual([]);
  });
});

describe("other names that are almost alike", () => {
  it("sections, without a table that lists them", () => {
    const study = studyFrom({
      "occurrences.csv": lines(
        "section,taxon,height (m)",
        "Orskel Ledge,Velorites alta,1",
        "Orskel Ledge,Velorites alta,2",
        "orskel ledge,Velorites alta,3",
      ),
    });
    expect(problemsOf(study, "similar-name")).toMatchObject([
      { row: 4, column: "section", found: "orskel ledge", expected: "one spelling of each section" },
    ]);
    expect(study.sections).toHaveLength(2);
  });

  it("samples of one section but for their form, not those with other numbers", () => {
    const study = studyFrom({
      "sections.csv": sections,
      "samples.csv": lines(
        "section,sample,position",
        "Orskel Ledge,OL-1,1",
        "Orskel Ledge,OL-2,2",
        "Orskel Ledge,ol 2,3",
      ),
    });
    expect(problemsOf(study, "similar-name")).toMatchObject([
      { file: "samples.csv", row: 4, column: "sample", found: "ol 2" },
    ]);
  });

  it("groups of taxa.csv and searches.csv", () => {
    const study = studyFrom({
      ...found,
      "samples.csv": lines("section,sample,position", "Orskel Ledge,OL-1,1"),
      "taxa.csv": lines("taxon,group", "Velorites orskelensis,ammonoids"),
      "searches.csv": lines("section,sample,group", "Orskel Ledge,OL-1,ammonoid"),
    });
    expect(problemsOf(study, "similar-name").filter(({ column }) => column === "group")).toMatchObject([
      { file: "searches.csv", row: 2, found: "ammonoid" },
    ]);
  });

  it("horizons, unless they are declared one", () => {
    const files = {
      "sections.csv": lines("section,axis,unit", "Orskel Ledge,height,m", "Tamber Quarry,height,m"),
      "horizons.csv": lines(
        "section,horizon,kind,position",
        "Orskel Ledge,ash upper,ash,2",
        "Tamber Quarry,Ash-upper,ash,2",
      ),
    };
    expect(problemsOf(studyFrom(files), "similar-name")).toMatchObject([{ row: 3, column: "horizon" }]);
    const pairs = [
      ["Orskel Ledge", "ash upper"],
      ["Tamber Quarry", "Ash-upper"],
    ];
    const same = { boundary: { same: [{ name: "ash", horizons: pairs }] } };
    expect(problemsOf(studyFrom(files, same), "similar-name")).toEqual([]);
  });
});
