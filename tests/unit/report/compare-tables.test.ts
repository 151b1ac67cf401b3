import { describe, expect, it } from "vitest";
import { readWrittenCsv } from "../../../src/core/tables/csv.ts";
import { compareTables } from "../../../src/report/compare-tables.ts";

const compare = (before: Record<string, string>, after: Record<string, string>) =>
  compareTables(new Map(Object.entries(before)), new Map(Object.entries(after)), readWrittenCsv);

describe("comparing two runs", () => {
  it("finds nothing where nothing differs", () => {
    expect(compare({ a: "x,y\n1,2\n" }, { a: "x,y\n1,2\n" })).toEqual([]);
  });

  it("names table, row, column and both values, to the last digit", () => {
    expect(compare({ a: "x,y\n1,0.1\n3,4\n" }, { a: "x,y\n1,0.10000000000000002\n3,4\n" })).toEqual([
      { table: "a", row: 2, column: "y", was: "0.1", now: "0.10000000000000002" },
    ]);
  });

  it("tells rows, columns and tables that come or go", () => {
    expect(compare({ a: "x\n1\n" }, { a: "x\n1\n2\n" })).toEqual([
      { table: "a", row: 3, was: "no such row", now: "2" },
    ]);
    expect(compare({ a: "x\n1\n" }, { a: "y\n1\n" })).toMatchObject([{ table: "a", row: 1 }]);
    expect(compare({ a: "x\n" }, {})).toMatchObject([{ table: "a", now: "no such table" }]);
  });
});
