import * as fc from "fast-check";
import { describe, expect, it } from "vitest";
import { filesGivenOut, tableGivenOut, workbookGivenOut } from "../../../src/app/tables/give-out.ts";
import { readSources } from "../../../src/core/tables/read-sources.ts";
import { readStudy } from "../../../src/core/tables/read-study.ts";

const FILE = "occurrences.csv";
const bytes = (text: string) => new TextEncoder().encode(text);
const quoted = (rows: readonly (readonly string[])[]) =>
  rows.map((row) => `${row.map((cell) => `"${cell.replaceAll('"', '""')}"`).join(",")}\n`).join("");

const cell = fc.oneof(
  fc.constantFrom(
    "=1+1",
    "+x",
    "-y",
    "@z",
    "\tt",
    "'=q",
    "''=q",
    "'",
    "-2",
    "+3",
    "007",
    "1.50",
    "a\nb",
    " b ",
    "é",
  ),
  fc.string({ maxLength: 5 }),
);
const rows = fc.array(
  fc.tuple(fc.constant("Orsk"), fc.constant("Velorites a"), fc.constantFrom("1.5", "-2", "30"), cell, cell),
  { minLength: 1, maxLength: 5 },
);
const HEADERS = ["section", "taxon", "height (m)", "notes", "=odd"];

const cellsOf = (given: ReadonlyMap<string, Uint8Array>) => {
  const [sheet] = readStudy(given).sheets;
  return { headers: sheet?.headers, rows: [...(sheet?.rows ?? [])] };
};

describe("tables that are given out", () => {
  it("read back to the same cells, one alone, all in a folder, and in a folder again", () => {
    fc.assert(
      fc.property(rows, (rows) => {
        const given = new Map([[FILE, bytes(quoted([HEADERS, ...rows]))]]);
        const expected = { headers: HEADERS, rows };
        const forms = readStudy(given).sheets;
        const alone = tableGivenOut(given, [], { file: FILE, forms });
        expect(alone?.bytes).toBe(given.get(FILE));
        const folder = filesGivenOut(given, [], { name: "Orsk", forms });
        expect(cellsOf(folder)).toEqual(expected);
        const guardedForms = readStudy(folder).sheets;
        expect(cellsOf(filesGivenOut(folder, [], { name: "Orsk", forms: guardedForms }))).toEqual(expected);
        const outOfFolder = tableGivenOut(folder, [], { file: FILE, forms: guardedForms });
        expect(cellsOf(new Map([[FILE, outOfFolder?.bytes ?? bytes("")]]))).toEqual(expected);
      }),
      { numRuns: 40 },
    );
  });

  it("read back to the same cells from a workbook, guarded before or not", async () => {
    await fc.assert(
      fc.asyncProperty(rows, fc.boolean(), async (rows, isGuarded) => {
        const plain = new Map([[FILE, bytes(quoted([HEADERS, ...rows]))]]);
        const { sheets } = readStudy(plain);
        const given = isGuarded ? filesGivenOut(plain, [], { name: "Orsk", forms: sheets }) : plain;
        const forms = readStudy(given).sheets;
        const packed = workbookGivenOut(given, [], { name: "Orsk", forms });
        const [sheet] = (await readSources(new Map([["Orsk.xlsx", packed]]))).sheets;
        expect(sheet?.headers).toEqual(HEADERS);
        expect([...(sheet?.rows ?? [])]).toEqual(rows);
      }),
      { numRuns: 60 },
    );
  });

  it("tells how many cells of a table alone would run as a formula", () => {
    const given = new Map([[FILE, bytes("section,taxon,height (m),notes\nOrsk,a,-1,=1+1\nOrsk,b,2,-x\n")]]);
    expect(tableGivenOut(given, [], { file: FILE, forms: readStudy(given).sheets })?.formulas).toBe(2);
  });
});
