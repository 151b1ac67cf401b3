import type { Analysis } from "../core/analysis-result.ts";
import { type PackageResource, writeDataPackage } from "../core/tables/data-package.ts";
import { type WrittenCsv, writeCsv } from "../core/tables/write-csv.ts";
import { type PlateFile, plates } from "../figures/index.ts";
import { renderPlate } from "../figures/render-plate.ts";
import { findings } from "./findings/index.ts";
import { renderReport } from "./html/render-report.ts";
import { type Digest, repeatSheet } from "./repeat-sheet.ts";
import { CRATE_FILE, roCrate } from "./ro-crate.ts";
import { resultTables } from "./tables/index.ts";
import type { ResultTable } from "./tables/result-table.ts";

export interface RunFilesOptions {
  readonly digest: Digest;
  /** `@font-face` rules that carry the plates' faces. */
  readonly fontFaces: string;
}

/** Every file of a run, by its path in the run's folder: tables, figures, report, repeat sheet and the tables read. */
export async function runFiles(
  analysis: Analysis,
  { digest, fontFaces }: RunFilesOptions,
): Promise<ReadonlyMap<string, string | Uint8Array>> {
  const { study } = analysis;
  const tables = resultTables(analysis).map((table) => ({ table, written: written(table) }));
  const drawn = plates(analysis, { fontFaces });
  const files = new Map<string, string | Uint8Array>();
  for (const { table, written } of tables) files.set(`${table.name}.csv`, written.text);
  files.set("datapackage.json", writeDataPackage(study.name, tables.map(resource)));
  for (const { file, drawing } of drawn) files.set(file, renderPlate(drawing.element));
  files.set("report.html", report(analysis, drawn, fontFaces));
  files.set(
    "repeat.json",
    `${JSON.stringify(await repeatSheet(study, resultTexts(analysis), digest), null, 2)}\n`,
  );
  files.set(CRATE_FILE, roCrate(study, [...files.keys(), CRATE_FILE]));
  for (const { name, bytes } of study.files) files.set(`study/${name}`, bytes);
  return files;
}

/** The text of every result table, by file name: what a repeat compares. */
export function resultTexts(analysis: Analysis): ReadonlyMap<string, string> {
  return new Map(resultTables(analysis).map((table) => [`${table.name}.csv`, written(table).text]));
}

function written({ columns, rows }: ResultTable): WrittenCsv {
  return writeCsv(
    columns.map((column) => column.name),
    rows,
  );
}

function resource({ table, written }: { table: ResultTable; written: WrittenCsv }): PackageResource {
  const { name, title, columns } = table;
  const fields = columns.map((column) => ({
    name: column.name,
    description: column.help,
    ...(column.type === "yes-no"
      ? { type: "boolean", trueValues: ["yes"], falseValues: ["no"] }
      : { type: column.type === "text" ? "string" : column.type }),
  }));
  const schema = {
    $schema: "https://datapackage.org/profiles/2.0/tableschema.json",
    fields,
    missingValues: [""],
  };
  return { name, title, description: title, path: `${name}.csv`, schema, guarded: written.guarded };
}

function report(analysis: Analysis, drawn: readonly PlateFile[], fontFaces: string): string {
  return renderReport({
    analysis,
    findings: findings(analysis),
    plates: drawn,
    tables: resultTables(analysis),
    fontFaces,
  });
}
