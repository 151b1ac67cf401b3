import { tablesGuide } from "./table-guide.ts";
import { tableSchema } from "./table-schema.ts";
import { tables } from "./tables/index.ts";

/** The files that document the tables of a study, by name: a guide, and a Table Schema of each. */
export function tableDocumentation(): ReadonlyMap<string, string> {
  const files = new Map([["README.md", tablesGuide()]]);
  for (const table of tables) {
    files.set(`schemas/${table.name}.schema.json`, `${JSON.stringify(tableSchema(table), null, 2)}\n`);
  }
  return files;
}
