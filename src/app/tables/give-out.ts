import type { Sheet } from "../../core/study/model.ts";
import { tables } from "../../core/study/tables/index.ts";
import { needsApostrophe, putApostrophe, takeOffApostrophe } from "../../core/tables/apostrophes.ts";
import { baseName } from "../../core/tables/base-name.ts";
import { decodeText, readWrittenCsv } from "../../core/tables/csv.ts";
import { type PackageResource, tableResource } from "../../core/tables/data-package.ts";
import { decodeBytes } from "../../core/tables/dialect/encoding.ts";
import { packWorkbook } from "../../core/tables/sources/pack-workbook.ts";
import { writeCsv } from "../../core/tables/write-csv.ts";
import { blockText } from "./clipboard.ts";
import { applyEdits, type Edit, editedHeaders, editsByFile, NO_EDITS, type TableForm } from "./edits.ts";
import { encodeText } from "./encode-text.ts";
import { guardedColumns, PACKAGE_FILE, packageIn, packageText } from "./package-file.ts";
import { patchCsv, type RowPatch, rowsOf } from "./patch-csv.ts";
import { rowNumbering } from "./row-order.ts";

/** Goes along for people to read; as every README it is no table of the study. */
const SET_ASIDE = "README.set-aside.csv";

export type GivenForm = TableForm & Pick<Sheet, "columns"> & Partial<Pick<Sheet, "table">>;

export interface GivingOut {
  readonly name: string;
  readonly forms: readonly GivenForm[];
}

type Files = ReadonlyMap<string, Uint8Array>;

/**
 * The study's files with the edits made and the rows set aside left out, as a data package. Texts that a spreadsheet
 * would run as a formula get an apostrophe, which the package records, so that reading takes it off again.
 */
export function filesGivenOut(files: Files, edits: readonly Edit[], { name, forms }: GivingOut): Files {
  const { edited, formOf } = editedFiles(files, edits, forms);
  const before = guardedColumns(edited);
  const written = new Map<string, Uint8Array>();
  const resources: PackageResource[] = [];
  for (const [path, bytes] of edited) {
    const file = baseName(path);
    const form = formOf(file);
    if (form === undefined) {
      written.set(file, bytes);
      continue;
    }
    const own = guardedTable(bytes, form, before.get(file) ?? new Set());
    const to = nameGivenOut(form);
    written.set(to, own.bytes);
    resources.push(
      ...tables.filter(({ name }) => name === form.table).map((t) => tableResource(t, own.guarded, to)),
    );
  }
  const aside = setAsideText(files, edits, forms);
  if (aside !== undefined) written.set(SET_ASIDE, new TextEncoder().encode(aside));
  written.set(PACKAGE_FILE, new TextEncoder().encode(packageText(name, resources, packageIn(edited))));
  return written;
}

function editedFiles(files: Files, edits: readonly Edit[], forms: readonly GivenForm[]) {
  const byFile = editsByFile(edits);
  const now = forms.map((form) => ({
    ...form,
    headers: editedHeaders(form, byFile.get(form.file) ?? NO_EDITS),
  }));
  const edited = applyEdits(files, edits, { forms, keepsRowNumbers: false });
  return { edited, formOf: (file: string) => now.find((form) => form.file === file) };
}

/** A table's own file name; a sheet of a workbook goes by the table that it holds. */
const nameGivenOut = ({ file, table }: GivenForm): string =>
  /\.(?:csv|tsv|tab|txt)$/i.test(file) ? file : `${table ?? file.replace(/^.*\[|\]$/g, "")}.csv`;

export interface TableGivenOut {
  readonly name: string;
  readonly bytes: Uint8Array;
  /** Cells that a spreadsheet would run as a formula. */
  readonly formulas: number;
}

/**
 * One table alone, with the edits made. No package goes with it that could record apostrophes, so it has none: it reads
 * back to the same cells.
 */
export function tableGivenOut(
  files: Files,
  edits: readonly Edit[],
  { file, forms }: Pick<GivingOut, "forms"> & { readonly file: string },
): TableGivenOut | undefined {
  const { edited, formOf } = editedFiles(files, edits, forms);
  const form = formOf(file);
  const given = [...edited].find(([path]) => baseName(path) === file)?.[1];
  if (form === undefined || given === undefined) return undefined;
  const guarded = guardedColumns(edited).get(file) ?? new Set();
  let formulas = 0;
  const bytes = withCells(given, form, (cell, header) => {
    const plain = guarded.has(header) ? takeOffApostrophe(cell) : cell;
    if (isFormula(plain, form.dialect.decimal)) formulas += 1;
    return plain;
  });
  return { name: nameGivenOut(form), bytes, formulas };
}

/** Every table with the edits made, as a workbook of a sheet each. */
export function workbookGivenOut(files: Files, edits: readonly Edit[], { forms }: GivingOut): Uint8Array {
  const { edited, formOf } = editedFiles(files, edits, forms);
  return packWorkbook(
    edited,
    forms.flatMap(({ file }) => formOf(file) ?? []),
  );
}

const isFormula = (cell: string, decimal: "point" | "comma"): boolean =>
  !cell.startsWith("'") && needsGuard(cell, decimal, false);

/** The rows that were set aside, now and before, with their reasons and what stood in them; undefined where there are none. */
function setAsideText(files: Files, edits: readonly Edit[], forms: GivingOut["forms"]): string | undefined {
  const earlier = [...files].find(([path]) => baseName(path) === SET_ASIDE)?.[1];
  const before = earlier === undefined ? [] : readWrittenCsv(decodeText(earlier) ?? "").rows;
  const now = [...editsByFile(edits)].flatMap(([file, { setAside, cells, added }]) => {
    const form = forms.find((form) => form.file === file);
    const bytes = [...files].find(([path]) => baseName(path) === file)?.[1];
    if (form === undefined || bytes === undefined || setAside.size === 0) return [];
    const { shown } = rowNumbering(added);
    const given = cellsOfRows(bytes, form, setAside);
    return [...setAside].map(([row, reason]) => {
      const own = form.headers.map((_, at) => cells.get(row)?.get(at) ?? given.get(row)?.[at] ?? "");
      return [file, String(shown(row)), reason, blockText([own])];
    });
  });
  if (now.length === 0) return undefined;
  return writeCsv(["file", "row", "reason", "cells"], [...before, ...now]).text;
}

function cellsOfRows(bytes: Uint8Array, { dialect }: TableForm, wanted: ReadonlyMap<number, unknown>) {
  const text = decodeBytes(bytes, dialect.encoding)?.text ?? "";
  const found = new Map<number, readonly string[]>();
  for (const { row, cells } of rowsOf(text, dialect.delimiter)) if (wanted.has(row)) found.set(row, cells);
  return found;
}

/** A table's bytes with apostrophes where they are needed, and the headers of the columns that have some. */
function guardedTable(bytes: Uint8Array, form: TableForm, before: ReadonlySet<string>) {
  const guarded = new Set(before);
  const patched = withCells(bytes, form, (cell, header) => {
    if (!needsGuard(cell, form.dialect.decimal, before.has(header))) return cell;
    guarded.add(header);
    return putApostrophe(cell);
  });
  return { bytes: patched, guarded: form.headers.filter((header) => guarded.has(header)) };
}

/** A table's bytes with each cell from the header on written as it is told; the very same where none changes. */
function withCells(
  bytes: Uint8Array,
  { headers, dialect }: TableForm,
  write: (cell: string, header: string) => string,
): Uint8Array {
  const { encoding, delimiter, headerRows } = dialect;
  const text = decodeBytes(bytes, encoding)?.text;
  if (text === undefined) return bytes;
  const rows = new Map<number, RowPatch>();
  for (const { row, cells, malformed } of rowsOf(text, delimiter)) {
    if (row < (headerRows[0] ?? 1)) continue;
    const changed = new Map<number, string>();
    for (const [column, header] of headers.entries()) {
      const cell = cells[column] ?? "";
      const now = malformed.includes(column) ? cell : write(cell, header);
      if (now !== cell) changed.set(column, now);
    }
    if (changed.size > 0) rows.set(row, { kind: "cells", cells: changed });
  }
  return rows.size === 0 ? bytes : encodeText(patchCsv(text, { rows, delimiter }), encoding, bytes);
}

const isCommaNumber = /^[+-]?(?:\d+,?\d*|,\d+)(?:[eE][+-]?\d+)?$/;

/** In a column that is guarded already, an apostrophe that stands there is the one of the writing before. */
function needsGuard(cell: string, decimal: "point" | "comma", isGuarded: boolean): boolean {
  if (!needsApostrophe(cell) || (isGuarded && cell.startsWith("'"))) return false;
  return decimal === "point" || !isCommaNumber.test(cell);
}
