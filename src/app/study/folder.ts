/** What the browser has to choose and write folders with; not every one does. */
interface FolderPicking {
  readonly showDirectoryPicker: (options: {
    readonly mode: "readwrite";
  }) => Promise<FileSystemDirectoryHandle>;
}

const hasPicking = (scope: object): scope is FolderPicking => "showDirectoryPicker" in scope;

export const canWriteFolders = (): boolean => hasPicking(globalThis);

/**
 * Writes files into a new folder inside the one that the person chooses, so that nothing is ever written over; its
 * name, or nothing where the person chose none.
 */
export async function writeFolder(
  name: string,
  files: () => Promise<ReadonlyMap<string, Uint8Array>>,
): Promise<string | undefined> {
  const chosen = await chosenFolder();
  if (chosen === undefined) return undefined;
  const own = await freeName(chosen, name.replaceAll(/[<>:"/\\|?*]/g, " ").trim() || "study");
  const content = await files();
  const folder = await chosen.getDirectoryHandle(own, { create: true });
  for (const [file, bytes] of content) {
    const writing = await (await folder.getFileHandle(file, { create: true })).createWritable();
    await writing.write(new Uint8Array(bytes));
    await writing.close();
  }
  return own;
}

async function chosenFolder(): Promise<FileSystemDirectoryHandle | undefined> {
  const scope: object = globalThis;
  if (!hasPicking(scope)) return undefined;
  try {
    return await scope.showDirectoryPicker({ mode: "readwrite" });
  } catch (error) {
    if (error instanceof DOMException && error.name === "AbortError") return undefined;
    throw error;
  }
}

async function freeName(folder: FileSystemDirectoryHandle, name: string): Promise<string> {
  for (let number = 1; ; number++) {
    const own = number === 1 ? name : `${name} ${number}`;
    if (!(await holds(folder, own))) return own;
  }
}

async function holds(folder: FileSystemDirectoryHandle, name: string): Promise<boolean> {
  for (const find of [() => folder.getDirectoryHandle(name), () => folder.getFileHandle(name)]) {
    if (
      await find().then(
        () => true,
        () => false,
      )
    )
      return true;
  }
  return false;
}
