import { readdir, readFile, stat } from "node:fs/promises";
import { basename, join, resolve } from "node:path";
import { tables } from "../core/study/tables/index.ts";
import { CallError } from "./call-error.ts";

export interface StudyOnDisk {
  readonly name: string;
  readonly files: ReadonlyMap<string, Uint8Array>;
}

/** Reads a study as it lies on disk: a folder of tables, or a single table. Nothing is interpreted here. */
export async function readStudyFiles(path: string): Promise<StudyOnDisk> {
  const found = await stat(path).catch(() => undefined);
  if (found === undefined)
    throw new CallError(`lastbed: expected a study folder or table, got ${path}, which does not exist`);
  const name = basename(resolve(path));
  if (!found.isDirectory()) return readSingleTable(path, name);
  const entries = await readdir(path, { withFileTypes: true });
  const names = entries
    .filter((entry) => (entry.isFile() || entry.isSymbolicLink()) && !entry.name.startsWith("."))
    .map((entry) => entry.name)
    .filter((file) => isStudyFile(file) || isTableElsewise(file))
    .toSorted();
  const files = new Map<string, Uint8Array>();
  for (const file of names) files.set(file, await readFile(join(path, file)));
  if (!names.some(isStudyFile))
    throw new CallError(
      `lastbed: expected tables (.csv) in ${path}, got none; \`lastbed new <folder>\` writes templates to fill in`,
    );
  return { name, files };
}

async function readSingleTable(path: string, name: string): Promise<StudyOnDisk> {
  if (!isStudyFile(name))
    throw new CallError(`lastbed: expected a folder of tables or one .csv table, got ${path}`);
  return { name: name.replace(/\.csv$/i, ""), files: new Map([[name, await readFile(path)]]) };
}

const isStudyFile = (name: string) => /\.(?:csv|json)$/i.test(name);

/** A table kept in another form, which reading must name rather than pass over. */
function isTableElsewise(file: string): boolean {
  const [, stem] = /^(.+)\.(?:tsv|tab|txt|xlsx?|ods)$/i.exec(file) ?? [];
  return stem !== undefined && tables.some(({ name }) => name === stem.toLowerCase().replace(/[\s_]+/g, "-"));
}
