import type { RecognisedColumn } from "../study/columns.ts";
import type { Section, Sheet } from "../study/model.ts";
import type { Recognition } from "../study/recognised.ts";
import type { SheetRows } from "../study/sheet-rows.ts";
import type { TableDeclaration } from "../study/tables/declare.ts";

const MOST_VALUES = 5;

/** Up to five values of a column that differ, as written. */
export function sampleValues(rows: SheetRows, column: number): readonly string[] {
  const values = new Set<string>();
  for (const cell of rows.columns?.[column]?.values ?? cellsIn(rows, column)) {
    const value = cell.trim();
    if (value !== "") values.add(value);
    if (values.size === MOST_VALUES) break;
  }
  return [...values];
}

function* cellsIn(rows: SheetRows, column: number): Generator<string> {
  for (const cells of rows) yield cells[column] ?? "";
}

/** What the columns of a table were taken to be, with some of their values. */
export const recognitions = (
  columns: readonly RecognisedColumn[],
  rows: SheetRows,
  table: TableDeclaration,
): readonly Recognition[] =>
  columns.map((column, at) => ({ ...recognition(column, table), values: sampleValues(rows, at) }));

/** What one column was taken to be; whether it asks is known once the sections are. */
export function recognition(
  { header, column, by, language, unit, axis, bracket, isUnitChosen = false }: RecognisedColumn,
  table: TableDeclaration,
): Omit<Recognition, "values"> {
  const given = unit ?? bracket ?? fixedUnit(column, table);
  return {
    header,
    is:
      column ??
      (table.furtherColumns === true && header.trim() !== "" && by !== "chosen" ? "trait" : "unused"),
    ...(by === undefined ? {} : { by }),
    ...(language === undefined ? {} : { language }),
    ...(axis === undefined ? {} : { axis }),
    ...(given === undefined ? {} : { unit: given, unitBy: isUnitChosen ? "chosen" : "header" }),
  };
}

function fixedUnit(column: string | undefined, table: TableDeclaration): string | undefined {
  const isDeclared = column !== undefined && Object.hasOwn(table.columns, column);
  const unit = isDeclared ? table.columns[column].unit : undefined;
  return unit === "section" ? undefined : unit;
}

/** The sheet with the unit of each position and length as its sections have it, or the question for it. */
export function withSectionUnits(
  sheet: Sheet,
  table: TableDeclaration,
  sections: ReadonlyMap<string, Pick<Section, "unit" | "axis">>,
): Sheet {
  const names = sectionsOf(sheet);
  const known = names.flatMap((name) => sections.get(name) ?? []);
  const units = [...new Set(known.map(({ unit }) => unit))];
  const recognised = sheet.recognised.map((one): Recognition => {
    const column = table.columns[one.is];
    if (one.is === "value" || one.is === "effort" || one.is === "amount") return withOwnUnit(one, sheet);
    if (column?.unit !== "section") return one;
    const { measures } = column;
    if (known.length === names.length)
      return one.unit === undefined && units.length > 0
        ? { ...one, unit: units.join(", "), unitBy: "section" }
        : one;
    const lacksAxis = measures === "position" && one.axis === undefined;
    const lacksUnit = one.unit === undefined;
    if (lacksAxis) return { ...one, asks: lacksUnit ? "axis-and-unit" : "axis" };
    return lacksUnit ? { ...one, asks: "unit" } : one;
  });
  return { ...sheet, recognised };
}

/** Values, efforts and amounts have their unit in a column beside them, or in their header. */
function withOwnUnit(one: Recognition, { columns }: Sheet): Recognition {
  const beside = one.is === "value" ? "unit" : `${one.is}_unit`;
  return one.unit === undefined && !columns.includes(beside) ? { ...one, asks: "unit" } : one;
}

function sectionsOf({ columns, rows, section }: Sheet): readonly string[] {
  if (section !== undefined) return [section.name];
  const at = columns.indexOf("section");
  if (at === -1) return [];
  const names = rows.columns?.[at]?.values ?? [...cellsIn(rows, at)];
  return [...new Set(names.map((name) => name.trim().normalize("NFC")))].filter((name) => name !== "");
}
