import { type RecognisedColumn, recogniseColumns } from "../study/columns.ts";
import type { ColumnChoice, TableDeclaration } from "../study/tables/declare.ts";
import type { CsvRecord } from "./csv.ts";
import type { FoundHeader } from "./dialect/header.ts";
import { isTaxonName } from "./wide/taxon-name.ts";
import { isOneWay } from "./wide/wide-layout.ts";

/** Names that other tables of the study list. */
export interface ListedNames {
  readonly section: ReadonlySet<string>;
  readonly sample: ReadonlySet<string>;
}

/** The share of values that must fit before a column is taken for something by them. */
const ENOUGH = 0.8;

type Fits = (cells: readonly string[]) => boolean;

const mostly = (is: (cell: string) => boolean): Fits => {
  return (cells) => new Set(cells).size >= 2 && cells.filter(is).length >= ENOUGH * cells.length;
};

/**
 * Choices for columns without a known header, by their content: names of taxa, of listed samples and sections, and
 * numbers in one direction where nothing else says where a row lies. Each has to be told to the person.
 */
export function choicesByContent(
  header: FoundHeader,
  records: readonly CsvRecord[],
  { table, listed }: { readonly table: TableDeclaration; readonly listed: ListedNames },
): ReadonlyMap<string, ColumnChoice> {
  const columns = recogniseColumns(header.headers, table);
  const has = (name: string) => columns.some(({ column }) => column === name);
  const rows = records.slice(header.below);
  const isPlaced = ["sample", "position", "base", "first"].some(has);
  const wanted: readonly (readonly [string, Fits])[] = [
    ["taxon", mostly(isTaxonName)],
    ["sample", mostly((cell) => listed.sample.has(cell))],
    ["section", mostly((cell) => listed.section.has(cell))],
    ["position", (cells) => !isPlaced && cells.length >= 3 && isOneWay(cells)],
  ];
  const choices = new Map<string, ColumnChoice>();
  for (const [is, fits] of wanted) {
    if (table.columns[is] === undefined || has(is)) continue;
    if (is === "position" && [...choices.values()].some((choice) => choice.is === "sample")) continue;
    const found = columns.find((column, at) => isOpen(column, choices) && fits(valuesOf(rows, at)));
    if (found !== undefined) choices.set(found.header.trim(), { is, by: "content" });
  }
  return choices;
}

const isOpen = (
  { header, column, by }: RecognisedColumn,
  choices: ReadonlyMap<string, ColumnChoice>,
): boolean => column === undefined && by === undefined && header.trim() !== "" && !choices.has(header.trim());

const valuesOf = (rows: readonly CsvRecord[], at: number): readonly string[] =>
  rows.map(({ cells }) => (cells[at] ?? "").trim()).filter((cell) => cell !== "");
