import { describe, expect, it } from "vitest";
import type { Study } from "../../../../../src/core/study/model.ts";
import { readStudy } from "../../../../../src/core/tables/read-study.ts";

const read = (files: Record<string, string>): Study =>
  readStudy(new Map(Object.entries(files).map(([name, text]) => [name, new TextEncoder().encode(text)])));

const findsOf = (study: Study) =>
  study.sections.flatMap(({ name, occurrences }) =>
    Array.from(occurrences, ({ verbatim, heightM, origin }) => [
      name,
      verbatim,
      Number(heightM.toFixed(6)),
      origin.file,
      origin.row,
    ]),
  );

const errorsOf = ({ problems }: Study) => problems.filter(({ severity }) => severity === "error");

describe("wide sheets, one for each section", () => {
  const study = read({
    "Tarn Cut.csv": "Sample,Height (m),Velorites alta,Velorites parva\nT1,1,x,0\nT2,2,x,?x\n",
    "beck.xlsx [Orsk Beck]": "Sample,Depth (ft),Velorites alta,Quenstra lenis\nO1,10,x,0\nO2,20,VR,x\n",
  });

  it("are one study, each find where it stands in its own file", () => {
    expect(findsOf(study)).toEqual([
      ["Tarn Cut", "Velorites alta", 1, "Tarn Cut.csv", 2],
      ["Tarn Cut", "Velorites alta", 2, "Tarn Cut.csv", 3],
      ["Tarn Cut", "Velorites parva", 2, "Tarn Cut.csv", 3],
      ["Orsk Beck", "Velorites alta", -3.048, "beck.xlsx [Orsk Beck]", 2],
      ["Orsk Beck", "Quenstra lenis", -6.096, "beck.xlsx [Orsk Beck]", 3],
    ]);
    expect(study.sections.map(({ axis, unit }) => [axis, unit])).toEqual([
      ["height", "m"],
      ["depth", "ft"],
    ]);
    expect(study.sheets.map(({ file }) => file)).toEqual(["Tarn Cut.csv", "beck.xlsx [Orsk Beck]"]);
  });

  it("have their problems told at the taxon's column and the row", () => {
    expect(study.problems.filter(({ code }) => code === "code-unknown")).toMatchObject([
      { code: "code-unknown", file: "beck.xlsx [Orsk Beck]", row: 3, column: "Velorites alta" },
    ]);
    expect(study.problems.filter(({ code }) => code === "one-occurrence")).toMatchObject([
      { file: "Tarn Cut.csv", row: 3, column: "Velorites parva" },
      { file: "beck.xlsx [Orsk Beck]", row: 2, column: "Velorites alta" },
    ]);
  });

  it("say who searched what in each", () => {
    expect(study.sections.map(({ searches }) => searches.map(({ sample }) => sample))).toEqual([
      ["T1", "T2"],
      ["O1", "O2"],
    ]);
  });
});

describe("wide sheets, one for each group", () => {
  const study = read({
    "taxa.csv":
      "taxon,group\nVelorites alta,ammonites\nVelorites parva,ammonites\nQuenstra lenis,bivalves\nQuenstra dura,bivalves\n",
    "ammonites.csv":
      "Section,Sample,Height (m),Velorites alta,Velorites parva\nTarn Cut,T1,1,3,0\nTarn Cut,T2,2,0,1\n",
    "bivalves.csv":
      "Section,Sample,Height (m),Quenstra lenis,Quenstra dura\nTarn Cut,T1,1,2,0\nTarn Cut,T3,3,5,1\n",
  });

  it("share their samples and keep their searches apart", () => {
    expect(errorsOf(study)).toEqual([]);
    expect(study.sections.flatMap(({ samples }) => samples.map(({ name }) => name))).toEqual([
      "T1",
      "T2",
      "T3",
    ]);
    expect(
      study.sections.flatMap(({ searches }) => searches.map(({ sample, group }) => `${sample} ${group}`)),
    ).toEqual(["T1 ammonites", "T2 ammonites", "T1 bivalves", "T3 bivalves"]);
  });

  it("tell a sample that lies elsewhere in the second", () => {
    const apart = read({
      "ammonites.csv": "Section,Sample,Height (m),Velorites alta,Velorites parva\nTarn Cut,T1,1,3,0\n",
      "bivalves.csv": "Section,Sample,Height (m),Quenstra lenis,Quenstra dura\nTarn Cut,T1,1.5,2,0\n",
    });
    expect(errorsOf(apart)).toMatchObject([{ code: "redefined", file: "bivalves.csv", row: 2 }]);
  });
});

describe("a wide sheet beside a long table of finds", () => {
  it("is told as a second table, and joins nothing", () => {
    const study = read({
      "occurrences.csv": "section,taxon,height (m)\nTarn Cut,Velorites alta,1\n",
      "more.csv": "Section,Sample,Height (m),Velorites alta,Velorites parva\nTarn Cut,T1,1,3,0\n",
    });
    expect(findsOf(study)).toHaveLength(1);
    expect(study.problems.some(({ file }) => file === "more.csv")).toBe(true);
  });
});

describe("a wide sheet of a section with legs", () => {
  it("places each sample by the reading of its leg", () => {
    const study = read({
      "sections.csv": "section,axis,unit\nTarn Cut,height,m\n",
      "legs.csv":
        "section,leg,reading,position\nTarn Cut,A,0,0\nTarn Cut,A,10,10\nTarn Cut,B,0,8\nTarn Cut,B,10,18\n",
      "finds.csv":
        "Section,Leg,Sample,Position,Velorites alta,Velorites parva\nTarn Cut,A,A1,9,x,0\nTarn Cut,B,B1,1,x,x\nTarn Cut,B,B2,5,0,x\n",
    });
    expect(errorsOf(study)).toEqual([]);
    expect(findsOf(study).map(([, taxon, height]) => [taxon, height])).toEqual([
      ["Velorites alta", 9],
      ["Velorites alta", 9],
      ["Velorites parva", 9],
      ["Velorites parva", 13],
    ]);
  });

  it("tells a leg that the section does not have", () => {
    const study = read({
      "sections.csv": "section,axis,unit\nTarn Cut,height,m\n",
      "legs.csv": "section,leg,reading,position\nTarn Cut,A,0,0\nTarn Cut,A,10,10\n",
      "finds.csv":
        "Section,Leg,Sample,Position,Velorites alta,Velorites parva\nTarn Cut,A,A1,9,x,0\nTarn Cut,C,C1,1,x,x\n",
    });
    expect(errorsOf(study)).toMatchObject([
      { code: "unknown-leg", file: "finds.csv", row: 3 },
      { code: "unknown-sample" },
    ]);
  });
});
