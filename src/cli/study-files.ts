import { readdir, readFile, stat } from "node:fs/promises";
import { basename, join, posix, resolve } from "node:path";
import { readDataPackage } from "../core/tables/data-package.ts";
import { MOST_BYTES, mebibytes } from "../core/tables/limits.ts";
import { CallError } from "./call-error.ts";
import { isStudyTable, withoutEnding } from "./file-kinds.ts";

export interface StudyOnDisk {
  readonly name: string;
  readonly files: ReadonlyMap<string, Uint8Array>;
}

/**
 * Reads a study as it lies on disk: a folder of tables, or one table, workbook or archive. Nothing is interpreted here; a
 * file of more bytes than are read as a table is refused before it is taken into memory.
 */
export async function readStudyFiles(path: string, mostBytes = MOST_BYTES): Promise<StudyOnDisk> {
  const found = await stat(path).catch(() => undefined);
  if (found === undefined)
    throw new CallError(`lastbed: expected a study folder or table, got ${path}, which does not exist`);
  const name = basename(resolve(path));
  return found.isDirectory() ? readFolder(path, name, mostBytes) : readSingleFile(path, name, mostBytes);
}

async function readFolder(path: string, name: string, mostBytes: number): Promise<StudyOnDisk> {
  const entries = await readdir(path, { withFileTypes: true });
  const present = entries
    .filter((entry) => (entry.isFile() || entry.isSymbolicLink()) && !entry.name.startsWith("."))
    .map((entry) => entry.name)
    .toSorted();
  const names = studyNames(present);
  const files = new Map<string, Uint8Array>();
  for (const file of names) files.set(file, await readWhole(join(path, file), mostBytes));
  for (const file of describedElsewhere(files)) {
    const bytes = await readWhole(join(path, file), mostBytes).catch(absent);
    if (bytes !== undefined) files.set(file, bytes);
  }
  if ([...files.keys()].every((file) => /\.json$/i.test(file)))
    throw new CallError(
      `lastbed: expected tables (.csv, .tsv, .xlsx) in ${path}, got none; \`lastbed new <folder>\` writes templates to fill in`,
    );
  return { name, files };
}

/** A resource that is not there is told when the study is read. */
function absent(error: unknown): undefined {
  if (error instanceof CallError) throw error;
}

async function readSingleFile(path: string, name: string, mostBytes: number): Promise<StudyOnDisk> {
  if (!isStudyFile(name) && !isPacked(name))
    throw new CallError(
      `lastbed: expected a folder of tables, or one .csv, .tsv, .txt, .xlsx or .zip file, got ${path}`,
    );
  return { name: withoutEnding(name), files: new Map([[name, await readWhole(path, mostBytes)]]) };
}

async function readWhole(path: string, mostBytes: number): Promise<Uint8Array> {
  const { size } = await stat(path);
  if (size > mostBytes)
    throw new CallError(
      `lastbed: expected files of at most ${mebibytes(mostBytes)}, got ${path} of ${mebibytes(size)}; part the table into several studies, or thin it out`,
    );
  return readFile(path);
}

const isStudyFile = (name: string) => /\.(?:csv|tsv|tab|json)$/i.test(name);
const isPacked = (name: string) => /\.(?:txt|xlsx|xlsm|xls|ods|zip)$/i.test(name);

/**
 * The files of a folder that a study is read from: tables by their ending or name; the texts beside a meta.xml; where
 * there is no table of its own, workbooks, texts and archives.
 */
function studyNames(present: readonly string[]): readonly string[] {
  const isArchive = present.includes("meta.xml");
  const hasTable = present.some((file) => isStudyFile(file) && !/\.json$/i.test(file));
  return present.filter(
    (file) =>
      isStudyFile(file) ||
      isTableElsewise(file) ||
      (isArchive && /^meta\.xml$|\.txt$/i.test(file)) ||
      (!hasTable && isPacked(file)),
  );
}

/** A table kept in another form, which reading must name rather than pass over. */
const isTableElsewise = (file: string): boolean => /\.(?:txt|xlsx?|ods)$/i.test(file) && isStudyTable(file);

/** Files that a data package names and that were not read: those inside the folder. */
function describedElsewhere(files: ReadonlyMap<string, Uint8Array>): readonly string[] {
  const descriptor = files.get("datapackage.json");
  const described =
    descriptor === undefined ? undefined : readDataPackage(new TextDecoder().decode(descriptor));
  return [...(described?.resources.keys() ?? [])]
    .map((path) => posix.normalize(path))
    .filter((path) => !posix.isAbsolute(path) && !path.startsWith("..") && !files.has(path));
}
