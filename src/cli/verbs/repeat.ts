import { readFile } from "node:fs/promises";
import { dirname, join } from "node:path";
import { readWrittenCsv } from "../../core/tables/csv.ts";
import { compareTables, type Difference } from "../../report/compare-tables.ts";
import { parseRepeatSheet, type RepeatSheet, sheetDifferences } from "../../report/repeat-sheet.ts";
import { resultTexts } from "../../report/run-files.ts";
import { nodeRunner } from "../../run/node.ts";
import { CallError } from "../call-error.ts";
import { digest } from "../digest.ts";
import { countOption, jobOf } from "../job.ts";
import type { Screen } from "../screen.ts";
import { tame, textTable } from "../text-table.ts";
import type { VerbOptions } from "./verb.ts";

const SHOWN = 40;

/** Does a run again from its sheet and compares every number; exit 1 where one differs, naming what changed. */
export async function repeat(
  words: readonly string[],
  options: VerbOptions,
  screen: Screen,
): Promise<number> {
  const [sheetPath, studyPath = join(dirname(sheetPath), "study")] = words;
  const sheet = await readSheet(sheetPath);
  const job = await jobOf(studyPath, options, sheet.settings);
  const runner = nodeRunner(countOption(options.threads, "threads"));
  try {
    const analysis = await runner.analyse(
      { ...job, name: sheet.study.name },
      { onProgress: (step, share) => screen.progress(`${step} ${Math.round(100 * share)} %`) },
    );
    const now = resultTexts(analysis);
    const inputs = await sheetDifferences(sheet, analysis.study, digest);
    const { numbers, isByDigest } = await compareWith(sheet, dirname(sheetPath), now);
    const differences = [...inputs, ...numbers];
    screen.say(report(differences, sheet, isByDigest));
    screen.document({
      command: "repeat",
      problems: analysis.study.problems,
      summary: { differences },
      files: [],
    });
    return differences.length === 0 ? 0 : 1;
  } finally {
    await runner.close();
  }
}

async function readSheet(path: string): Promise<RepeatSheet> {
  const text = await readFile(path, "utf8").catch(() => {
    throw new CallError(`lastbed: expected a repeat.json, got ${path}, which cannot be read`);
  });
  const sheet = parseRepeatSheet(text);
  if (sheet === undefined)
    throw new CallError(
      `lastbed: expected a repeat.json written by lastbed run, got ${path}, which is not one`,
    );
  return sheet;
}

/** Cell by cell with the tables beside the sheet; by digest where one is missing. */
async function compareWith(sheet: RepeatSheet, folder: string, now: ReadonlyMap<string, string>) {
  const before = new Map<string, string>();
  const byDigest: Difference[] = [];
  const present = new Map<string, string>();
  const listed = new Map(sheet.results.map(({ name, sha256 }) => [name, sha256]));
  for (const [name, fresh] of now) {
    const sha256 = listed.get(name);
    const text = sha256 === undefined ? undefined : await readBeside(folder, name);
    if (text !== undefined) before.set(name, text);
    if (text !== undefined || sha256 === undefined) present.set(name, fresh);
    else {
      const got = await digest(fresh);
      if (got !== sha256) byDigest.push({ table: name, was: `SHA-256 ${sha256}`, now: `SHA-256 ${got}` });
    }
  }
  const isByDigest = before.size < now.size;
  for (const name of listed.keys()) if (!now.has(name)) before.set(name, "");
  return { numbers: [...byDigest, ...compareTables(before, present, readWrittenCsv)], isByDigest };
}

const readBeside = (folder: string, name: string): Promise<string | undefined> =>
  readFile(join(folder, name), "utf8").catch(() => undefined);

function report(differences: readonly Difference[], sheet: RepeatSheet, isByDigest: boolean): string {
  const tables = `${sheet.results.length} result tables`;
  const how = isByDigest ? "by digest where a table is missing beside the sheet" : "cell by cell";
  if (differences.length === 0)
    return `0 differences: ${tables} repeated to the last digit (compared ${how})`;
  const rows = differences
    .slice(0, SHOWN)
    .map(({ table, row, column, was, now }) => [
      table,
      row === undefined ? "" : `row ${row}`,
      column ?? "",
      tame(was, 34),
      tame(now, 34),
    ]);
  const more = differences.length > SHOWN ? [`  ${differences.length - SHOWN} more`] : [];
  return [
    `${differences.length} ${differences.length === 1 ? "difference" : "differences"} (compared ${how})`,
    textTable([["where", "row", "column", "was", "now"], ...rows]),
    ...more,
  ].join("\n");
}
