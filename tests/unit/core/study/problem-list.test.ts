import { describe, expect, it } from "vitest";
import { problemList } from "../../../../src/core/study/problem-list.ts";

const place = (row: number, file = "a.csv") => ({ file, row, column: "count", found: `x${row}` });

describe("a list of problems", () => {
  it("counts what goes on beyond the most of one kind in one file, and loses nothing of another", () => {
    const list = problemList(3);
    for (let row = 2; row < 8; row++) list.add("not-a-number", place(row));
    list.add("not-a-number", place(2, "b.csv"));
    list.add("not-finite", place(9));
    expect(list.problems().map(({ file, code, found }) => [file, code, found])).toEqual([
      ["a.csv", "not-a-number", "x2"],
      ["a.csv", "not-a-number", "x3"],
      ["a.csv", "not-a-number", "x4 (and 3 more rows)"],
      ["b.csv", "not-a-number", "x2"],
      ["a.csv", "not-finite", "x9"],
    ]);
  });

  it("tells one subject once", () => {
    const list = problemList();
    for (let row = 2; row < 5; row++) list.addOnce("count", "count-zero", place(row));
    expect(list.problems().map(({ found }) => found)).toEqual(["x2 (and 2 more rows)"]);
  });
});
