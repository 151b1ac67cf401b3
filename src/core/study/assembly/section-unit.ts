import type { LengthUnit } from "../model.ts";
import { lengthUnit } from "../units.ts";
import type { Assembly, ReadSheet } from "./context.ts";

interface UnitSearch {
  /** The row, the declared column and the sheet of the cell whose unit is sought. */
  readonly cells: readonly string[];
  readonly name: string;
  readonly read: ReadSheet;
  readonly assembly: Assembly;
}

/** The unit of a position or length in a row: of its header, its section's row, else the one unit that headers or settings name. */
export function sectionUnit({ cells, name, read, assembly }: UnitSearch): LengthUnit | undefined {
  const own = read.hints.get(name)?.unit;
  if (own !== undefined) return own;
  const section = cellOf(cells, "section", read);
  const listed = assembly.sheets.get("sections");
  const row = listed && [...listed.sheet.rows].find((row) => cellOf(row, "section", listed) === section);
  const stated = listed && row ? lengthUnit(cellOf(row, "unit", listed)) : undefined;
  if (stated !== undefined) return stated;
  const hints = [...assembly.sheets.values()].flatMap((sheet) => [...sheet.hints.values()]);
  const units = new Set(hints.flatMap(({ unit }) => unit ?? []));
  return units.size === 1 ? [...units][0] : assembly.settings.sections.unit;
}

const cellOf = (cells: readonly string[], column: string, { sheet }: ReadSheet): string =>
  (cells[sheet.columns.indexOf(column)] ?? "").trim().normalize("NFC");
