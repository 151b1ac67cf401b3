import { type DBSchema, type IDBPDatabase, openDB } from "idb";
import type { GivenStudy } from "../study/given-study.ts";
import type { History } from "../tables/history.ts";

interface KeptFiles {
  readonly key: string;
  readonly name: string;
  readonly files: ReadonlyMap<string, Uint8Array>;
}

interface KeptHistory {
  readonly key: string;
  readonly name: string;
  readonly history: History;
  /** When it was last written, in milliseconds since 1970. */
  readonly at: number;
}

/** What a study's tables were at one time, under a name. */
export interface Snapshot {
  readonly id?: number;
  readonly key: string;
  readonly name: string;
  readonly history: History;
  readonly at: number;
}

interface Kept extends DBSchema {
  files: { key: string; value: KeptFiles };
  histories: { key: string; value: KeptHistory };
  snapshots: { key: number; value: Snapshot; indexes: { byStudy: string } };
}

export type KeptName = Omit<KeptHistory, "history">;

let opened: Promise<IDBPDatabase<Kept>> | undefined;

/** This browser's own database of the page's address: nothing in it leaves the machine. */
function database(): Promise<IDBPDatabase<Kept>> {
  opened ??= openDB<Kept>("lastbed", 1, {
    upgrade(created) {
      created.createObjectStore("files", { keyPath: "key" });
      created.createObjectStore("histories", { keyPath: "key" });
      created
        .createObjectStore("snapshots", { keyPath: "id", autoIncrement: true })
        .createIndex("byStudy", "key");
    },
  });
  return opened;
}

/** A name for the study that only the very same files have; undefined where the browser cannot make one. */
export async function studyKey({ name, files }: GivenStudy): Promise<string | undefined> {
  // Only a page of this machine or of a safe connection has it.
  if (!isSecureContext) return undefined;
  const digests = await Promise.all(
    [...files]
      .toSorted(([a], [b]) => (a < b ? -1 : 1))
      .map(async ([path, bytes]) => `${path} ${await digest(new Uint8Array(bytes))}`),
  );
  return digest(new TextEncoder().encode([name, ...digests].join("\n")));
}

async function digest(bytes: Uint8Array<ArrayBuffer>): Promise<string> {
  const hash = await crypto.subtle.digest("SHA-256", bytes);
  return [...new Uint8Array(hash)].map((byte) => byte.toString(16).padStart(2, "0")).join("");
}

export async function keptHistory(key: string): Promise<History | undefined> {
  return (await (await database()).get("histories", key))?.history;
}

/** Writes files and edits in one go: whatever breaks off, what was kept before stays whole. */
export async function keep(
  key: string,
  { name, files, isSettled = false }: GivenStudy,
  history: History,
): Promise<number> {
  const at = Date.now();
  const writing = (await database()).transaction(["files", "histories"], "readwrite");
  const hasFiles = !isSettled && (await writing.objectStore("files").getKey(key)) !== undefined;
  await Promise.all([
    hasFiles ? undefined : writing.objectStore("files").put({ key, name, files }),
    writing.objectStore("histories").put({ key, name, history, at }),
    writing.done,
  ]);
  return at;
}

/** The kept studies, the last one worked on first. */
export async function keptNames(): Promise<readonly KeptName[]> {
  const all = await (await database()).getAll("histories");
  return all.map(({ key, name, at }) => ({ key, name, at })).toSorted((a, b) => b.at - a.at);
}

export async function keptStudy(key: string): Promise<GivenStudy> {
  const kept = await (await database()).get("files", key);
  if (kept === undefined) throw new Error("keptStudy: expected a study that is kept in this browser");
  return { name: kept.name, files: kept.files, key };
}

/** The files of a study as they are kept, with the settings chosen here. */
export async function keptFiles(key: string): Promise<GivenStudy["files"] | undefined> {
  return (await (await database()).get("files", key))?.files;
}

/** Takes a study, its edits and its snapshots out of the database. */
export async function forget(key: string): Promise<void> {
  const writing = (await database()).transaction(["files", "histories", "snapshots"], "readwrite");
  const snapshots = await writing.objectStore("snapshots").index("byStudy").getAllKeys(key);
  await Promise.all([
    writing.objectStore("files").delete(key),
    writing.objectStore("histories").delete(key),
    ...snapshots.map((id) => writing.objectStore("snapshots").delete(id)),
    writing.done,
  ]);
}

export async function snapshotsOf(key: string): Promise<readonly Snapshot[]> {
  const all = await (await database()).getAllFromIndex("snapshots", "byStudy", key);
  return all.toReversed();
}

export async function keepSnapshot(snapshot: Omit<Snapshot, "at" | "id">): Promise<void> {
  await (await database()).add("snapshots", { ...snapshot, at: Date.now() });
}

export async function removeSnapshot(id: number): Promise<void> {
  await (await database()).delete("snapshots", id);
}
