import type { ColumnDeclaration, TableDeclaration } from "./tables/declare.ts";
import { tables } from "./tables/index.ts";

/** What a person may write in a column, in a few words. */
function columnKind(column: ColumnDeclaration): string {
  const unit =
    column.unit === undefined ? "" : column.unit === "section" ? ", section's unit" : `, ${column.unit}`;
  switch (column.type) {
    case "enum":
      return (column.values ?? []).map((value) => `\`${value}\``).join(", ");
    case "boolean":
      return "`yes`, `no`";
    case "number":
    case "integer":
      return `${column.type === "integer" ? "whole number" : "number"}${limitsOf(column)}${unit}`;
    case "text":
      return "text";
    default:
      return column.type satisfies never;
  }
}

function limitsOf({ minimum, maximum }: ColumnDeclaration): string {
  if (minimum !== undefined && maximum !== undefined) return ` from ${minimum} to ${maximum}`;
  if (minimum !== undefined) return ` of at least ${minimum}`;
  return maximum === undefined ? "" : ` of at most ${maximum}`;
}

const cell = (text: string): string => text.replaceAll("|", "\\|");

function columnLine([name, column]: readonly [string, ColumnDeclaration]): string {
  const names = [
    ...(column.dwc === undefined ? [] : [`\`${column.dwc}\` (Darwin Core)`]),
    ...(column.synonyms ?? []),
  ];
  const shown = column.required ? `**${name}**` : name;
  return `| ${shown} | ${cell(columnKind(column))} | ${cell(column.help)} | ${cell(names.join(", "))} |`;
}

function tableGuide(table: TableDeclaration): string {
  const oneOf = table.oneOf?.map((set) => set.map((name) => `\`${name}\``).join(" and ")).join(", or ");
  return [
    `## ${table.title}: \`${table.name}.csv\``,
    "",
    table.help,
    ...(oneOf === undefined ? [] : ["", `Each row needs ${oneOf}.`]),
    "",
    "| column | content | meaning | also read as |",
    "|---|---|---|---|",
    ...Object.entries(table.columns).map(columnLine),
    "",
  ].join("\n");
}

/** The guide to every table of a study, in Markdown. */
export function tablesGuide(): string {
  return [
    "# The tables of a study",
    "",
    "A study is a folder of CSV files, that folder zipped, a workbook (.xlsx, a sheet for each table), a single table, a",
    "Frictionless data package or a Darwin Core archive. We write commas, UTF-8 and decimal points; semicolons, tabs,",
    "bars, decimal commas, UTF-16, Windows-1252, notes above the header and units in a row of their own are read, decided",
    "once for a file and told. `tables.<file>` in `settings.json` settles what a file leaves open: `decimal` (`point`,",
    "`comma`), `delimiter` (`comma`, `semicolon`, `tab`, `bar`), `encoding`, and `table` for a file of another name.",
    "",
    "Every table is optional but one of",
    "`occurrences.csv`, `published-ranges.csv` and `measurements.csv`. Columns in **bold** must be filled in every row.",
    "",
    "Positions are written on the section's own axis and in its unit. `base` is always stratigraphically below `top`: in",
    "a depth section it is the larger number. Axis and unit come from `sections.csv`, from a column header such as",
    "`height (m)`, `depth_ft` or `position_cm`, or from the settings `sections.axis` and `sections.unit`; nothing is assumed.",
    "",
    "Column names are read without regard to case, spaces, hyphens and underscores. An unknown column is kept and not used.",
    "Accents do not matter, and the usual headers in German, French, Spanish, Italian and Portuguese are read, a few in",
    'Russian and Chinese. `tables.<file>.columns` says what a column is: `{ "Teufe": { "is": "position", "unit": "ft" } }`',
    "(`is`: a column below, `taxon` or `unused`; `unit`; `axis`), and `tables.<file>.section` the section of a table without a",
    "column for it. On the command line: `--set 'tables[\"my.finds.csv\"].columns.Teufe.unit=ft'`.",
    "",
    "A wide sheet has samples down and taxa across, or the reverse, with headers for section, sample, position, base, top or",
    "effort beside the taxa and, if you like, a row of groups. A number, `x` or `+` is a find; `0` or `-` is looked for and not",
    "found; `n/a` is not looked for; `?` and `cf.` are kept; other letters need a legend: a note (`R = rare`), `taxa.scales`, or",
    "`tables.<file>.codes` (`found`, `not-found`, `not-searched`, `doubtful`, `reworked`). A group was looked for in a sample",
    "where any of its cells is filled so; where all are blank it was not, unless `tables.<file>.blank` is `not-found`. `shape`",
    "(`long`, `samples-down`, `taxa-down`) settles what a sheet is.",
    "",
    "`schemas/` holds a Table Schema (Frictionless Data Package, version 2) of every table.",
    "",
    ...tables.map(tableGuide),
  ].join("\n");
}
