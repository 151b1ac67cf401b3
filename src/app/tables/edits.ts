import type { SettingChange } from "../../core/study/changed-settings.ts";
import type { Sheet } from "../../core/study/model.ts";
import { putApostrophe } from "../../core/tables/apostrophes.ts";
import { baseName } from "../../core/tables/base-name.ts";
import { decodeBytes } from "../../core/tables/dialect/encoding.ts";
import { SETTINGS_FILE, withSettings } from "../study/chosen-settings.ts";
import { encodeText } from "./encode-text.ts";
import { guardedColumns, PACKAGE_FILE, packageWithNames } from "./package-file.ts";
import { type CsvPatch, patchCsv, type RowPatch } from "./patch-csv.ts";
import { type AddedRow, rowOrder } from "./row-order.ts";

/**
 * One change of a table, as data. Rows go by their number in the file that was given; added rows count on from there,
 * wherever they were put, and a row keeps its number whatever happens to others. A cell of a header's row is a column's
 * name.
 */
export type Edit =
  | {
      readonly kind: "cell";
      readonly file: string;
      readonly row: number;
      readonly column: number;
      /** Absent where what stood there was no readable cell. */
      readonly was?: string;
      readonly now: string;
    }
  | ({ readonly kind: "row-added"; readonly file: string } & AddedRow)
  | {
      readonly kind: "row-set-aside";
      readonly file: string;
      readonly row: number;
      readonly reason: string;
      /** The find that the row gave, where it was set aside on a plate: it stays drawn, open. */
      readonly find?: SetAsideFind;
    }
  | { readonly kind: "row-taken-back"; readonly file: string; readonly row: number }
  | ({ readonly kind: "setting"; readonly file: typeof SETTINGS_FILE } & SettingChange);

export interface SetAsideFind {
  readonly section: string;
  readonly taxon: string;
  readonly heightM: number;
  readonly sample?: string;
}

export const settingEdit = (change: SettingChange): Edit => ({
  kind: "setting",
  file: SETTINGS_FILE,
  ...change,
});

/** What the edits of one file come to. */
export interface TableEdits {
  readonly cells: ReadonlyMap<number, ReadonlyMap<number, string>>;
  readonly added: readonly AddedRow[];
  /** The reason for each row that is set aside. */
  readonly setAside: ReadonlyMap<number, string>;
}

export const NO_EDITS: TableEdits = { cells: new Map(), added: [], setAside: new Map() };

/** The edits of each file, in their order, as what they come to. */
export function editsByFile(edits: readonly Edit[]): ReadonlyMap<string, TableEdits> {
  const files = new Map<string, ReturnType<typeof gathered>>();
  for (const edit of edits) {
    if (edit.kind === "setting") continue;
    const own = files.get(edit.file) ?? gathered();
    files.set(edit.file, own);
    gather(own, edit);
  }
  return files;
}

const gathered = () => ({
  cells: new Map<number, Map<number, string>>(),
  added: [] as AddedRow[],
  setAside: new Map<number, string>(),
});

type TableEdit = Exclude<Edit, { readonly kind: "setting" }>;

function gather({ cells, added, setAside }: ReturnType<typeof gathered>, edit: TableEdit): void {
  switch (edit.kind) {
    case "cell": {
      const row = cells.get(edit.row) ?? new Map<number, string>();
      cells.set(edit.row, row.set(edit.column, edit.now));
      return;
    }
    case "row-added":
      added.push({ row: edit.row, above: edit.above });
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
  const guarded = guardedColumns(files);
  const renamed = forms.map((form) => ({
    file: form.file,
    names: renamedHeaders(form, byFile.get(form.file)),
  }));
  const settled = withSettings(
    files,
    edits.filter((edit) => edit.kind === "setting"),
  );
  return new Map(
    [...settled].map(([path, bytes]) => {
      const file = baseName(path);
      if (file === PACKAGE_FILE) return [path, packageWithNames(bytes, renamed)];
      const form = forms.find((form) => form.file === file);
      const own = byFile.get(file);
      if (form === undefined || own === undefined) return [path, bytes];
      const isGuarded = (column: number) => guarded.get(file)?.has(form.headers[column] ?? "") === true;
      return [path, editedBytes(bytes, form, tablePatch(own, form, { keepsRowNumbers, isGuarded }))];
    }),
  );
}

/** The names of columns as edits leave them. */
export const editedHeaders = (
  { headers, dialect }: TableForm,
  { cells }: Pick<TableEdits, "cells">,
): readonly string[] => {
  const names = cells.get(dialect.headerRows[0] ?? 0);
  return names === undefined ? headers : headers.map((header, column) => names.get(column) ?? header);
};

function renamedHeaders(form: TableForm, own: TableEdits | undefined): ReadonlyMap<string, string> {
  const now = own === undefined ? form.headers : editedHeaders(form, own);
  return new Map(
    form.headers.flatMap((header, column) => (now[column] === header ? [] : [[header, now[column] ?? ""]])),
  );
}

function editedBytes(bytes: Uint8Array, { dialect }: TableForm, patch: CsvPatch): Uint8Array {
  const { encoding, delimiter } = dialect;
  const decoded = decodeBytes(bytes, encoding);
  if (decoded === undefined || (patch.rows.size === 0 && patch.above?.size === 0)) return bytes;
  return encodeText(patchCsv(decoded.text, { ...patch, delimiter }), encoding, bytes);
}

interface PatchOptions extends Pick<ApplyOptions, "keepsRowNumbers"> {
  /** Whether the cells of a column carry an apostrophe before what starts a formula. */
  readonly isGuarded: (column: number) => boolean;
}

function tablePatch(
  { cells, added, setAside }: TableEdits,
  { headers, dialect }: TableForm,
  { keepsRowNumbers, isGuarded }: PatchOptions,
): CsvPatch {
  const order = rowOrder(added);
  const isHeader = new Set(dialect.headerRows);
  const written = (row: number, column: number, cell: string) =>
    isGuarded(column) && !isHeader.has(row) ? putApostrophe(cell) : cell;
  const whole = (row: number) => {
    const own = cells.get(row);
    const width = Math.max(headers.length, ...[...(own?.keys() ?? [])].map((column) => column + 1));
    return Array.from({ length: width }, (_, column) => written(row, column, own?.get(column) ?? ""));
  };
  const isAdded = new Set(added.map(({ row }) => row));
  const rows = new Map<number, RowPatch>();
  for (const [row, changed] of cells) {
    if (isAdded.has(row)) continue;
    const own = new Map([...changed].map(([column, cell]) => [column, written(row, column, cell)]));
    rows.set(row, { kind: "cells", cells: own });
  }
  for (const [at, row] of order.behind.entries())
    rows.set(order.last + 1 + at, { kind: "cells", cells: new Map(whole(row).entries()) });
  const gone: RowPatch = { kind: keepsRowNumbers ? "emptied" : "removed" };
  for (const row of setAside.keys()) {
    const behind = order.behind.indexOf(row);
    if (behind >= 0) rows.set(order.last + 1 + behind, gone);
    else if (!isAdded.has(row)) rows.set(row, gone);
  }
  const above = [...order.above].map(
    ([row, own]) =>
      [
        row,
        own
          .filter((id) => keepsRowNumbers || !setAside.has(id))
          .map((id) => (setAside.has(id) ? [] : whole(id))),
      ] as const,
  );
  return { rows, above: new Map(above) };
}
