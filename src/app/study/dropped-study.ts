import { MOST_BYTES, mebibytes } from "../../core/tables/limits.ts";
import { type GivenStudy, NotAStudy, studyOf } from "./given-study.ts";

/**
 * A study dropped on the page: one folder, or the files themselves. Entries must be taken in the drop event itself,
 * so this is called there and its promise awaited later.
 */
export function droppedStudy(transfer: DataTransfer): () => Promise<GivenStudy> {
  const entries = [...transfer.items].flatMap((item) => item.webkitGetAsEntry() ?? []);
  const loose = [...transfer.files];
  return async () => {
    const [first] = entries;
    if (first === undefined) return chosenStudy(loose);
    if (entries.length === 1 && isFolder(first)) return studyOf(first.name, await filesIn(first));
    const files = await Promise.all(entries.filter(isFile).map(fileOf));
    return chosenStudy(files);
  };
}

/** A study chosen through a file field: loose files, or everything in one folder. */
export async function chosenStudy(chosen: readonly File[]): Promise<GivenStudy> {
  const [first] = chosen;
  if (first === undefined) throw new NotAStudy("Nothing was given: drop a study folder, or its CSV files.");
  const folder = first.webkitRelativePath.split("/")[0];
  const own = chosen.filter((file) => file.webkitRelativePath.split("/").length <= 2 && !isHidden(file.name));
  const name = folder || (own.length === 1 ? first.name.replace(/\.[^.]*$/, "") : "Dropped tables");
  return studyOf(name, await bytesByName(own));
}

const isFolder = (entry: FileSystemEntry): entry is FileSystemDirectoryEntry => entry.isDirectory;
const isFile = (entry: FileSystemEntry): entry is FileSystemFileEntry => entry.isFile;
const isHidden = (name: string) => name.startsWith(".");

const fileOf = (entry: FileSystemFileEntry) =>
  new Promise<File>((resolve, reject) => entry.file(resolve, reject));

async function filesIn(folder: FileSystemDirectoryEntry): Promise<ReadonlyMap<string, Uint8Array>> {
  const reader = folder.createReader();
  const files: File[] = [];
  for (;;) {
    // A reader hands out a hundred entries at a time, and none when it is done.
    const batch = await new Promise<FileSystemEntry[]>((resolve, reject) =>
      reader.readEntries(resolve, reject),
    );
    if (batch.length === 0) break;
    const own = batch.filter(isFile).filter(({ name }) => !isHidden(name));
    files.push(...(await Promise.all(own.map(fileOf))));
  }
  return bytesByName(files);
}

/** The bytes of files; one that is too large for a table is refused before it is read. */
async function bytesByName(files: readonly File[]): Promise<ReadonlyMap<string, Uint8Array>> {
  const tooLarge = files.find(({ size }) => size > MOST_BYTES);
  if (tooLarge !== undefined)
    throw new NotAStudy(
      `${tooLarge.name} is too large to read here: it has ${mebibytes(tooLarge.size)}, and a file may have at most ${mebibytes(MOST_BYTES)}. Part the table into several studies, or thin it out.`,
    );
  const entries = await Promise.all(
    files.map(async (file) => [file.name, new Uint8Array(await file.arrayBuffer())] as const),
  );
  return new Map(entries);
}
