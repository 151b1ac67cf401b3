import type { ReadSheet } from "../study/assembly/context.ts";
import { suggestName } from "../study/nearest.ts";
import type { ProblemList } from "../study/problem-list.ts";
import type { Settings } from "../study/settings.ts";
import { type TableName, tables } from "../study/tables/index.ts";
import { baseName } from "./base-name.ts";
import type { DescribedPackage } from "./data-package.ts";
import { declaredDialect, settingName, tableSetting } from "./dialect/declared.ts";
import { readSheet } from "./read-sheet.ts";
import { type CandidateFile, type StudyTable, tableByColumns, tableNamed } from "./table-of-file.ts";

const companions =
  /^(?:settings\.json|datapackage\.json|readme(?:\..*)?|licen[cs]e(?:\..*)?|citation\.cff|\..*)$/i;

interface Reading {
  readonly settings: Settings;
  readonly described: DescribedPackage;
  readonly problems: ProblemList;
}

/**
 * Reads every table among the files: those named as a table first, then those that are one by their columns. What is
 * no table, and what is given twice, is told.
 */
export function readSheets(
  files: ReadonlyMap<string, Uint8Array>,
  { settings, described, problems }: Reading,
): ReadonlyMap<TableName, ReadSheet> {
  const candidates = [...files]
    .map(([path, bytes]) => candidateOf(path, bytes, { settings, described }))
    .filter(({ file }) => !companions.test(file));
  tellUnusedSettings(candidates, settings, problems);
  const sheets = new Map<TableName, ReadSheet>();
  const first = new Map<TableName, string>();
  const use = (candidate: Candidate, table: StudyTable) => {
    const { file, path, bytes, declared } = candidate;
    const earlier = first.get(table.name);
    if (earlier !== undefined) {
      problems.add("duplicate-table", { file: path, found: file, detail: earlier });
      return;
    }
    first.set(table.name, path);
    const guarded = described.apostrophes.get(file) ?? new Set();
    const read = readSheet({ file, bytes, table, guarded, declared, problems });
    if (read) sheets.set(table.name, read);
  };
  for (const candidate of candidates) if (candidate.table) use(candidate, candidate.table);
  for (const candidate of candidates) {
    const table = candidate.table ? undefined : tableByColumns(candidate, new Set(first.keys()), problems);
    if (table) use(candidate, table);
  }
  return sheets;
}

interface Candidate extends CandidateFile {
  /** The table that the settings, the data package or the file's name say it is. */
  readonly table?: StudyTable;
}

function candidateOf(
  path: string,
  bytes: Uint8Array,
  { settings, described }: Omit<Reading, "problems">,
): Candidate {
  const file = baseName(path);
  const said = tableSetting(file, settings);
  const resource = described.resources.get(file);
  const name = said?.table ?? resource?.name;
  const table = tables.find((table) => table.name === name) ?? tableNamed(file);
  return { file, path, bytes, table, declared: declaredDialect(said, resource?.dialect ?? {}) };
}

function tellUnusedSettings(
  candidates: readonly Candidate[],
  settings: Settings,
  problems: ProblemList,
): void {
  const names = candidates.flatMap(({ file }) => [file, settingName(file)]);
  for (const name of Object.keys(settings.tables)) {
    if (names.includes(name)) continue;
    const place = { file: "settings.json", column: `tables.${name}`, found: name };
    problems.add("table-setting-unused", { ...place, nearest: suggestName(name, names) });
  }
}
