import type { RecognisedColumn } from "../../study/columns.ts";
import type { Decimal, Delimiter } from "../../study/model.ts";
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
  rows: Iterable<readonly string[]>,
  columns: readonly RecognisedColumn[],
  { table, delimiter }: { readonly table: TableDeclaration; readonly delimiter: Delimiter },
): DecimalSign {
  const sure = { comma: 0, point: 0 };
  const unsure = { comma: "", point: "" };
  for (const cell of numberTexts(rows, columns, table)) {
    const sign = comma.test(cell) ? "comma" : point.test(cell) ? "point" : undefined;
    if (sign === undefined) continue;
    if (grouped.test(cell)) unsure[sign] ||= cell;
    else sure[sign] += 1;
  }
  if (sure.comma > sure.point) return { kind: "decided", decimal: "comma" };
  if (sure.point > 0) return { kind: "decided", decimal: "point" };
  const found = unsure.comma || (delimiter === ";" ? unsure.point : "");
  return found === "" ? { kind: "decided", decimal: "point" } : { kind: "ambiguous", found };
}

/** The numbers that stand in number columns; `<0,05` holds one, `0,02..0,05` two. */
function* numberTexts(
  rows: Iterable<readonly string[]>,
  columns: readonly RecognisedColumn[],
  table: TableDeclaration,
): Generator<string> {
  const indices = columns.flatMap(({ column }, index) => {
    const type = column === undefined ? undefined : table.columns[column].type;
    return type === "number" || type === "integer" || column === "value" ? [index] : [];
  });
  for (const cells of rows) {
    for (const index of indices) {
      const cell = cells[index] ?? "";
      if (!cell.includes(".") && !cell.includes(",")) continue;
      if (plain.test(cell)) {
        yield cell;
        continue;
      }
      for (const part of cell.replaceAll("\u2212", "-").split("..")) {
        yield part.trim().replace(/^(?:[<>]=?|≤|≥)\s*/, "");
      }
    }
  }
}
