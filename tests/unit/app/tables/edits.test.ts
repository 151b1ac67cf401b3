import * as fc from "fast-check";
import { describe, expect, it } from "vitest";
import { applyEdits, type Edit, type TableForm } from "../../../../src/app/tables/edits.ts";
import { patchCsv } from "../../../../src/app/tables/patch-csv.ts";
import { parseRecords } from "../../../../src/core/tables/csv.ts";

const FILE = "samples.csv";
const form: TableForm = {
  file: FILE,
  headers: ["section", "sample", "position"],
  dialect: { encoding: "UTF-8", delimiter: ",", decimal: "point", missing: [], headerRows: [1], notes: [] },
};
const bytes = (text: string) => new TextEncoder().encode(text);
const add = (row: number): Edit => ({ kind: "row-added", file: FILE, row });
const cell = (row: number, column: number, now: string, was = ""): Edit => ({
  kind: "cell",
  file: FILE,
  row,
  column,
  was,
  now,
});

function edited(text: string, edits: readonly Edit[], keepsRowNumbers = true, own: TableForm = form): string {
  const files = applyEdits(new Map([[FILE, bytes(text)]]), edits, { forms: [own], keepsRowNumbers });
  return new TextDecoder("utf-8", { ignoreBOM: true }).decode(files.get(FILE));
}

const TEXT =
  'section,sample,position\r\n "lorn" ,  A ,1.50\r\nlorn,"B ""two""\nlines",2.0\r\n\r\nlorn,C,3\r\n';

describe("edits of a table's file", () => {
  it("change their cell and no other sign", () => {
    expect(edited(TEXT, [cell(3, 2, "2.25")])).toBe(TEXT.replace("2.0\r\n", "2.25\r\n"));
    expect(edited(TEXT, [cell(2, 0, "a, b")])).toBe(TEXT.replace(' "lorn" ,', '"a, b",'));
    expect(edited("a,b,c\n1,2,3", [cell(2, 2, "4")])).toBe("a,b,c\n1,2,4");
  });

  it("give a short row the cells it lacks", () => {
    expect(edited("a,b,c\n1\n", [cell(2, 2, "3")])).toBe("a,b,c\n1,,3\n");
  });

  it("add rows below, beyond blank ones too", () => {
    expect(edited("a,b,c\n1,2,3\n", [add(3), cell(3, 1, "x"), add(4), cell(4, 0, "y")])).toBe(
      "a,b,c\n1,2,3\n,x,\ny,,\n",
    );
    expect(edited("a,b,c\n1,2,3", [add(3), cell(3, 1, "x")])).toBe("a,b,c\n1,2,3\n,x,");
    expect(edited("a,b,c\n1,2,3\n\n\n", [add(5)])).toBe("a,b,c\n1,2,3\n\n\n,,\n");
  });

  it("leave the place of a row set aside empty, or close it, and give the row back", () => {
    const aside: Edit = { kind: "row-set-aside", file: FILE, row: 2, reason: "counted twice" };
    const back: Edit = { kind: "row-taken-back", file: FILE, row: 2 };
    expect(edited("a,b,c\n1,2,3\n4,5,6\n", [aside])).toBe("a,b,c\n\n4,5,6\n");
    expect(edited("a,b,c\n1,2,3\n4,5,6\n", [aside], false)).toBe("a,b,c\n4,5,6\n");
    expect(edited("a,b,c\n1,2,3\n4,5,6\n", [aside, back], false)).toBe("a,b,c\n1,2,3\n4,5,6\n");
    expect(edited("a,b,c\n1,2,3", [aside], false)).toBe("a,b,c\n");
  });

  it("keep the file's own delimiter, its mark and its letters", () => {
    const semicolons = { ...form, dialect: { ...form.dialect, delimiter: ";" as const } };
    expect(edited("\uFEFFa;b;c\n1,5;2;3\n", [cell(2, 1, "2,5")], true, semicolons)).toBe(
      "\uFEFFa;b;c\n1,5;2,5;3\n",
    );
    const windows = { ...form, dialect: { ...form.dialect, encoding: "Windows-1252" as const } };
    const given = new Map([[FILE, Uint8Array.from([0x61, 0x0a, 0x80, 0x0a])]]);
    const options = { forms: [windows], keepsRowNumbers: true };
    expect([...(applyEdits(given, [cell(2, 0, "é–")], options).get(FILE) ?? [])]).toEqual([
      0x61, 0x0a, 0xe9, 0x96, 0x0a,
    ]);
    const wide = applyEdits(given, [cell(2, 0, "δ")], options).get(FILE);
    expect(new TextDecoder("utf-16le").decode(wide)).toBe("a\nδ\n");
  });

  it("leave files without an edit as they are, byte for byte", () => {
    const other = bytes("x");
    const files = new Map([
      [FILE, bytes("a\n1\n")],
      ["notes.txt", other],
    ]);
    expect(
      applyEdits(files, [cell(2, 0, "2")], { forms: [form], keepsRowNumbers: true }).get("notes.txt"),
    ).toBe(other);
  });
});

const plain = fc.string({
  unit: fc.constantFrom("a", "7", " ", '"', "\n", "\r", ",", ";", "é"),
  maxLength: 5,
});
const quoted = (text: string) => `"${text.replaceAll('"', '""')}"`;
const table = fc.array(fc.array(plain, { minLength: 3, maxLength: 3 }), { minLength: 2, maxLength: 6 });
const ends = fc.constantFrom("\n", "\r\n", "\r");

describe("any table", () => {
  it("reads back with the one cell changed and every other as it was", () => {
    fc.assert(
      fc.property(table, ends, plain, fc.tuple(fc.nat(), fc.nat()), (rows, end, now, [r, c]) => {
        const text = rows.map((row) => row.map(quoted).join(",") + end).join("");
        const [row, column] = [(r % rows.length) + 1, c % 3];
        const patched = patchCsv(text, {
          rows: new Map([[row, { kind: "cells", cells: new Map([[column, now]]) }]]),
        });
        const expected = rows.map((cells, at) =>
          at === row - 1 ? cells.map((cell, place) => (place === column ? now : cell)) : cells,
        );
        const read = new Map(parseRecords(patched).records.map((record) => [record.row, record.cells]));
        for (const [at, cells] of expected.entries()) {
          if (cells.some((cell) => cell.trim() !== "")) expect(read.get(at + 1)).toEqual(cells);
        }
      }),
    );
  });

  it("keeps every byte when a cell is written as it stood", () => {
    const simple = fc.array(fc.array(fc.stringMatching(/^[a-z0-9.]{0,4}$/), { minLength: 2, maxLength: 4 }), {
      minLength: 1,
      maxLength: 5,
    });
    fc.assert(
      fc.property(simple, ends, fc.boolean(), fc.nat(), (rows, end, isEnded, r) => {
        const text = rows.map((row) => row.join(",")).join(end) + (isEnded ? end : "");
        const row = r % rows.length;
        const cells = new Map([[0, rows[row]?.[0] ?? ""]]);
        expect(patchCsv(text, { rows: new Map([[row + 1, { kind: "cells", cells }]]) })).toBe(text);
      }),
    );
  });
});
