import type { Decimal, Delimiter, Encoding } from "../../study/model.ts";
import { settingPath } from "../../study/setting-path.ts";
import type { Settings } from "../../study/settings.ts";

/** What settings or a data package say about a file; what is said is not looked for. */
export interface DeclaredDialect {
  readonly encoding?: Encoding;
  readonly delimiter?: Delimiter;
  readonly quote?: string;
  readonly decimal?: Decimal;
  /** Cells that mean "no value". */
  readonly missing?: readonly string[];
  /** Names of the columns of a file that has no header. */
  readonly headers?: readonly string[];
}

export type TableSetting = Settings["tables"][string];

const delimiters = { comma: ",", semicolon: ";", tab: "\t", bar: "|" } as const;

const withoutEnding = (file: string): string => file.replace(/\.[^.\s]*$/, "");

/** The name under which settings speak of a file: with or without its ending. */
export const settingName = (file: string): string => withoutEnding(file);

/** The path under which settings speak of a file, or of one thing in it. */
export const tablePath = (file: string, ...names: readonly string[]): string =>
  settingPath(["tables", settingName(file), ...names]);

/** What the settings say about a file. */
export const tableSetting = (file: string, settings: Settings): TableSetting | undefined =>
  settings.tables[file] ?? settings.tables[withoutEnding(file)];

/** The dialect of a file as settings state it, over that of its data package. */
export function declaredDialect(said: TableSetting | undefined, described: DeclaredDialect): DeclaredDialect {
  return {
    ...described,
    ...(said?.delimiter === undefined ? {} : { delimiter: delimiters[said.delimiter] }),
    ...(said?.decimal === undefined ? {} : { decimal: said.decimal }),
    ...(said?.encoding === undefined ? {} : { encoding: said.encoding }),
  };
}
