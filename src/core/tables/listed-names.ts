import { recogniseColumns } from "../study/columns.ts";
import type { ListedNames } from "./by-content.ts";
import type { DeclaredDialect, TableSetting } from "./dialect/declared.ts";
import { bestParting } from "./dialect/delimiter.ts";
import { choicesOf, headOf, withChoices } from "./file-plan.ts";
import type { StudyTable } from "./table-of-file.ts";

interface ListingFile {
  readonly bytes: Uint8Array;
  readonly declared: DeclaredDialect;
  readonly said: TableSetting | undefined;
  readonly table?: StudyTable;
}

/** The sections and samples that tables of their own list, as far as their beginning shows. */
export function listedNames(files: readonly ListingFile[]): ListedNames {
  const namesIn = (table: "sections" | "samples", column: string) => {
    const file = files.find((file) => file.table?.name === table);
    return new Set(file === undefined ? [] : firstNames(file, column));
  };
  return { section: namesIn("sections", "section"), sample: namesIn("samples", "sample") };
}

function firstNames(file: ListingFile, column: string): readonly string[] {
  const ways = headOf(file);
  if (ways === undefined || file.table === undefined) return [];
  const table = withChoices(file.table, choicesOf(file.said));
  const best = bestParting(ways, table);
  if (best === undefined) return [];
  const at = recogniseColumns(best.header.headers, table).findIndex((one) => one.column === column);
  const records = ways.find(({ delimiter }) => delimiter === best.delimiter)?.records ?? [];
  return records
    .slice(best.header.below)
    .flatMap(({ cells }) => (cells[at] ?? "").trim().normalize("NFC") || []);
}
