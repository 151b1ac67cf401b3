import type { ProblemList } from "../../study/problem-list.ts";
import { MOST_COLUMNS } from "../limits.ts";
import { storeFiles } from "./pack-study.ts";
import { csvOf } from "./quoted-csv.ts";
import { shownNumber } from "./workbook-decimals.ts";
import { columnLetters, scanWorkbook } from "./workbook-scan.ts";

/** Most rows of a sheet (the format's own limit). */
const MOST_ROWS = 1_048_576;

export interface WorkbookSource {
  /** The workbook's path among the files. */
  readonly path: string;
  /** Its unpacked parts. */
  readonly parts: ReadonlyMap<string, Uint8Array>;
  readonly problems: ProblemList;
}

export const isWorkbook = (parts: ReadonlyMap<string, Uint8Array>): boolean => parts.has("xl/workbook.xml");

/** The name of a sheet among the files of a study: the sheet's own in brackets behind the workbook's. */
const sheetFile = (workbook: string, sheet: string): string =>
  `${workbook} [${sheet.replace(/[[\]/\\]/g, " ")}]`;

/**
 * Every sheet of a workbook that holds something, as comma-separated text by file name: numbers with the decimals that
 * their format shows, else in the shortest text of their double, dates as 2024-05-31, formulas by the value last worked out; a cell without a value is told.
 */
export async function readWorkbook(source: WorkbookSource): Promise<ReadonlyMap<string, Uint8Array>> {
  const { path, parts, problems } = source;
  const { rows, columns, faulty, decimals } = scanWorkbook(parts);
  const tables = new Map<string, Uint8Array>();
  if (columns > MOST_COLUMNS) {
    problems.add("too-many-columns", {
      file: path,
      found: `${columns} columns`,
      detail: String(MOST_COLUMNS),
    });
    return tables;
  }
  if (rows > MOST_ROWS) {
    problems.add("workbook-unreadable", { file: path, found: `a row numbered ${rows}` });
    return tables;
  }
  for (const { sheet, row, column, found } of faulty)
    problems.addOnce(`${sheet} ${column} ${found}`, "cell-without-value", {
      file: sheetFile(path, sheet),
      row,
      column,
      found,
    });
  for (const { sheet, data } of await sheetsOf(source)) {
    const width = data.reduce((most, cells) => Math.max(most, cells.length), 0);
    const shown = decimals.get(sheet) ?? new Map<string, number>();
    if (width > 0)
      tables.set(
        sheetFile(path, sheet),
        csvOf(data.map((cells, row) => texts(cells, { width, row, shown }))),
      );
  }
  return tables;
}

async function sheetsOf({ path, parts, problems }: WorkbookSource) {
  const { default: readExcel } = await import("read-excel-file/universal");
  // Packed anew without compression, so that what is read is what was measured, and read without threads of its own.
  const packed = storeFiles(parts);
  try {
    return await readExcel(packed.buffer, { trim: false });
  } catch (error) {
    const found = error instanceof Error ? error.message : String(error);
    problems.add("workbook-unreadable", { file: path, found });
    return [];
  }
}

interface RowOfSheet {
  readonly width: number;
  /** Counted from 0. */
  readonly row: number;
  /** Decimals that cells are shown with. */
  readonly shown: ReadonlyMap<string, number>;
}

function texts(cells: readonly unknown[], { width, row, shown }: RowOfSheet): readonly string[] {
  return Array.from({ length: width }, (_, at) => {
    const cell = cells[at];
    if (shown.size === 0 || typeof cell !== "number") return cellText(cell);
    return shownNumber(cell, shown.get(`${columnLetters(at)}${row + 1}`));
  });
}

function cellText(cell: unknown): string {
  if (cell === null || cell === undefined) return "";
  if (typeof cell === "string") return cell;
  if (typeof cell === "number" || typeof cell === "boolean") return String(cell);
  const [, iso = ""] = /^"(.*)"$/.exec(JSON.stringify(cell) ?? "") ?? []; // a date; null where it is none
  return dateText(iso);
}

const dateText = (iso: string): string => iso.replace(/T00:00:00\.000Z$/, "").replace(/\.000Z$/, "");
