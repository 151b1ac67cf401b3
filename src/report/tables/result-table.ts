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

/** Makes a column of one type; `of` picks its cell from a row. */
type Maker<Row, Value> = (name: string, help: string, of: (row: Row) => Value) => ColumnOf<Row>;

interface Makers<Row> {
  readonly text: Maker<Row, string | undefined>;
  readonly number: Maker<Row, number | undefined>;
  readonly integer: Maker<Row, number | undefined>;
  readonly yesNo: Maker<Row, boolean>;
}

const makers = <Row>(): Makers<Row> => ({
  text: (name, help, cell) => ({ name, type: "text", help, cell }),
  number: (name, help, cell) => ({ name, type: "number", help, cell }),
  integer: (name, help, cell) => ({ name, type: "integer", help, cell }),
  yesNo: (name, help, of) => ({ name, type: "yes-no", help, cell: (row) => (of(row) ? "yes" : "no") }),
});

export function declare<Row>(declaration: {
  readonly name: string;
  readonly title: string;
  readonly rows: (analysis: Analysis) => readonly Row[];
  readonly columns: (make: Makers<Row>) => readonly ColumnOf<Row>[];
}): ResultDeclaration {
  const { name, title, rows } = declaration;
  const made = declaration.columns(makers());
  const columns = made.map(({ cell: _cell, ...column }) => column);
  const fill = (analysis: Analysis) => ({
    name,
    title,
    columns,
    rows: rows(analysis).map((row) => made.map((column) => column.cell(row))),
  });
  return { name, title, columns, fill };
}
