import * as fc from "fast-check";
import { describe, expect, it } from "vitest";
import { readWrittenCsv } from "../../../../src/core/tables/csv.ts";
import { readStudy } from "../../../../src/core/tables/read-study.ts";
import { writeCsv } from "../../../../src/core/tables/write-csv.ts";

const awkward = fc.constantFrom(
  "=",
  "+",
  "-",
  "@",
  "\t",
  "'",
  '"',
  ",",
  "\n",
  "\r",
  "\r\n",
  ";",
  " ",
  "a",
  "1",
  ".",
  "é",
  "\uFEFF",
  "\u2028",
  "😀",
);
const text = fc.oneof(
  fc.array(awkward, { maxLength: 8 }).map((signs) => signs.join("")),
  fc.string({ unit: "grapheme", maxLength: 12 }).filter((cell) => !cell.includes("\0")),
);
const isBlank = (cells: readonly string[]) => cells.every((cell) => cell.trim() === "");
const grid = fc
  .integer({ min: 1, max: 5 })
  .chain((width) => fc.array(fc.array(text, { minLength: width, maxLength: width }), { maxLength: 8 }))
  .map((rows) => rows.filter((cells) => !isBlank(cells)));

describe("written tables", () => {
  it("read back as they were, whatever their text cells hold", () => {
    fc.assert(
      fc.property(grid, (rows) => {
        const headers = Array.from({ length: rows[0]?.length ?? 1 }, (_, index) => `column ${index}`);
        const written = writeCsv(headers, rows);
        expect(readWrittenCsv(written.text, written.guarded)).toEqual({ headers, rows });
      }),
      { seed: 1, numRuns: 2000 },
    );
  });

  it("give every double back to the bit", () => {
    const finite = fc.double({ noNaN: true, noDefaultInfinity: true });
    fc.assert(
      fc.property(fc.array(finite, { minLength: 1 }), (numbers) => {
        const { text } = writeCsv(
          ["x"],
          numbers.map((number) => [number]),
        );
        const back = readWrittenCsv(text).rows.map(([cell]) => Number(cell));
        expect(back).toEqual(numbers.map((number) => (number === 0 ? 0 : number)));
      }),
    );
  });

  it("hold no cell that a spreadsheet would run", () => {
    fc.assert(
      fc.property(grid, (rows) => {
        const headers = Array.from({ length: rows[0]?.length ?? 1 }, (_, index) => `column ${index}`);
        for (const cells of readWrittenCsv(writeCsv(headers, rows).text).rows) {
          for (const cell of cells) expect(/^[=+\-@\t]/.test(cell) && Number.isNaN(Number(cell))).toBe(false);
        }
      }),
    );
  });
});

const names = [
  "sections.csv",
  "legs.csv",
  "samples.csv",
  "searches.csv",
  "occurrences.csv",
  "measurements.csv",
  "taxa.csv",
  "horizons.csv",
  "settings.json",
  "datapackage.json",
];
const encoder = new TextEncoder();

describe("reading never throws", () => {
  it("on arbitrary bytes", () => {
    const files = fc.dictionary(fc.constantFrom(...names), fc.uint8Array({ maxLength: 200 }));
    fc.assert(
      fc.property(files, (files) => {
        const study = readStudy(new Map(Object.entries(files)));
        expect(study.problems.length).toBeGreaterThan(0);
      }),
      { seed: 1, numRuns: 300 },
    );
  });

  it("on a good study with cells replaced, and every number of the result is finite", () => {
    const cell = fc.oneof(
      text,
      fc.constantFrom(
        "NaN",
        "Infinity",
        "-1",
        "1e308",
        "-1e308",
        "0",
        "Orskel Ledge",
        "A",
        "S1",
        "nd",
        "<1",
        "depth",
        "ft",
        "__proto__",
      ),
    );
    const tables: Readonly<Record<string, string>> = {
      "sections.csv": "section,axis,unit,bottom,top\nOrskel Ledge,height,m,0,20\nTarn Cut,depth,ft,,\n",
      "legs.csv": "section,leg,reading,position\nOrskel Ledge,A,0,0\nOrskel Ledge,A,10,9\n",
      "samples.csv":
        "section,sample,position,thickness,leg\nOrskel Ledge,S1,1,0.1,A\nOrskel Ledge,S2,2,0.1,\nTarn Cut,S1,10,,\n",
      "occurrences.csv":
        "section,taxon,sample,position,count,qualifier\nOrskel Ledge,Orvella tenuis,S1,,3,cf.\nTarn Cut,Orvella tenuis,,11,,\n",
      "measurements.csv":
        "section,sample,analyte,value,unit,error,error_kind,detection_limit\nOrskel Ledge,S1,Ir,0.2,ppb,10,1s%,0.1\n",
      "horizons.csv":
        "section,horizon,kind,position,below,above,age_ma\nOrskel Ledge,H,impact,5,0.1,0.1,66\n",
    };
    const damage = fc.array(fc.tuple(fc.constantFrom(...Object.keys(tables)), fc.nat(30), cell), {
      minLength: 1,
      maxLength: 6,
    });
    fc.assert(
      fc.property(damage, (damage) => {
        const cells = new Map(
          Object.entries(tables).map(([name, text]) => [name, text.split(/(?<=[,\n])|(?=[,\n])/)]),
        );
        for (const [name, at, value] of damage) {
          const parts = cells.get(name) ?? [];
          const index = at % parts.length;
          if (parts[index] !== "," && parts[index] !== "\n") parts[index] = value;
        }
        const study = readStudy(
          new Map([...cells].map(([name, parts]) => [name, encoder.encode(parts.join(""))])),
        );
        expectFinite(study.sections);
      }),
      { seed: 1, numRuns: 1000 },
    );
  });
});

function expectFinite(value: unknown): void {
  if (typeof value === "number") expect(Number.isFinite(value)).toBe(true);
  else if (typeof value === "object" && value !== null)
    for (const part of Object.values(value)) expectFinite(part);
}
