import * as fc from "fast-check";
import { unzipSync } from "fflate";
import { describe, expect, it } from "vitest";
import { parseRecords } from "../../../../src/core/tables/csv.ts";
import { packWorkbook, type WorkbookTable } from "../../../../src/core/tables/sources/pack-workbook.ts";
import { unpackSources } from "../../../../src/core/tables/sources/unpack-sources.ts";

const HEADERS = ["section", "taxon", "position", "count", "remarks"];
const table = (decimal: "point" | "comma" = "point"): WorkbookTable => ({
  file: "occurrences.csv",
  table: "occurrences",
  headers: HEADERS,
  columns: ["section", "taxon", "position", "count", undefined],
  dialect: { encoding: "UTF-8", delimiter: ",", decimal, missing: [], headerRows: [1], notes: [] },
});
const quoted = (rows: readonly (readonly string[])[]) =>
  rows.map((row) => `${row.map((cell) => `"${cell.replaceAll('"', '""')}"`).join(",")}\n`).join("");
const bytes = (text: string) => new TextEncoder().encode(text);

/** What a workbook of these rows reads as: cells by row number. */
async function throughWorkbook(rows: readonly (readonly string[])[], decimal?: "point" | "comma") {
  const packed = packWorkbook(new Map([["occurrences.csv", bytes(quoted([HEADERS, ...rows]))]]), [
    table(decimal),
  ]);
  const { files, problems } = await unpackSources(new Map([["study.xlsx", packed]]));
  expect(problems).toEqual([]);
  expect([...files.keys()]).toEqual(["study.xlsx [occurrences]"]);
  const text = new TextDecoder().decode(files.get("study.xlsx [occurrences]"));
  return parseRecords(text).records.map(({ cells, row }) => ({ row, cells }));
}

const AWKWARD = [
  "=1+1",
  "+1",
  "-x",
  "@home",
  "'",
  "''=x",
  "\t",
  "007",
  "1.50",
  "-0",
  "1e5",
  "0.1",
  "12345678901234567890",
  "0.1234567890123456789",
  "2024-05-31",
  "31.05.2024",
  "1/2",
  "TRUE",
  "yes",
  "#N/A",
  " two ",
  "a\nb",
  "a\r\nb",
  "\u0001",
  "_x0041_",
  "_x005F_",
  "δ¹³C",
  "😀",
  '<&>"',
  "",
  "1,5",
  "5 %",
  "1E",
  ".5",
  "00",
  "1_000",
];
const cell = fc.oneof(
  fc.constantFrom(...AWKWARD),
  fc.string({ maxLength: 6, unit: "binary" }).filter((text) => !text.includes("\0")),
  fc.double().map(String),
);
const filled = fc
  .array(fc.tuple(cell, cell, cell, cell, cell), { minLength: 1, maxLength: 6 })
  .map((rows) => rows.map((row) => ["Orsk", ...row.slice(1)]));

describe("a table in a workbook", () => {
  it("reads back as it was, cell by cell", async () => {
    await fc.assert(
      fc.asyncProperty(filled, async (rows) => {
        expect(await throughWorkbook(rows)).toEqual(
          [HEADERS, ...rows].map((cells, at) => ({ row: at + 1, cells })),
        );
      }),
      { numRuns: 200 },
    );
  });

  it("keeps blank rows where they are", async () => {
    const read = await throughWorkbook([
      ["Orsk", "a", "1", "", ""],
      ["", "", "", "", ""],
      ["Orsk", "b", "2", "", ""],
    ]);
    expect(read.map(({ row }) => row)).toEqual([1, 2, 4]);
  });

  it("holds numbers of number columns as numbers, and texts of other columns as texts, in the same bytes each time", () => {
    const files = new Map([["occurrences.csv", bytes(quoted([HEADERS, ["12", "3", "1.50", "7", "=1+1"]]))]]);
    const packed = packWorkbook(files, [table()]);
    const sheet = new TextDecoder().decode(unzipSync(packed)["xl/worksheets/sheet1.xml"]);
    expect(sheet).toContain('<c r="C2" s="4"><v>1.5</v></c>');
    expect(sheet).toContain('<c r="D2" s="2"><v>7</v></c>');
    expect(sheet).toContain('<c r="A2" s="1" t="inlineStr"><is><t xml:space="preserve">12</t></is></c>');
    expect(sheet).toContain('<t xml:space="preserve">=1+1</t>');
    expect(packWorkbook(files, [table()])).toEqual(packed);
  });

  it("writes decimal commas as what they mean", async () => {
    const [, row] = await throughWorkbook([["Orsk", "1,5", "1,50", "7", "2,5"]], "comma");
    expect(row?.cells).toEqual(["Orsk", "1,5", "1.50", "7", "2,5"]);
  });
});
