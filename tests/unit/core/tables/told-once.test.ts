import { describe, expect, it } from "vitest";
import { lines, problemsOf, sections, studyFrom } from "./study-files.ts";

describe("what is one omission is told once", () => {
  it("samples that name a leg of a section without any", () => {
    const study = studyFrom({
      "sections.csv": sections,
      "samples.csv": lines(
        "section,sample,leg,position",
        "Orskel Ledge,S1,A,1",
        "Orskel Ledge,S2,A,2",
        "Orskel Ledge,S3,A,3",
      ),
    });
    const told = problemsOf(study, "unknown-leg");
    expect(told).toHaveLength(1);
    expect(told[0]).toMatchObject({ severity: "error", row: 2, found: "A (and 2 more rows)" });
    expect(study.sections[0].samples).toEqual([]);
  });

  it("but a wrong leg beside listed ones is told at its own row", () => {
    const study = studyFrom({
      "sections.csv": sections,
      "legs.csv": lines("section,leg,reading,position", "Orskel Ledge,A,0,0", "Orskel Ledge,A,9,9"),
      "samples.csv": lines("section,sample,leg,position", "Orskel Ledge,S1,B,1", "Orskel Ledge,S2,B,2"),
    });
    expect(problemsOf(study, "unknown-leg").map(({ row }) => row)).toEqual([2, 3]);
  });
});

describe("a taxon listed with its qualifier", () => {
  it("gives its group to the find that is spelled alike", () => {
    const study = studyFrom({
      "sections.csv": sections,
      "occurrences.csv": lines(
        "section,taxon,position",
        "Orskel Ledge,Tholites cf. minor,1",
        "Orskel Ledge,Tholites cf. minor,2",
      ),
      "taxa.csv": lines("taxon,group", "Tholites cf. minor,ammonoids"),
    });
    expect(study.taxa.get("Tholites minor")?.group).toBe("ammonoids");
    expect(problemsOf(study, "ungrouped")).toEqual([]);
  });
});
