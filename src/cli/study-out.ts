import { mkdir, readdir, readFile, rm, writeFile } from "node:fs/promises";
import { dirname, join, relative, resolve, sep } from "node:path";
import type { Analysis } from "../core/analysis-result.ts";
import { tables } from "../core/study/tables/index.ts";
import { writeCsv } from "../core/tables/write-csv.ts";
import { CRATE_FILE, filesOfCrate } from "../report/ro-crate.ts";
import { CallError } from "./call-error.ts";

/** Refuses a folder whose top level holds study tables: a run never writes among what it reads. */
export async function refuseStudyFolder(folder: string): Promise<void> {
  const entries: readonly string[] = await readdir(folder).catch(() => []);
  const table = entries.find((entry) => tables.some(({ name }) => entry.toLowerCase() === `${name}.csv`));
  if (table !== undefined)
    throw new CallError(
      `lastbed: expected an --out folder without study tables, got ${folder}, which holds ${table}; name another folder`,
    );
}

/** Writes a run's files, after taking away those of an earlier run; anything else in the folder is left alone. */
export async function writeRun(
  folder: string,
  files: ReadonlyMap<string, string | Uint8Array>,
): Promise<void> {
  const earlier = filesOfCrate(await readFile(join(folder, CRATE_FILE), "utf8").catch(() => ""));
  for (const name of earlier) await rm(within(folder, name), { force: true });
  for (const [name, content] of files) {
    const path = within(folder, name);
    await mkdir(dirname(path), { recursive: true });
    await writeFile(path, content);
  }
}

/** One row a study, section and set: the answers to one level and how gradual, so that studies can be set side by side. */
export async function writeSummary(folder: string, analyses: readonly Analysis[]): Promise<void> {
  const headers = [
    "study",
    "section",
    "set",
    "question",
    "method",
    "taxa",
    "p",
    "low",
    "high",
    "unit",
    "outcome",
  ];
  const rows = analyses.flatMap(({ study, timing }) =>
    timing.answers
      .filter(({ question }) => question === "one-level" || question === "how-gradual")
      .map((a) => [
        study.name,
        a.section,
        a.set,
        a.question,
        a.method,
        a.taxa,
        a.p,
        a.low,
        a.high,
        a.unit,
        a.outcome,
      ]),
  );
  await writeFile(join(folder, "summary.csv"), writeCsv(headers, rows).text);
}

/** A path inside the folder; a name that would leave it is refused. */
function within(folder: string, name: string): string {
  const path = resolve(folder, name);
  const inside = relative(resolve(folder), path);
  if (inside === ".." || inside.startsWith(`..${sep}`) || resolve(inside) === inside)
    throw new CallError(`lastbed: expected a file name inside ${folder}, got ${name}`);
  return path;
}
