import * as fc from "fast-check";
import { describe, expect, it } from "vitest";
import { parseRecords } from "../../../../src/core/tables/csv.ts";
import { type ScannedCells, scanCells } from "../../../../src/core/tables/scan-cells.ts";

const WIDTH = 3;

const MOST_CELLS = 1e7;

function scan(text: string, skip: number): ScannedCells {
  const scanned = scanCells(new TextEncoder().encode(text), {
    delimiter: ",",
    quote: '"',
    width: WIDTH,
    skip,
    mostCells: MOST_CELLS,
    decode: (bytes) => new TextDecoder("utf-8", { fatal: true, ignoreBOM: true }).decode(bytes),
  });
  if (scanned === undefined) throw new Error("too many cells");
  return scanned;
}

const rowsIn = ({ columns, rows }: ScannedCells) =>
  Array.from(rows, (row, at) => ({ row, cells: columns.map(({ values, codes }) => values[codes[at]]) }));

const oddQuotes = ({ rows, uneven }: ScannedCells) =>
  [...uneven].flatMap(({ index, quotes }) =>
    quotes === undefined ? [] : [{ code: `${quotes}-quote`, row: rows[index] }],
  );

/** What the record-by-record reader makes of the same text, in as many columns. */
const expected = (text: string, skip: number) =>
  parseRecords(text)
    .records.slice(skip)
    .map(({ row, cells }) => ({ row, cells: Array.from({ length: WIDTH }, (_, at) => cells[at] ?? "") }));

const text = fc
  .array(
    fc.constantFrom(
      "a",
      "b",
      " ",
      ",",
      ",",
      "\n",
      "\n",
      "\r",
      "\r\n",
      '"',
      '""',
      '","',
      '\n"',
      "é",
      "€",
      "\u00a0",
      "𝄞",
    ),
    {
      maxLength: 24,
    },
  )
  .map((signs) => signs.join(""));

describe("cells scanned from bytes", () => {
  it("are those that a reader of records finds, wherever quotes stand", () => {
    let well = 0;
    fc.assert(
      fc.property(text, fc.nat({ max: 2 }), (text, skip) => {
        const read = scan(text, skip);
        const { faults, records } = parseRecords(text);
        if (faults.length === 0) well += 1;
        expect(rowsIn(read)).toEqual(expected(text, skip));
        const kept = new Set(records.slice(skip).map(({ row }) => row));
        expect(oddQuotes(read)).toEqual(faults.filter(({ row }) => kept.has(row)));
      }),
      { seed: 3, numRuns: 20_000 },
    );
    expect(well).toBeGreaterThan(5000);
    expect(well).toBeLessThan(15_000);
  });

  it("keep the rows of another width apart", () => {
    fc.assert(
      fc.property(text, (text) => {
        const read = scan(text, 0);
        const uneven = parseRecords(text).records.flatMap(({ cells }, index) => {
          const isOverfull = cells.slice(WIDTH).some((cell) => cell.trim() !== "");
          return cells.length < WIDTH || isOverfull ? [{ index, cells: cells.length, isOverfull }] : [];
        });
        const ofWidth = [...read.uneven].filter(({ cells, isOverfull }) => cells < WIDTH || isOverfull);
        expect(ofWidth.map(({ index, cells, isOverfull }) => ({ index, cells, isOverfull }))).toEqual(uneven);
      }),
      { seed: 4, numRuns: 10_000 },
    );
  });

  it("hold each distinct content once, however many there are", () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 70_000 }), fc.integer({ min: 0, max: 400 }), (names, again) => {
        const cells = Array.from({ length: names + again }, (_, at) => `n${at % names}`);
        const read = scan(cells.map((cell) => `${cell},"${cell}",x\n`).join(""), 0);
        expect(read.columns.map(({ values }) => values.length)).toEqual([names, names, 1]);
        expect(rowsIn(read).map(({ cells: [first] }) => first)).toEqual(cells);
      }),
      {
        seed: 5,
        numRuns: 12,
        examples: [
          [256, 9],
          [257, 0],
          [65_537, 3],
        ],
      },
    );
  });
});
