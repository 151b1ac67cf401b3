import type { Analysis } from "../../core/analysis-result.ts";

export type Cell = string | number | undefined;

export interface ResultColumn {
  readonly name: string;
  readonly type: "text" | "number" | "integer" | "yes-no";
  readonly help: string;
}

/** A result table as it is written: stable names, blank where a number does not exist. */
export interface ResultTable {
  readonly name: string;
  readonly title: string;
  readonly columns: readonly ResultColumn[];
  readonly rows: readonly (readonly Cell[])[];
}

/** The one declaration of a result table: its columns, and how they follow from an analysis. */
export interface ResultDeclaration {
  readonly name: string;
  readonly title: string;
  readonly columns: readonly ResultColumn[];
  readonly fill: (analysis: Analysis) => ResultTable;
}

type ColumnOf<Row> = ResultColumn & { readonly cell: (row: Row) => Cell };

export function declare<Row>(declaration: {
  readonly name: string;
  readonly title: string;
  readonly rows: (analysis: Analysis) => readonly Row[];
  readonly columns: readonly ColumnOf<Row>[];
}): ResultDeclaration {
  const { name, title, rows } = declaration;
  const columns = declaration.columns.map(({ name, type, help }) => ({ name, type, help }));
  const fill = (analysis: Analysis) => ({
    name,
    title,
    columns,
    rows: rows(analysis).map((row) => declaration.columns.map((column) => column.cell(row))),
  });
  return { name, title, columns, fill };
}

/** Column makers; `of` picks the cell from a row. */
export const text = <Row>(
  name: string,
  help: string,
  of: (row: Row) => string | undefined,
): ColumnOf<Row> => ({
  name,
  type: "text",
  help,
  cell: of,
});

export const number = <Row>(
  name: string,
  help: string,
  of: (row: Row) => number | undefined,
): ColumnOf<Row> => ({
  name,
  type: "number",
  help,
  cell: of,
});

export const integer = <Row>(
  name: string,
  help: string,
  of: (row: Row) => number | undefined,
): ColumnOf<Row> => ({
  name,
  type: "integer",
  help,
  cell: of,
});

export const yesNo = <Row>(name: string, help: string, of: (row: Row) => boolean): ColumnOf<Row> => ({
  name,
  type: "yes-no",
  help,
  cell: (row) => (of(row) ? "yes" : "no"),
});
