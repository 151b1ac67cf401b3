import { describe, expect, it } from "vitest";
import { readStudy } from "../../../../src/core/tables/read-study.ts";
import { errorsOf, lines, onlySection, problemsOf, sections, studyFrom } from "./study-files.ts";

const finds = (...rows: readonly string[]) => lines("section,taxon,position,count", ...rows);
const samples = (...rows: readonly string[]) =>
  lines("section,sample,position,thickness,base,top,leg", ...rows);
const good = "Orskel Ledge,Velorites orskelensis,1.5,2";
const heights = (study: ReturnType<typeof studyFrom>) =>
  Array.from(onlySection(study).occurrences, ({ heightM }) => heightM);

const beds = (axis: string) =>
  studyFrom({
    "sections.csv": lines("section,axis,unit", `Orskel Ledge,${axis},m`),
    "beds.csv": lines("section,base,top,lithology", "Orskel Ledge,5,4,marl", "Orskel Ledge,4,5,chalk"),
    "occurrences.csv": finds(good),
  });

describe("read without remark", () => {
  it("takes a byte-order mark and CRLF line ends", () => {
    const plain = studyFrom({
      "sections.csv": sections,
      "occurrences.csv": finds(good, "Orskel Ledge,Velorites orskelensis,2,1"),
    });
    const dressed = studyFrom({
      "sections.csv": `\uFEFF${sections.replaceAll("\n", "\r\n")}`,
      "occurrences.csv": `\uFEFF${finds(good, "Orskel Ledge,Velorites orskelensis,2,1").replaceAll("\n", "\r\n")}`,
    });
    expect(dressed.sections).toEqual(plain.sections);
    expect(dressed.problems).toEqual(plain.problems);
    expect(errorsOf(dressed)).toEqual([]);
  });

  it("counts rows as a spreadsheet does: quoted line breaks do not shift, blank rows do", () => {
    const study = studyFrom({
      "sections.csv": sections,
      "samples.csv": 'section,sample,position,notes\nOrskel Ledge,A,1,"two\nlines"\n\nOrskel Ledge,B,x,\n',
      "occurrences.csv": finds(good),
    });
    expect(problemsOf(study, "not-a-number")).toMatchObject([
      { file: "samples.csv", row: 4, column: "position", found: "x" },
    ]);
    expect(onlySection(study).samples[0].notes).toBe("two\nlines");
  });
});

describe("caution, and used", () => {
  it("uses a duplicated identical row once", () => {
    const study = studyFrom({
      "sections.csv": sections,
      "occurrences.csv": finds(good, good, "Orskel Ledge,Velorites orskelensis,3,1"),
    });
    expect(problemsOf(study, "duplicate-row")).toMatchObject([{ severity: "caution", row: 3 }]);
    expect(heights(study)).toEqual([1.5, 3]);
  });

  it("keeps count 0 as looked for and not found", () => {
    const study = studyFrom({
      "sections.csv": sections,
      "occurrences.csv": finds("Orskel Ledge,Velorites orskelensis,1.5,0"),
    });
    expect(problemsOf(study, "count-zero")).toMatchObject([{ severity: "caution", row: 2, column: "count" }]);
    expect(onlySection(study).occurrences.at(0)?.count).toBe(0);
  });

  it("tells a taxon with all finds at one level, and one with a single find", () => {
    const study = studyFrom({
      "sections.csv": sections,
      "occurrences.csv": finds(
        good,
        "Orskel Ledge,Velorites orskelensis,1.5,7",
        "Orskel Ledge,Orvella tenuis,9,1",
      ),
    });
    expect(problemsOf(study, "one-level")).toMatchObject([
      { severity: "caution", found: "Velorites orskelensis in Orskel Ledge" },
    ]);
    expect(problemsOf(study, "one-occurrence")).toMatchObject([
      { severity: "caution", found: "Orvella tenuis in Orskel Ledge" },
    ]);
    expect(heights(study)).toEqual([1.5, 1.5, 9]);
  });
});

describe("an error on the row, the rest goes on", () => {
  it.each([
    ["many", "not-a-number"],
    ["NaN", "not-finite"],
    ["Infinity", "not-finite"],
    ["-inf", "not-finite"],
    ["1e999", "not-finite"],
    ["0x10", "not-a-number"],
    ["1 2", "not-a-number"],
  ])("leaves out a row with %s for a number", (text, code) => {
    const study = studyFrom({
      "sections.csv": sections,
      "occurrences.csv": finds(`Orskel Ledge,Velorites orskelensis,${text},1`, good),
    });
    expect(problemsOf(study, code)).toMatchObject([
      { severity: "error", file: "occurrences.csv", row: 2, column: "position", found: text },
    ]);
    expect(heights(study)).toEqual([1.5]);
  });

  it("leaves out a negative thickness and a count that is no whole number", () => {
    const study = studyFrom({
      "sections.csv": sections,
      "samples.csv": samples("Orskel Ledge,A,1,-0.1,,,", "Orskel Ledge,B,2,0.1,,,"),
      "occurrences.csv": finds(good, "Orskel Ledge,Velorites orskelensis,2,1.5"),
    });
    expect(problemsOf(study, "out-of-limits")).toMatchObject([
      { severity: "error", file: "samples.csv", row: 2, column: "thickness" },
    ]);
    expect(problemsOf(study, "not-an-integer")).toMatchObject([
      { severity: "error", row: 3, column: "count" },
    ]);
    expect(onlySection(study).samples.map(({ name }) => name)).toEqual(["B"]);
  });

  it("leaves out top below base, in height and in depth", () => {
    const [inHeight, inDepth] = [beds("height"), beds("depth")];
    expect(problemsOf(inHeight, "top-below-base")).toMatchObject([
      { severity: "error", row: 2, column: "top", found: "base 5, top 4" },
    ]);
    expect(problemsOf(inDepth, "top-below-base")).toMatchObject([
      { severity: "error", row: 3, found: "base 4, top 5" },
    ]);
    expect(onlySection(inDepth).beds).toMatchObject([{ baseM: -5, topM: -4, lithology: "marl" }]);
  });

  it("leaves out an unlisted section and names the nearest", () => {
    const study = studyFrom({
      "sections.csv": sections,
      "occurrences.csv": finds("Orsk Lege,Velorites orskelensis,1,1", good),
    });
    const [problem] = problemsOf(study, "unlisted-section");
    expect(problem).toMatchObject({ severity: "error", row: 2, column: "section", found: "Orsk Lege" });
    expect(problem.mend).toContain("Orskel Ledge");
    expect(heights(study)).toEqual([1.5]);
  });

  it("leaves out the second row of a sample with other content", () => {
    const study = studyFrom({
      "sections.csv": sections,
      "samples.csv": samples("Orskel Ledge,A,1,,,,", "Orskel Ledge,A,2,,,,"),
      "occurrences.csv": finds(good),
    });
    expect(problemsOf(study, "redefined")).toMatchObject([
      { severity: "error", file: "samples.csv", row: 3, column: "sample", found: "A" },
    ]);
    expect(onlySection(study).samples.map(({ heightM }) => heightM)).toEqual([1]);
  });

  it("leaves out a reading outside its leg", () => {
    const study = studyFrom({
      "sections.csv": sections,
      "legs.csv": lines("section,leg,reading,position", "Orskel Ledge,A,0,10", "Orskel Ledge,A,5,14"),
      "samples.csv": samples(
        "Orskel Ledge,in,2.5,,,,A",
        "Orskel Ledge,out,5.1,,,,A",
        "Orskel Ledge,lost,1,,,,B",
      ),
      "occurrences.csv": finds(good),
    });
    expect(problemsOf(study, "outside-leg")).toMatchObject([
      {
        severity: "error",
        row: 3,
        column: "position",
        found: "5.1",
        expected: "a reading from 0 to 5 m on leg A",
      },
    ]);
    expect(problemsOf(study, "unknown-leg")).toMatchObject([
      { severity: "error", row: 4, column: "leg", found: "B" },
    ]);
    expect(onlySection(study).samples).toMatchObject([{ name: "in", heightM: 12, leg: "A" }]);
  });

  it("leaves out a find in an unknown sample, and a row with neither sample nor position", () => {
    const study = studyFrom({
      "sections.csv": sections,
      "samples.csv": samples("Orskel Ledge,A1,1,,,,"),
      "occurrences.csv": lines(
        "section,taxon,sample,position",
        "Orskel Ledge,Orvella tenuis,A2,",
        "Orskel Ledge,Orvella tenuis,,",
        "Orskel Ledge,Orvella tenuis,A1,",
      ),
    });
    expect(problemsOf(study, "unknown-sample")).toMatchObject([{ severity: "error", row: 2, found: "A2" }]);
    expect(problemsOf(study, "one-of")).toMatchObject([
      { severity: "error", row: 3, expected: "sample, or position" },
    ]);
    expect(heights(study)).toEqual([1]);
  });

  it.each([
    ["Orskel Ledge,A,1,,0.5,,", "half-slab", "top"],
    ["Orskel Ledge,A,,,,0.5,", "one-of", undefined],
    ["Orskel Ledge,A,3,,1,2,", "position-outside-slab", "position"],
  ])("leaves out a slab that is half told or contradicts its position: %s", (row, code, column) => {
    const study = studyFrom({
      "sections.csv": sections,
      "samples.csv": samples(row, "Orskel Ledge,B,1.5,,1,2,"),
      "occurrences.csv": finds(good),
    });
    expect(errorsOf(study).map((problem) => [problem.code, problem.column, problem.row])).toEqual([
      [code, column, 2],
    ]);
    expect(onlySection(study).samples).toMatchObject([{ name: "B", baseM: 1, topM: 2, heightM: 1.5 }]);
  });

  it("leaves out a find whose position is not in its sample", () => {
    const study = studyFrom({
      "sections.csv": sections,
      "samples.csv": samples("Orskel Ledge,A,1,0.2,,,"),
      "occurrences.csv": lines(
        "section,taxon,sample,position",
        "Orskel Ledge,Orvella tenuis,A,1.05",
        "Orskel Ledge,Orvella tenuis,A,1.2",
      ),
    });
    expect(problemsOf(study, "sample-elsewhere")).toMatchObject([
      { severity: "error", row: 3, column: "sample" },
    ]);
    expect(heights(study)).toEqual([1]);
  });

  it("leaves out a row with more cells than the header, and reads a short one with a caution", () => {
    const study = studyFrom({
      "sections.csv": sections,
      "occurrences.csv": finds(`${good},surplus`, "Orskel Ledge,Orvella tenuis,4"),
    });
    expect(problemsOf(study, "too-many-cells")).toMatchObject([{ severity: "error", row: 2 }]);
    expect(problemsOf(study, "too-few-cells")).toMatchObject([{ severity: "caution", row: 3 }]);
    expect(heights(study)).toEqual([4]);
  });
});

describe("an error on the file, the others go on", () => {
  const beside = { "sections.csv": sections, "occurrences.csv": finds(good) };
  it.each([
    ["an empty file", "", "empty-file"],
    ["a file of blank lines", "\n\n", "empty-file"],
    ["a header alone", "section,sample,position\n", "header-only"],
    ["an unknown unit", "section,sample,height (furlong)\nOrskel Ledge,A,1\n", "unknown-unit"],
    [
      "a number that is 1.234 or 1234",
      "section;sample;position\nOrskel Ledge;A;1,234\n",
      "decimal-ambiguous",
    ],
    ["a missing column", "section,position\nOrskel Ledge,1\n", "missing-column"],
    ["no position at all", "section,sample\nOrskel Ledge,A\n", "missing-column"],
    ["a doubled column", "section,sample,position,Position\nOrskel Ledge,A,1,2\n", "duplicate-header"],
  ])("names %s", (_, text, code) => {
    const study = studyFrom({ ...beside, "samples.csv": text });
    expect(errorsOf(study)).toMatchObject([{ code, file: "samples.csv" }]);
    expect(heights(study)).toEqual([1.5]);
    expect(onlySection(study).samples).toEqual([]);
  });

  it.each([
    ["signs that no text holds", [0x4f, 0x72, 0xf8, 0x2c, 0x01]],
    ["UTF-16 that breaks off", [0xff, 0xfe, 0x73, 0x00, 0x65]],
    ["nulls", [0x73, 0x00, 0x65, 0x00]],
  ])("names bytes that are not text: %s", (_, bytes) => {
    const encoder = new TextEncoder();
    const study = readStudy(
      new Map([
        ["sections.csv", encoder.encode(sections)],
        ["occurrences.csv", encoder.encode(finds(good))],
        ["samples.csv", new Uint8Array(bytes)],
      ]),
    );
    expect(errorsOf(study)).toMatchObject([{ code: "undecodable-bytes", file: "samples.csv" }]);
    expect(heights(study)).toEqual([1.5]);
  });

  it("takes one comma number among points for a slip of its row", () => {
    const study = studyFrom({
      ...beside,
      "samples.csv": 'section,sample,position\nOrskel Ledge,A,"1,5"\nOrskel Ledge,B,2.5\n',
    });
    expect(errorsOf(study)).toMatchObject([{ code: "not-a-number", row: 2 }]);
    expect(onlySection(study).samples.map(({ name }) => name)).toEqual(["B"]);
  });

  it("says that nothing can be answered without finds, ranges or measurements", () => {
    expect(errorsOf(studyFrom({ "sections.csv": sections }))).toMatchObject([{ code: "no-data" }]);
    expect(errorsOf(studyFrom({}))).toMatchObject([{ code: "no-data" }]);
  });
});

describe("awkward text stays text", () => {
  it.each(["=cmd|' /C calc'!A0", "<img src=x onerror=alert(1)>", "__proto__", "constructor", "toString"])(
    "keeps a taxon named %s",
    (name) => {
      const study = studyFrom({
        "sections.csv": lines("section,axis,unit", `${name},height,m`),
        "taxa.csv": lines(`taxon,group,${name}`, `${name},hasOwnProperty,value`),
        "samples.csv": lines("section,sample,position", `${name},${name},1`),
        "occurrences.csv": lines("section,taxon,sample", `${name},${name},${name}`),
      });
      expect(errorsOf(study)).toEqual([]);
      expect(onlySection(study).name).toBe(name);
      expect([...onlySection(study).occurrences]).toMatchObject([
        { taxon: name, verbatim: name, sample: name, heightM: 1 },
      ]);
      expect(study.taxa.get(name)?.group).toBe("hasOwnProperty");
      expect(Object.entries(study.taxa.get(name)?.traits ?? {})).toEqual([[name, "value"]]);
      expect(structuredClone(study.taxa)).toEqual(study.taxa);
    },
  );

  it("reads a cell of 200 kB and shortens it in messages", () => {
    const long = "x".repeat(200_000);
    const study = studyFrom({
      "sections.csv": sections,
      "occurrences.csv": finds(`Orskel Ledge,${long},1,1`, `Orskel Ledge,Orvella tenuis,${long},1`),
    });
    expect(onlySection(study).occurrences.at(0)?.verbatim).toHaveLength(200_000);
    for (const problem of study.problems) expect(problem.found.length).toBeLessThan(300);
    expect(problemsOf(study, "not-a-number")[0].found).toContain("(200000 characters)");
  });
});
