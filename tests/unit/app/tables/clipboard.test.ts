import * as fc from "fast-check";
import { describe, expect, it } from "vitest";
import { blockCells, blockText } from "../../../../src/app/tables/clipboard.ts";

describe("blocks of cells", () => {
  it("come back from the clipboard as they were copied", () => {
    const cell = fc.string({
      unit: fc.constantFrom("a", "4", " ", '"', "\t", "\n", "\r", ",", "é"),
      maxLength: 5,
    });
    const block = fc
      .integer({ min: 1, max: 4 })
      .chain((width) =>
        fc.array(fc.array(cell, { minLength: width, maxLength: width }), { minLength: 1, maxLength: 5 }),
      );
    fc.assert(
      fc.property(block, (cells) => {
        expect(blockCells(`${blockText(cells)}\n`)).toEqual(cells);
      }),
    );
  });

  it("are taken as spreadsheets write them", () => {
    expect(blockCells("a\tb\r\n1\t\r\n")).toEqual([
      ["a", "b"],
      ["1", ""],
    ]);
    expect(blockCells('a\t"two\nlines"\nb')).toEqual([
      ["a", "two\nlines"],
      ["b", ""],
    ]);
    expect(blockCells('a "quoted" word')).toEqual([['a "quoted" word']]);
    expect(blockCells('5" core\t"open')).toEqual([['5" core', '"open']]);
    expect(blockCells("")).toEqual([[""]]);
  });
});
