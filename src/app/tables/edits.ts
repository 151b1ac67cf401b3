import type { Sheet } from "../../core/study/model.ts";
import { baseName } from "../../core/tables/base-name.ts";
import { decodeBytes } from "../../core/tables/dialect/encoding.ts";
import { encodeText } from "./encode-text.ts";
import { patchCsv, type RowPatch } from "./patch-csv.ts";

/**
 * One change of a table, as data. Rows go by the number a spreadsheet shows for them in the file that was given; added
 * rows count on from there, and a row keeps its number when others are set aside.
 */
export type Edit =
  | {
      readonly kind: "cell";
      readonly file: string;
      readonly row: number;
      readonly column: number;
      readonly was: string;
      readonly now: string;
    }
  | { readonly kind: "row-added"; readonly file: string; readonly row: number }
  | { readonly kind: "row-set-aside"; readonly file: string; readonly row: number; readonly reason: string }
  | { readonly kind: "row-taken-back"; readonly file: string; readonly row: number };

/** What the edits of one file come to. */
export interface TableEdits {
  readonly cells: ReadonlyMap<number, ReadonlyMap<number, string>>;
  readonly added: readonly number[];
  /** The reason for each row that is set aside. */
  readonly setAside: ReadonlyMap<number, string>;
}

export const NO_EDITS: TableEdits = { cells: new Map(), added: [], setAside: new Map() };

/** The edits of each file, in their order, as what they come to. */
export function editsByFile(edits: readonly Edit[]): ReadonlyMap<string, TableEdits> {
  const files = new Map<string, ReturnType<typeof gathered>>();
  for (const edit of edits) {
    const own = files.get(edit.file) ?? gathered();
    files.set(edit.file, own);
    gather(own, edit);
  }
  return files;
}

const gathered = () => ({
  cells: new Map<number, Map<number, string>>(),
  added: [] as number[],
  setAside: new Map<number, string>(),
});

function gather({ cells, added, setAside }: ReturnType<typeof gathered>, edit: Edit): void {
  switch (edit.kind) {
    case "cell": {
      const row = cells.get(edit.row) ?? new Map<number, string>();
      cells.set(edit.row, row.set(edit.column, edit.now));
      return;
    }
    case "row-added":
      added.push(edit.row);
      return;
    case "row-set-aside":
      setAside.set(edit.row, edit.reason);
      return;
    case "row-taken-back":
      setAside.delete(edit.row);
      return;
    default:
      edit satisfies never;
  }
}

/** How a table's file is written: what an edit of it must keep. */
export type TableForm = Pick<Sheet, "file" | "headers" | "dialect">;

export interface ApplyOptions {
  /** The form of each table among the files. */
  readonly forms: readonly TableForm[];
  /** Whether the place of a row that is set aside stays empty, so that row numbers hold; else it closes. */
  readonly keepsRowNumbers: boolean;
}

/** The files with the edits made. What no edit touches keeps every byte. */
export function applyEdits(
  files: ReadonlyMap<string, Uint8Array>,
  edits: readonly Edit[],
  { forms, keepsRowNumbers }: ApplyOptions,
): ReadonlyMap<string, Uint8Array> {
  const byFile = editsByFile(edits);
  return new Map(
    [...files].map(([path, bytes]) => {
      const file = baseName(path);
      const form = forms.find((form) => form.file === file);
      const own = byFile.get(file);
      if (form === undefined || own === undefined) return [path, bytes];
      return [path, editedBytes(bytes, form, rowPatches(own, form, keepsRowNumbers))];
    }),
  );
}

function editedBytes(
  bytes: Uint8Array,
  { dialect }: TableForm,
  patches: ReadonlyMap<number, RowPatch>,
): Uint8Array {
  const { encoding, delimiter } = dialect;
  const decoded = decodeBytes(bytes, encoding);
  if (decoded === undefined || patches.size === 0) return bytes;
  return encodeText(patchCsv(decoded.text, patches, delimiter), encoding, bytes);
}

function rowPatches(
  { cells, added, setAside }: TableEdits,
  { headers }: TableForm,
  keepsRowNumbers: boolean,
): ReadonlyMap<number, RowPatch> {
  const patches = new Map<number, RowPatch>();
  for (const row of added)
    patches.set(row, { kind: "cells", cells: new Map(headers.map((_, column) => [column, ""])) });
  for (const [row, changed] of cells) {
    const before = patches.get(row);
    const blank = before?.kind === "cells" ? before.cells : [];
    patches.set(row, { kind: "cells", cells: new Map([...blank, ...changed]) });
  }
  for (const row of setAside.keys()) patches.set(row, { kind: keepsRowNumbers ? "emptied" : "removed" });
  return patches;
}
