import { decimalStyles } from "./workbook-decimals.ts";
import { xmlTags } from "./xml-tags.ts";

/** A cell of a workbook whose value is not there, in the spreadsheet's own coordinates. */
export interface FaultyCell {
  readonly sheet: string;
  readonly row: number;
  readonly column: string;
  /** `#N/A` and the like, or the formula that was not worked out. */
  readonly found: string;
}

/** What a workbook's sheets hold, seen before they are read: their reach, and cells without a value. */
export interface WorkbookScan {
  readonly rows: number;
  readonly columns: number;
  readonly faulty: readonly FaultyCell[];
  /** Decimals that number cells are shown with, by sheet and by cell ("B7"); absent where no format fixes them. */
  readonly decimals: ReadonlyMap<string, ReadonlyMap<string, number>>;
}

const decoder = (bytes: Uint8Array): string => new TextDecoder("utf-8").decode(bytes);

/** The letters of a column, counted from 0. */
export const columnLetters = (column: number): string =>
  (column >= 26 ? columnLetters(Math.floor(column / 26) - 1) : "") + String.fromCharCode(65 + (column % 26));

const columnNumber = (letters: string): number =>
  Array.from(letters).reduce((number, letter) => number * 26 + letter.charCodeAt(0) - 64, 0);

/** Looks over the sheets of an unpacked workbook (ECMA-376 part 1, 18.3.1). */
export function scanWorkbook(files: ReadonlyMap<string, Uint8Array>): WorkbookScan {
  const names = sheetNames(files);
  let rows = 0;
  let columns = 0;
  const faulty: FaultyCell[] = [];
  const styles = decimalStyles(decoder(files.get("xl/styles.xml") ?? new Uint8Array()));
  const decimals = new Map<string, Map<string, number>>();
  for (const [path, bytes] of files) {
    const sheet = names.get(path);
    if (sheet === undefined) continue;
    const own = new Map<string, number>();
    decimals.set(sheet, own);
    let cell = { isError: false, hasFormula: false, at: "", found: "" };
    for (const { name, kind, attributes, text } of xmlTags(decoder(bytes))) {
      const at = attributes.get("r") ?? "";
      if (name === "row" && kind !== "close") rows = Math.max(rows, Number(at) || 0);
      else if (name === "c" && kind !== "close") {
        cell = { isError: attributes.get("t") === "e", hasFormula: false, at, found: "" };
        const [, letters = "", digits = "0"] = /^([A-Z]{1,7})(\d{1,15})$/.exec(at) ?? [];
        const shown = styles.get(Number(attributes.get("s") ?? 0));
        if (shown !== undefined) own.set(at, shown);
        columns = Math.max(columns, columnNumber(letters));
        rows = Math.max(rows, Number(digits));
      } else if (name === "f" && kind !== "close") cell = { ...cell, hasFormula: true, found: `=${text}` };
      else if (name === "v" && kind !== "close") {
        if (cell.isError) cell = { ...cell, found: text };
        else cell = { ...cell, hasFormula: false };
      } else if (name === "c" && (cell.isError || cell.hasFormula)) {
        const [, column = "", row = "0"] = /^([A-Z]+)(\d+)$/.exec(cell.at) ?? [];
        faulty.push({ sheet, row: Number(row), column, found: cell.found });
      }
    }
  }
  return { rows, columns, faulty, decimals };
}

/** Names of the sheets by the path of their part. */
function sheetNames(files: ReadonlyMap<string, Uint8Array>): ReadonlyMap<string, string> {
  const parts = new Map<string, string>();
  for (const { name, attributes } of tagsOf(files, "xl/_rels/workbook.xml.rels")) {
    const target = attributes.get("Target");
    if (name === "Relationship" && target !== undefined)
      parts.set(attributes.get("Id") ?? "", target.startsWith("/") ? target.slice(1) : `xl/${target}`);
  }
  const names = new Map<string, string>();
  for (const { name, kind, attributes } of tagsOf(files, "xl/workbook.xml")) {
    const part = parts.get(attributes.get("id") ?? "");
    if (name === "sheet" && kind !== "close" && part !== undefined)
      names.set(part, attributes.get("name") ?? part);
  }
  return names;
}

const tagsOf = (files: ReadonlyMap<string, Uint8Array>, path: string) =>
  xmlTags(decoder(files.get(path) ?? new Uint8Array()));
