import { mkdir, readdir, readFile, rm, stat, writeFile } from "node:fs/promises";
import { basename, dirname, join, relative, resolve, sep } from "node:path";
import type { Analysis } from "../core/analysis-result.ts";
import { writeCsv } from "../core/tables/write-csv.ts";
import { CRATE_FILE, filesOfCrate } from "../report/ro-crate.ts";
import { CallError } from "./call-error.ts";
import { isStudyTable, withoutEnding } from "./file-kinds.ts";

/** Refuses what is no folder, and one whose top level holds study tables or one of `studies`: a run never writes among what it reads. */
export async function refuseOut(folder: string, studies: readonly string[]): Promise<void> {
  if (folder.trim() === "") throw new CallError("lastbed: expected a folder after --out, got a blank");
  const found = await stat(folder).catch(() => undefined);
  if (found !== undefined && !found.isDirectory())
    throw new CallError(`lastbed: expected --out to be a folder, got ${folder}, which is a file`);
  const entries: readonly string[] = found === undefined ? [] : await readdir(folder);
  const table = entries.find(isStudyTable) ?? studyIn(folder, studies);
  if (table !== undefined)
    throw new CallError(
      `lastbed: expected an --out folder without study tables, got ${folder}, which holds ${table}; name another folder`,
    );
}

/** The study that lies in the folder itself: a workbook or archive may have any name. */
const studyIn = (folder: string, studies: readonly string[]): string | undefined =>
  studies
    .filter((study) => resolve(dirname(study)) === resolve(folder) && withoutEnding(study) !== study)
    .map((study) => basename(study))[0];

/** Writes a run's files in place of those of an earlier run; anything else in the folder is left alone, never written over. */
export async function writeRun(
  folder: string,
  files: ReadonlyMap<string, string | Uint8Array>,
): Promise<void> {
  const earlier = filesOfCrate(await readFile(join(folder, CRATE_FILE), "utf8").catch(() => ""));
  await refuseForeign(folder, { ours: new Set(earlier), files });
  for (const name of earlier) await removeFile(within(folder, name));
  // The list of files comes first, so that a run that is cut short can still be replaced.
  const list = [...files].filter(([name]) => name === CRATE_FILE);
  for (const [name, content] of [...list, ...files]) {
    const path = within(folder, name);
    await mkdir(dirname(path), { recursive: true });
    await writeFile(path, content);
  }
}

interface Writing {
  /** What an earlier run says it wrote. */
  readonly ours: ReadonlySet<string>;
  readonly files: ReadonlyMap<string, unknown>;
}

/** Refuses to write over a file that no run wrote. */
async function refuseForeign(folder: string, { ours, files }: Writing): Promise<void> {
  for (const name of files.keys()) {
    if (ours.has(name)) continue;
    const found = await stat(within(folder, name)).catch(() => undefined);
    if (found !== undefined)
      throw new CallError(
        `lastbed: expected an --out folder without files of other origin, got ${folder}, which holds ${name}; name another folder, or take the file away`,
      );
  }
}

async function removeFile(path: string): Promise<void> {
  const found = await stat(path).catch(() => undefined);
  if (found?.isDirectory() !== true) await rm(path, { force: true });
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
