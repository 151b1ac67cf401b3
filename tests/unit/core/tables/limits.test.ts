import { describe, expect, it } from "vitest";
import { problemLines } from "../../../../src/cli/problem-lines.ts";
import { problemList } from "../../../../src/core/study/problem-list.ts";
import { occurrences } from "../../../../src/core/study/tables/occurrences.ts";
import type { PartLimits } from "../../../../src/core/tables/part-table.ts";
import { readSheet } from "../../../../src/core/tables/read-sheet.ts";
import { readStudy } from "../../../../src/core/tables/read-study.ts";

const HEADER = "section,taxon,height (m)";

function readLimited(text: string, limits: Partial<PartLimits>) {
  const problems = problemList();
  const read = readSheet({
    file: "occurrences.csv",
    bytes: new TextEncoder().encode(text),
    table: occurrences,
    guarded: new Set(),
    declared: {},
    problems,
    limits,
  });
  return { read, problems: problems.problems() };
}

const rows = (count: number) => "Tarn Cut,Velorites alta,1\n".repeat(count);

describe("limits of what is read", () => {
  it("refuse more cells than rows times columns may be, and read as many", () => {
    expect(readLimited(`${HEADER}\n${rows(4)}`, { mostCells: 12 }).read?.sheet.rows).toHaveLength(4);
    const { read, problems } = readLimited(`${HEADER}\n${rows(5)}`, { mostCells: 12 });
    expect(read).toBeUndefined();
    expect(problems).toMatchObject([
      { code: "table-too-large", expected: expect.stringContaining("12 cells") },
    ]);
  });

  it("count the cells that short lines lack", () => {
    const text = `${HEADER}${",".repeat(60)}\n${"a\n".repeat(2000)}`;
    expect(readLimited(text, { mostCells: 64_000 }).problems).toMatchObject([{ code: "table-too-large" }]);
  });

  it("refuse a table that has to be read as a whole and holds more cells", () => {
    const notes = `${"a note that says much about nothing ".repeat(250)}\n`.repeat(30);
    const text = `${notes}${HEADER}\n${rows(5)}`;
    expect(readLimited(text, { mostAtOnce: 20 }).problems).toMatchObject([{ code: "table-too-large" }]);
  });

  it("refuse a header of ten thousand columns", () => {
    const wide = `${HEADER},${Array.from({ length: 10_000 }, (_, at) => `t${at}`).join(",")}\n${rows(1)}`;
    const study = readStudy(new Map([["occurrences.csv", new TextEncoder().encode(wide)]]));
    expect(study.problems).toMatchObject([{ code: "too-many-columns" }, { code: "no-data" }]);
  });
});

describe("very many faulty rows", () => {
  const MANY = 150_000;

  it.each([
    ["numbers that are none", (at: number) => `Tarn Cut,Velorites alta,n${at}`, "not-a-number"],
    ["cells beyond the header", (at: number) => `Tarn Cut,Velorites alta,${at},x`, "too-many-cells"],
    ["odd quotes", (at: number) => `Tarn Cut,"Velorites"${at},1`, "malformed-quote"],
  ])("end in a list that ends: %s", (_, row, code) => {
    const text = `${HEADER}\n${Array.from({ length: MANY }, (_, at) => row(at)).join("\n")}\n`;
    const study = readStudy(new Map([["occurrences.csv", new TextEncoder().encode(text)]]));
    const told = study.problems.filter((problem) => problem.code === code);
    expect(told).toHaveLength(10_000);
    expect(told.at(-1)?.found).toContain(`(and ${MANY - 10_000} more rows)`);
  });

  it("of many subjects end too", () => {
    const list = problemList(3);
    for (let at = 0; at < 8; at++)
      list.addOnce(`subject ${at}`, "unknown-sample", { file: "f.csv", row: at, found: `s${at}` });
    expect(list.problems().map(({ found }) => found)).toEqual(["s0", "s1", "s2 (and 5 more rows)"]);
  });

  it("are printed, however many they are", () => {
    const list = problemList(1e6);
    for (let row = 0; row < 200_000; row++) list.add("not-a-number", { file: "f.csv", row, found: "x" });
    expect(problemLines(list.problems()).split("\n")).toHaveLength(400_001);
  });
});
