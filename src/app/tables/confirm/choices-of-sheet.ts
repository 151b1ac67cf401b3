import type { Sheet } from "../../../core/study/model.ts";
import type { Settings } from "../../../core/study/settings.ts";
import { tables } from "../../../core/study/tables/index.ts";
import { samples } from "../../../core/study/tables/samples.ts";
import { settingName } from "../../../core/tables/dialect/declared.ts";

/** What a column of a sheet can be taken to be. */
export function columnChoices({ table, wide }: Sheet): readonly string[] {
  if (wide !== undefined) return [...Object.keys(samples.columns), "effort", "group", "taxon", "unused"];
  const own = tables.find(({ name }) => name === table)?.columns ?? {};
  return [...Object.keys(own), "unused"];
}

/** The path of a setting of a file, under the name by which the settings speak of it already. */
export function pathOf(file: string, settings: Settings, ...names: readonly string[]): readonly string[] {
  const plain = settingName(file);
  const isPlain = settings.tables[file] === undefined && settings.tables[plain] !== undefined;
  return ["tables", isPlain ? plain : file, ...names];
}
