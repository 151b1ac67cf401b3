import { describe, expect, it } from "vitest";
import { samples } from "../../../../src/core/study/tables/samples.ts";
import { readWrittenCsv } from "../../../../src/core/tables/csv.ts";
import {
  readDataPackage,
  tableResource,
  writeDataPackage,
} from "../../../../src/core/tables/data-package.ts";
import { writeCsv } from "../../../../src/core/tables/write-csv.ts";
import { errorsOf, lines, onlySection, sections, studyFrom } from "./study-files.ts";

const verbatim = (files: Record<string, string>) =>
  onlySection(studyFrom({ "sections.csv": sections, ...files })).occurrences.at(0)?.verbatim;

describe("writing CSV", () => {
  it("quotes what needs it, ends lines with a line feed, and writes numbers in their shortest form", () => {
    const { text } = writeCsv(
      ["a", "b"],
      [
        ["x,y", 0.1 + 0.2],
        ['say "so"', -0],
        ["two\nlines", undefined],
        [" edge", 1e21],
        [true, false],
      ],
    );
    expect(text).toBe(
      'a,b\n"x,y",0.30000000000000004\n"say ""so""",0\n"two\nlines",\n" edge",1e+21\nyes,no\n',
    );
  });

  it("refuses a number that is not finite", () => {
    expect(() => writeCsv(["low_m"], [[Number.NaN]])).toThrow(/low_m/);
  });

  it.each(["=1+1", "+cmd", "-x", "@a", "\tx", "'=1", "''-x"])(
    "guards the text %j and takes the guard off again",
    (text) => {
      const written = writeCsv(["name", "n"], [[text, 1]]);
      expect(written.guarded).toEqual(["name"]);
      const [raw] = readWrittenCsv(written.text).rows;
      expect(raw[0]).toBe(`'${text}`);
      expect(readWrittenCsv(written.text, written.guarded).rows).toEqual([[text, "1"]]);
    },
  );

  it.each(["-5", "+3.2", "-1e-3", "'quoted'", "a=b", "x"])("leaves %j as it is", (text) => {
    const written = writeCsv(["name"], [[text]]);
    expect(written.guarded).toEqual([]);
    expect(readWrittenCsv(written.text).rows).toEqual([[text]]);
  });
});

describe("apostrophes in a study", () => {
  const taxon = "=cmd|' /C calc'!A0";
  const { text, guarded } = writeCsv(["section", "taxon", "position"], [["Orskel Ledge", taxon, 1]]);
  const resource = { ...tableResource(samples, guarded), name: "occurrences", path: "occurrences.csv" };

  it("are taken off where datapackage.json records them, and only there", () => {
    expect(verbatim({ "occurrences.csv": text, "datapackage.json": writeDataPackage("x", [resource]) })).toBe(
      taxon,
    );
    expect(verbatim({ "occurrences.csv": text })).toBe(`'${taxon}`);
    expect(
      verbatim({
        "occurrences.csv": text,
        "datapackage.json": writeDataPackage("x", [{ ...resource, guarded: [] }]),
      }),
    ).toBe(`'${taxon}`);
  });

  it("are kept where datapackage.json cannot be read, with a caution", () => {
    const study = studyFrom({
      "sections.csv": sections,
      "occurrences.csv": lines("section,taxon,position", "Orskel Ledge,Orvella tenuis,1"),
      "datapackage.json": "{",
    });
    expect(study.problems).toMatchObject([
      { code: "package-unreadable", severity: "caution" },
      { code: "ungrouped" },
      { code: "one-occurrence" },
    ]);
    expect(errorsOf(study)).toEqual([]);
  });

  it("are recorded by resource, under a name that says so", () => {
    const descriptor = writeDataPackage("Veyra Shelf!", [resource]);
    expect(JSON.parse(descriptor)).toMatchObject({
      $schema: "https://datapackage.org/profiles/2.0/datapackage.json",
      name: "veyra-shelf",
      resources: [
        { name: "occurrences", path: "occurrences.csv", type: "table", "lastbed:apostrophes": ["taxon"] },
      ],
    });
    expect(readDataPackage(descriptor)?.apostrophes).toEqual(
      new Map([["occurrences.csv", new Set(["taxon"])]]),
    );
    expect(readDataPackage("[]")).toBeUndefined();
    expect(readDataPackage('{"resources":[{"path":1},null,"x"]}')?.apostrophes).toEqual(new Map());
  });
});
