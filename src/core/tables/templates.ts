import { type TableDeclaration, tables } from "../study/tables/index.ts";
import { tableResource, writeDataPackage } from "./data-package.ts";
import { writeCsv } from "./write-csv.ts";

/** A table to fill in: the header and one worked row (two where one alone would leave something to be said). */
function tableTemplate(table: TableDeclaration): string {
  const columns = Object.entries(table.columns);
  const worked = columns.map(([, column]) => column.example);
  const { secondRow } = table;
  const second = secondRow && columns.map(([name, column]) => secondRow[name] ?? column.example);
  return writeCsv(
    columns.map(([name]) => name),
    second ? [worked, second] : [worked],
  ).text;
}

/** Every file of a new study, by name: the tables, settings.json and datapackage.json. */
export function studyTemplate(name: string): ReadonlyMap<string, string> {
  const files = new Map(tables.map((table) => [`${table.name}.csv`, tableTemplate(table)]));
  files.set("settings.json", `${JSON.stringify({ seed: 1 }, null, 2)}\n`);
  files.set(
    "datapackage.json",
    writeDataPackage(
      name,
      tables.map((table) => tableResource(table)),
    ),
  );
  return files;
}
