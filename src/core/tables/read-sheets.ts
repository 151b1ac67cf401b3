import type { ReadSheet } from "../study/assembly/context.ts";
import type { Sheet } from "../study/model.ts";
import { suggestName } from "../study/nearest.ts";
import type { ProblemList } from "../study/problem-list.ts";
import type { Settings } from "../study/settings.ts";
import { withColumn } from "../study/sheet-rows.ts";
import { type TableName, tables } from "../study/tables/index.ts";
import { baseName } from "./base-name.ts";
import type { DescribedPackage } from "./data-package.ts";
import {
  declaredDialect,
  settingName,
  type TableSetting,
  tablePath,
  tableSetting,
} from "./dialect/declared.ts";
import { choicesOf, type FilePlan, planFor } from "./file-plan.ts";
import { MOST_BYTES } from "./limits.ts";
import { listedNames } from "./listed-names.ts";
import { readSheet } from "./read-sheet.ts";
import {
  type CandidateFile,
  planByColumns,
  type StudyTable,
  sheetName,
  tableNamed,
} from "./table-of-file.ts";
import { joinSheets } from "./wide/join-sheets.ts";
import { readWide } from "./wide/read-wide.ts";

const companions =
  /^(?:settings\.json|datapackage\.json|readme(?:\..*)?|licen[cs]e(?:\..*)?|citation\.cff|\..*)$/i;

interface Reading {
  readonly settings: Settings;
  readonly described: DescribedPackage;
  /** The study's name, where one is given. */
  readonly name?: string;
  readonly problems: ProblemList;
}

/**
 * Reads every table among the files: those named as a table first, then those that are one by their columns. What is
 * no table, and what is given twice, is told. A table that a file holds stands before one that a wide sheet would make.
 */
export function readSheets(
  files: ReadonlyMap<string, Uint8Array>,
  reading: Reading,
): ReadonlyMap<TableName, ReadSheet> {
  const { settings, problems } = reading;
  const candidates = candidatesOf(files, reading);
  tellUnusedSettings(candidates, settings, problems);
  const sheets = new Map<TableName, ReadSheet>();
  let areFindsWide = false;
  const made = new Map<TableName, ReadSheet>();
  const first = new Map<TableName, string>();
  const use = (candidate: Candidate, plan: FilePlan) => {
    const name = plan.kind === "wide" ? "occurrences" : plan.table.name;
    const earlier = first.get(name);
    const isJoined = plan.kind === "wide" && areFindsWide;
    if (earlier !== undefined && !isJoined) {
      problems.add("duplicate-table", { file: candidate.path, found: candidate.file, detail: earlier });
      return;
    }
    if (earlier === undefined) first.set(name, candidate.path);
    areFindsWide ||= plan.kind === "wide" && earlier === undefined;
    const [own, ...further] = readPlanned(candidate, plan, { ...reading, candidates });
    if (own !== undefined) put(sheets, ...own);
    for (const [table, sheet] of further) put(made, table, sheet);
  };
  for (const candidate of candidates) {
    const { table, bytes } = candidate;
    if (table !== undefined && first.has(table.name) && !areFindsWide) use(candidate, asItIs(table));
    else if (table !== undefined)
      use(candidate, bytes.byteLength > MOST_BYTES ? asItIs(table) : planFor(table, candidate));
  }
  for (const candidate of candidates) {
    const plan = candidate.table
      ? undefined
      : planByColumns(candidate, { taken: new Set(first.keys()), mayJoinWide: areFindsWide }, problems);
    if (plan) use(candidate, plan);
  }
  for (const [table, sheet] of made) if (!sheets.has(table)) sheets.set(table, sheet);
  return sheets;
}

/** Takes a table in, with what an earlier wide sheet was made into. */
function put(sheets: Map<TableName, ReadSheet>, table: TableName, sheet: ReadSheet): void {
  const earlier = sheets.get(table);
  sheets.set(table, earlier === undefined ? sheet : joinSheets(earlier, sheet));
}

const asItIs = (table: StudyTable): FilePlan => ({
  kind: "long",
  table,
  lacksSection: false,
  byContent: new Map(),
  recognised: 0,
  width: 0,
});

interface Candidate extends CandidateFile {
  /** The table that the settings, the data package or the file's name say it is. */
  readonly table?: StudyTable;
}

function candidatesOf(
  files: ReadonlyMap<string, Uint8Array>,
  { settings, described }: Reading,
): readonly Candidate[] {
  const named = [...files]
    .map(([path, bytes]) => {
      const file = baseName(path);
      const said = tableSetting(file, settings);
      const resource = described.resources.get(file);
      const name = said?.table ?? resource?.name;
      const table = tables.find((table) => table.name === name) ?? tableNamed(file);
      return { file, path, bytes, said, table, declared: declaredDialect(said, resource?.dialect ?? {}) };
    })
    .filter(({ file }) => !companions.test(file));
  const listed = listedNames(named);
  return named.map((one) => ({ ...one, listed }));
}

interface Planned extends Reading {
  readonly candidates: readonly Candidate[];
}

/** The tables that a file holds, its own first; none, told, where it cannot be read. */
function readPlanned(
  candidate: Candidate,
  plan: FilePlan,
  reading: Planned,
): readonly (readonly [TableName, ReadSheet])[] {
  const { file, bytes, declared, said } = candidate;
  const { settings, described, problems } = reading;
  const section = () => sectionOf(candidate, reading);
  if (plan.kind === "wide") {
    const chosen = choicesOf(said);
    const wide = readWide({
      file,
      bytes,
      declared,
      said,
      chosen,
      section,
      problems,
      delimiter: plan.delimiter,
      scales: settings.taxa.scales,
    });
    const shown = wide?.get("occurrences")?.shown;
    if (shown) tellColumnSettings(shown, said, { problems });
    return [...(wide ?? [])];
  }
  const { table, byContent, lacksSection } = plan;
  const guarded = described.apostrophes.get(file) ?? new Set();
  const read = readSheet({ file, bytes, table, guarded, declared, problems });
  if (read === undefined) return [];
  for (const [header, { is = "" }] of byContent) {
    const nearest = tablePath(file, "columns", header, "is");
    problems.add("taken-by-content", { file, column: header, found: header, detail: is, nearest });
  }
  tellColumnSettings(read.sheet, said, { problems, table: plan.table });
  return [[table.name, lacksSection ? withSection(read, section()) : read]];
}

/** The sheet with a column of its one section. */
function withSection(read: ReadSheet, section: NonNullable<Sheet["section"]>): ReadSheet {
  const { sheet } = read;
  return {
    ...read,
    shown: { ...sheet, section },
    sheet: {
      ...sheet,
      headers: [...sheet.headers, "section"],
      columns: [...sheet.columns, "section"],
      rows: withColumn(sheet.rows, section.name),
    },
  };
}

/** The section of a file without a column for it: as chosen, the only one listed, else by the sheet's or study's name, told. */
function sectionOf(candidate: Candidate, reading: Planned): NonNullable<Sheet["section"]> {
  const { file, said, listed } = candidate;
  if (said?.section !== undefined) return { name: said.section.normalize("NFC"), by: "chosen" };
  const [only, ...others] = listed.section;
  if (only !== undefined && others.length === 0) return { name: only, by: "sections" };
  const isAlone = reading.candidates.length === 1 && tableNamed(file) === undefined;
  const sheet = tableNamed(file) === undefined ? sheetName(file) : undefined;
  const isNumbered =
    sheet !== undefined && /^(?:sheet|tabelle|feuil|hoja|foglio|planilha|лист)\s*\d*$/iu.test(sheet);
  const named = isNumbered ? undefined : sheet;
  const unnamed = reading.candidates.filter(({ table }) => table === undefined);
  const isOneOfSeveral = candidate.table === undefined && unnamed.length > 1;
  const byFile = isAlone || isOneOfSeveral ? settingName(file) : undefined;
  const name = named ?? (isOneOfSeveral ? byFile : undefined) ?? reading.name ?? byFile ?? "section";
  reading.problems.add("section-by-name", { file, found: name, detail: tablePath(file, "section") });
  return { name: name.trim().normalize("NFC"), by: "name" };
}

interface ColumnTelling {
  readonly problems: ProblemList;
  /** Absent for a wide sheet, which holds columns of several. */
  readonly table?: { readonly name: TableName; readonly columns: object };
}

/** Tells choices for columns that the file or its table does not have. */
function tellColumnSettings(
  { file, headers, recognised }: Sheet,
  said: TableSetting | undefined,
  { problems, table }: ColumnTelling,
): void {
  const known = new Set(
    [...headers, ...recognised.map(({ header }) => header)].map((header) => header.trim()),
  );
  for (const [header, { is }] of Object.entries(said?.columns ?? {})) {
    const column = `${tablePath(file)}.columns`;
    const place = { file: "settings.json", column };
    if (!known.has(header))
      problems.add("column-setting-unused", {
        ...place,
        found: header,
        detail: column,
        nearest: suggestName(header, known),
      });
    else if (table && is !== undefined && is !== "unused" && !(is in table.columns)) {
      const nearest = suggestName(is, Object.keys(table.columns));
      problems.add("column-setting-foreign", { ...place, found: is, detail: table.name, nearest });
    }
  }
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
