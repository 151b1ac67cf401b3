import { assembleStudy } from "../study/assembly/assemble-study.ts";
import type { ReadSheet } from "../study/assembly/context.ts";
import type { Section, Sheet, Study } from "../study/model.ts";
import type { Problem } from "../study/problem.ts";
import { type ProblemList, problemList } from "../study/problem-list.ts";
import { readSettings } from "../study/read-settings.ts";
import { mergeSettings } from "../study/setting-path.ts";
import type { Settings } from "../study/settings.ts";
import { type TableName, tables } from "../study/tables/index.ts";
import { samples } from "../study/tables/samples.ts";
import { baseName } from "./base-name.ts";
import { decodeText } from "./csv.ts";
import { type DescribedPackage, readDataPackage } from "./data-package.ts";
import { readSheets } from "./read-sheets.ts";
import { withSectionUnits } from "./recognition.ts";

export interface ReadStudyOptions {
  /** The study's name where datapackage.json gives no title; absent: the folder of the files, else "study". */
  readonly name?: string;
  /** Settings that stand over those of settings.json, in the same form. */
  readonly settings?: unknown;
  /** The files as they were given, where those read were unpacked from them; they become the study's files. */
  readonly originals?: ReadonlyMap<string, Uint8Array>;
  /** What unpacking met. */
  readonly problems?: readonly Problem[];
}

/**
 * Reads a study from its files: names, with or without folders, to bytes. Every problem is told in `problems`; an error
 * leaves its row or its file out and takes nothing else with it. Never throws on bad input.
 *
 * @example
 * readStudy(new Map([["occurrences.csv", new TextEncoder().encode("section,taxon,height (m)\nOrskel Ledge,Velorites orskelensis,1.2\n")]]))
 */
export function readStudy(files: ReadonlyMap<string, Uint8Array>, options: ReadStudyOptions = {}): Study {
  const problems = problemList();
  const settings = settingsOf(files, options.settings, problems);
  const described = packageOf(files, problems);
  const name = described.title ?? options.name ?? folderOf(files);
  const sheets = readSheets(files, {
    settings,
    described,
    problems,
    ...(name === undefined ? {} : { name }),
  });
  const assembly = { settings, problems, sheets };
  const assembled = assembleStudy(assembly);
  if (!hasData(sheets)) problems.add("no-data", { file: "study", found: "none of them can be used" });
  return {
    name: name ?? "study",
    settings,
    ...assembled,
    problems: [
      ...(options.problems ?? []),
      ...problems.problems().map((problem) => asWritten(problem, sheets)),
    ],
    sheets: shownSheets(sheets, assembled.sections),
    files: [...(options.originals ?? files)].map(([name, bytes]) => ({ name, bytes })),
  };
}

/** The problem with its column called as the file's own header calls it. */
function asWritten(problem: Problem, sheets: ReadonlyMap<TableName, ReadSheet>): Problem {
  const sheet = sheetOf(problem.file, sheets);
  const place = problem.column === undefined ? -1 : (sheet?.columns.indexOf(problem.column) ?? -1);
  const column = place < 0 ? undefined : sheet?.headers[place];
  if (column === undefined) return problem;
  return { ...problem, column, ...(problem.fix && { fix: { ...problem.fix, column } }) };
}

const sheetOf = (file: string, sheets: ReadonlyMap<TableName, ReadSheet>): Sheet | undefined =>
  [...sheets.values()]
    .flatMap(({ sheet, shown = sheet, alsoShown = [] }) => [shown, ...alsoShown])
    .find((sheet) => sheet.file === file);

/** The sheets as they stand in their files, each once, with what has to be asked of their columns. */
function shownSheets(
  sheets: ReadonlyMap<TableName, ReadSheet>,
  sections: readonly Section[],
): readonly Sheet[] {
  const byName = new Map(sections.map((section) => [section.name, section]));
  const byFile = new Map<string, Sheet>();
  const all = [...sheets.values()].flatMap(({ sheet, shown = sheet, alsoShown = [] }) => [
    shown,
    ...alsoShown,
  ]);
  for (const shown of all) {
    const table = shown.wide === undefined ? tables.find(({ name }) => name === shown.table) : samples;
    if (table !== undefined && !byFile.has(shown.file))
      byFile.set(shown.file, withSectionUnits(shown, table, byName));
  }
  return [...byFile.values()];
}

function folderOf(files: ReadonlyMap<string, Uint8Array>): string | undefined {
  const folders = new Set([...files.keys()].map((path) => path.split(/[/\\]/).at(-2)));
  const [folder] = folders;
  return folders.size === 1 && folder !== "" ? folder : undefined;
}

const hasData = (sheets: ReadonlyMap<TableName, ReadSheet>): boolean =>
  sheets.has("occurrences") || sheets.has("published-ranges") || sheets.has("measurements");

const find = (files: ReadonlyMap<string, Uint8Array>, name: string) =>
  [...files].find(([path]) => baseName(path).toLowerCase() === name);

function settingsOf(files: ReadonlyMap<string, Uint8Array>, over: unknown, problems: ProblemList): Settings {
  const [path, bytes] = find(files, "settings.json") ?? ["settings.json", undefined];
  const raw = bytes === undefined ? {} : parseSettings(path, bytes, problems);
  return readSettings(mergeSettings(raw, over), path, problems);
}

function parseSettings(file: string, bytes: Uint8Array, problems: ProblemList): unknown {
  const text = decodeText(bytes);
  try {
    const value: unknown = JSON.parse(text ?? "");
    JSON.stringify(value); // nested too deeply to be written is too deep to be read
    return value;
  } catch {
    problems.add("settings-unreadable", { file, found: text ?? "bytes that are not UTF-8" });
    return {};
  }
}

const nothingDescribed: DescribedPackage = { apostrophes: new Map(), resources: new Map(), unread: [] };

function packageOf(files: ReadonlyMap<string, Uint8Array>, problems: ProblemList): DescribedPackage {
  const [path, bytes] = find(files, "datapackage.json") ?? ["", undefined];
  if (bytes === undefined) return nothingDescribed;
  const text = decodeText(bytes);
  const described = text === undefined ? undefined : readDataPackage(text);
  if (described === undefined)
    problems.add("package-unreadable", { file: path, found: text ?? "bytes that are not UTF-8" });
  if (described === undefined) return nothingDescribed;
  for (const { path: unread, reason } of described.unread)
    problems.add("resource-unread", { file: path, found: unread, detail: reason });
  const present = new Set([...files.keys()].map(baseName));
  for (const [file, { name }] of described.resources) {
    const isOwnTemplate = file === `${name}.csv`; // a study need not hold every table
    if (!present.has(baseName(file)) && !isOwnTemplate)
      problems.add("resource-unread", {
        file: path,
        found: file,
        detail: "the file is not among those given",
      });
  }
  return {
    ...described,
    apostrophes: byBaseName(described.apostrophes),
    resources: byBaseName(described.resources),
  };
}

const byBaseName = <T>(byPath: ReadonlyMap<string, T>): ReadonlyMap<string, T> =>
  new Map([...byPath].map(([path, value]) => [baseName(path), value]));
