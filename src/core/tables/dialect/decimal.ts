import { type Coded, countValues } from "../../study/coded.ts";
import type { RecognisedColumn } from "../../study/columns.ts";
import type { Decimal, Delimiter } from "../../study/model.ts";
import { columnsOf, type SheetRows } from "../../study/sheet-rows.ts";
import type { TableDeclaration } from "../../study/tables/declare.ts";

export type DecimalSign =
  | { readonly kind: "decided"; readonly decimal: Decimal }
  /** Both readings are possible: the cell that could be either. */
  | { readonly kind: "ambiguous"; readonly found: string };

const plain = /^-?\d+[.,]\d+$/;
const comma = /^[+-]?\d*,\d+(?:[eE][+-]?\d+)?$/;
const point = /^[+-]?(?:\d*\.\d+|\d+\.)(?:[eE][+-]?\d+)?$/;
/** A number that could be grouped by thousands: 1,234 is 1.234 or 1234. */
const grouped = /^[+-]?[1-9]\d{0,2}[.,]\d{3}$/;

/**
 * Decides the decimal sign of a file from all cells of its number columns together. Points are the rule; commas need a
 * number that can be nothing else; where only numbers like 1,234 stand (or 1.234 between semicolons), both are possible.
 */
export function decimalSign(
  rows: SheetRows,
  columns: readonly RecognisedColumn[],
  { table, delimiter }: { readonly table: TableDeclaration; readonly delimiter: Delimiter },
): DecimalSign {
  const sure = { comma: 0, point: 0 };
  const unsure = { comma: "", point: "" };
  for (const { text, times } of numberTexts(columnsOf(rows, columns.length), columns, table)) {
    const sign = comma.test(text) ? "comma" : point.test(text) ? "point" : undefined;
    if (sign === undefined) continue;
    if (grouped.test(text)) unsure[sign] ||= text;
    else sure[sign] += times;
  }
  if (sure.comma > sure.point) return { kind: "decided", decimal: "comma" };
  if (sure.point > 0) return { kind: "decided", decimal: "point" };
  const found = unsure.comma || (delimiter === ";" ? unsure.point : "");
  return found === "" ? { kind: "decided", decimal: "point" } : { kind: "ambiguous", found };
}

interface NumberText {
  readonly text: string;
  /** How often it stands in its column. */
  readonly times: number;
}

/** The numbers that stand in number columns; `<0,05` holds one, `0,02..0,05` two. */
function* numberTexts(
  cells: readonly Coded<string>[],
  columns: readonly RecognisedColumn[],
  table: TableDeclaration,
): Generator<NumberText> {
  for (const [index, { column }] of columns.entries()) {
    const type = column === undefined ? undefined : table.columns[column].type;
    if (type !== "number" && type !== "integer" && column !== "value") continue;
    const counts = countValues(cells[index]);
    for (const [code, cell] of cells[index].values.entries()) {
      const times = counts[code];
      if (times === 0 || (!cell.includes(".") && !cell.includes(","))) continue;
      if (plain.test(cell)) yield { text: cell, times };
      else
        for (const part of cell.replaceAll("\u2212", "-").split(".."))
          yield { text: part.trim().replace(/^(?:[<>]=?|≤|≥)\s*/, ""), times };
    }
  }
}
