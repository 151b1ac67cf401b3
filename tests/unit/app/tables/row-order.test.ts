import * as fc from "fast-check";
import { describe, expect, it } from "vitest";
import { applyEdits, type Edit, editsByFile, type TableForm } from "../../../../src/app/tables/edits.ts";
import { givenTable } from "../../../../src/app/tables/given-table.ts";
import { insertedRowStep } from "../../../../src/app/tables/grid-steps.ts";
import { rowNumbering, rowsInOrder } from "../../../../src/app/tables/row-order.ts";
import { readTables, studyTables } from "../../../../src/app/tables/shown-table.ts";
import { parseRecords } from "../../../../src/core/tables/csv.ts";

const FILE = "samples.csv";
const form: TableForm = {
  file: FILE,
  headers: ["section", "sample", "position"],
  dialect: { encoding: "UTF-8", delimiter: ",", decimal: "point", missing: [], headerRows: [1], notes: [] },
};

/** A table of five rows, with a blank line in it and edits made. */
const TEXT = "section,sample,position\r\na,A,1\r\n\r\na,B,2\r\na, C ,3\r\na,D,4\r\n";
const READ = [2, 4, 5, 6];
const cells = [
  ["a", "A", "1"],
  ["a", "B", "2"],
  ["a", " C ", "3"],
  ["a", "D", "4"],
];

function shown(edits: readonly Edit[]) {
  const sheet = {
    ...form,
    table: "samples" as const,
    columns: form.headers,
    recognised: [],
    rows: cells,
    rowNumbers: READ,
  };
  const read = readTables([givenTable(sheet, cells)], {
    sheets: [],
    problems: [],
    sections: [],
    edits: new Map(),
  });
  const [table] = studyTables(read, editsByFile(edits));
  if (table === undefined) throw new Error("no table");
  return table;
}

function written(edits: readonly Edit[], keepsRowNumbers = true): string {
  const given = new Map([[FILE, new TextEncoder().encode(TEXT)]]);
  return new TextDecoder().decode(applyEdits(given, edits, { forms: [form], keepsRowNumbers }).get(FILE));
}

type Step =
  | { readonly kind: "insert"; readonly place: number }
  | { readonly kind: "aside"; readonly place: number }
  | { readonly kind: "type"; readonly place: number; readonly column: number; readonly now: string };

const step: fc.Arbitrary<Step> = fc.oneof(
  fc.record({ kind: fc.constant("insert" as const), place: fc.nat(12) }),
  fc.record({
    kind: fc.constant("type" as const),
    place: fc.nat(12),
    column: fc.nat(2),
    now: fc.stringMatching(/^[a-z]{1,3}$/),
  }),
  fc.record({ kind: fc.constant("aside" as const), place: fc.nat(12) }),
);

/** Edits as a person makes them one after another in the grid. */
function editsOf(steps: readonly Step[]): readonly Edit[] {
  let edits: readonly Edit[] = [];
  for (const one of steps) {
    const table = shown(edits);
    const place = one.place % (table.rows.length + (one.kind === "insert" ? 1 : 0));
    const row = table.rowIds[place] ?? 0;
    if (one.kind === "insert") edits = [...edits, ...insertedRowStep(table, place).edits];
    else if (one.kind === "aside")
      edits = [...edits, { kind: "row-set-aside", file: FILE, row, reason: "why" }];
    else edits = [...edits, { kind: "cell", file: FILE, row, column: one.column, now: one.now }];
  }
  return edits;
}

describe("rows put between others", () => {
  it("stand above the row that they were put above, in the file as on the page", () => {
    const edits: readonly Edit[] = [
      { kind: "row-added", file: FILE, row: 7, above: 4 },
      { kind: "row-added", file: FILE, row: 8, above: 7 },
      { kind: "row-added", file: FILE, row: 9 },
      { kind: "cell", file: FILE, row: 8, column: 1, was: "", now: "first" },
      { kind: "cell", file: FILE, row: 7, column: 1, was: "", now: "second" },
      { kind: "cell", file: FILE, row: 9, column: 1, was: "", now: "last" },
    ];
    expect(written(edits)).toBe(
      "section,sample,position\r\na,A,1\r\n\r\n,first,\r\n,second,\r\na,B,2\r\na, C ,3\r\na,D,4\r\n,last,\r\n",
    );
    const table = shown(edits);
    expect(table.rows.map((row) => row[1])).toEqual(["A", "first", "second", "B", " C ", "D", "last"]);
    expect(table.rowNumbers).toEqual([2, 4, 5, 6, 7, 8, 9]);
  });

  it("leave no line behind when they are set aside", () => {
    const edits: readonly Edit[] = [
      { kind: "row-added", file: FILE, row: 7, above: 4 },
      { kind: "row-set-aside", file: FILE, row: 7, reason: "none" },
    ];
    expect(written(edits, false)).toBe(TEXT);
    expect(written(edits)).toBe(TEXT.replace("a,B", "\r\na,B"));
  });

  it("are on the page what they are in the file, row by row and number by number, whatever was done", () => {
    fc.assert(
      fc.property(fc.array(step, { maxLength: 12 }), (steps) => {
        const edits = editsOf(steps);
        const table = shown(edits);
        const read = new Map(parseRecords(written(edits)).records.map(({ row, cells }) => [row, cells]));
        for (const [place, row] of table.rowNumbers.entries()) {
          const own = table.rows[place] ?? [];
          const isBlank =
            table.setAside.has(table.rowIds[place] ?? 0) || own.every((cell) => cell.trim() === "");
          expect(read.get(row)).toEqual(isBlank ? undefined : own);
        }
      }),
    );
  });

  it("keep their numbers and the page's in step, there and back", () => {
    const added = fc.array(fc.option(fc.nat(20), { nil: undefined }), { maxLength: 8 }).map((above) =>
      above.map((row, at) => ({
        row: 11 + at,
        above: row === undefined || row >= 9 + at ? undefined : row + 2,
      })),
    );
    fc.assert(
      fc.property(added, (added) => {
        const { shown, known } = rowNumbering(added);
        const rows = rowsInOrder([2, 3, 4, 5, 6, 7, 8, 9, 10], added);
        expect(rows.map(shown)).toEqual(rows.map((_, at) => at + 2));
        expect(rows.map(shown).map(known)).toEqual(rows);
      }),
    );
  });
});
