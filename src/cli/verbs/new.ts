import { mkdir, readdir, stat, writeFile } from "node:fs/promises";
import { basename, join, resolve } from "node:path";
import { studyTemplate } from "../../core/tables/templates.ts";
import { CallError } from "../call-error.ts";
import type { Screen } from "../screen.ts";

/** Writes a study to fill in: every table with its header and its worked rows. Never writes over anything. */
export async function newStudy(folder: string, screen: Screen): Promise<number> {
  const found = await stat(folder).catch(() => undefined);
  if (found !== undefined && !found.isDirectory())
    throw new CallError(`lastbed: expected a new or empty folder, got ${folder}, which is a file`);
  const entries: readonly string[] = found === undefined ? [] : await readdir(folder);
  if (entries.length > 0)
    throw new CallError(`lastbed: expected a new or empty folder, got ${folder}, which holds ${entries[0]}`);
  await mkdir(folder, { recursive: true });
  const files = studyTemplate(basename(resolve(folder)));
  for (const [name, text] of files) await writeFile(join(folder, name), text);
  screen.say(`A study to fill in lies in ${folder}: ${[...files.keys()].join(", ")}.`);
  screen.say("Each table holds a worked row or two: replace them. Delete the tables you do not need; then:");
  screen.say(`  lastbed check ${folder}\n  lastbed run ${folder} --out <folder>`);
  screen.document({
    command: "new",
    problems: [],
    summary: { folder },
    files: [...files.keys()].map((f) => join(folder, f)),
  });
  return 0;
}
