import type { Sheet } from "../../core/study/model.ts";
import { tables } from "../../core/study/tables/index.ts";
import { needsApostrophe, putApostrophe } from "../../core/tables/apostrophes.ts";
import { baseName } from "../../core/tables/base-name.ts";
import { decodeText, readWrittenCsv } from "../../core/tables/csv.ts";
import {
  apostrophesProperty,
  type PackageResource,
  readDataPackage,
  tableResource,
  writeDataPackage,
} from "../../core/tables/data-package.ts";
import { decodeBytes } from "../../core/tables/dialect/encoding.ts";
import { writeCsv } from "../../core/tables/write-csv.ts";
import { blockText } from "./clipboard.ts";
import { applyEdits, type Edit, editsByFile, type TableForm } from "./edits.ts";
import { encodeText } from "./encode-text.ts";
import { patchCsv, type RowPatch, rowAt, unquoted } from "./patch-csv.ts";

const PACKAGE = "datapackage.json";
/** Goes along for people to read; as every README it is no table of the study. */
const SET_ASIDE = "README.set-aside.csv";

export interface GivingOut {
  readonly name: string;
  readonly forms: readonly (TableForm & Pick<Sheet, "table" | "rows" | "rowNumbers">)[];
}

/**
 * The study's files with the edits made and the rows set aside left out, as a data package. Texts that a spreadsheet
 * would run as a formula get an apostrophe, which the package records, so that reading takes it off again.
 */
export function filesGivenOut(
  files: ReadonlyMap<string, Uint8Array>,
  edits: readonly Edit[],
  { name, forms }: GivingOut,
): ReadonlyMap<string, Uint8Array> {
  const edited = applyEdits(files, edits, { forms, keepsRowNumbers: false });
  const described = decodeText(
    [...files].find(([path]) => baseName(path) === PACKAGE)?.[1] ?? new Uint8Array(),
  );
  const before = readDataPackage(described ?? "")?.apostrophes ?? new Map();
  const written = new Map<string, Uint8Array>();
  const resources: PackageResource[] = [];
  for (const [path, bytes] of edited) {
    const file = baseName(path);
    const form = forms.find((form) => form.file === file);
    if (form === undefined) {
      written.set(file, bytes);
      continue;
    }
    const own = guardedTable(bytes, form, before.get(file) ?? new Set());
    const to = /\.(?:csv|tsv|tab|txt)$/i.test(file) ? file : `${form.table}.csv`;
    written.set(to, own.bytes);
    resources.push(
      ...tables.filter(({ name }) => name === form.table).map((t) => tableResource(t, own.guarded, to)),
    );
  }
  const aside = setAsideText(edited, edits, forms);
  if (aside !== undefined) written.set(SET_ASIDE, new TextEncoder().encode(aside));
  written.set(PACKAGE, new TextEncoder().encode(packageText(name, resources, described)));
  return written;
}

/** The rows that were set aside, now and before, with their reasons and what stood in them; undefined where there are none. */
function setAsideText(
  files: ReadonlyMap<string, Uint8Array>,
  edits: readonly Edit[],
  forms: GivingOut["forms"],
): string | undefined {
  const earlier = [...files].find(([path]) => baseName(path) === SET_ASIDE)?.[1];
  const before = earlier === undefined ? [] : readWrittenCsv(decodeText(earlier) ?? "").rows;
  const now = [...editsByFile(edits)].flatMap(([file, { setAside, cells }]) => {
    const form = forms.find((form) => form.file === file);
    return [...setAside].map(([row, reason]) => {
      const read = form?.rows[form.rowNumbers.indexOf(row)] ?? [];
      const own = form?.headers.map((_, column) => cells.get(row)?.get(column) ?? read[column] ?? "") ?? [];
      return [file, String(row), reason, blockText([own])];
    });
  });
  if (now.length === 0) return undefined;
  return writeCsv(["file", "row", "reason", "cells"], [...before, ...now]).text;
}

/** A table's bytes with apostrophes where they are needed, and the headers of the columns that have some. */
function guardedTable(bytes: Uint8Array, { headers, dialect }: TableForm, before: ReadonlySet<string>) {
  const text = decodeBytes(bytes, dialect.encoding)?.text;
  if (text === undefined) return { bytes, guarded: [] };
  const patches = new Map<number, RowPatch>();
  const guarded = new Set(before);
  let from = 0;
  for (let row = 1; from < text.length; row++) {
    const { spans, next } = rowAt(text, from, dialect.delimiter);
    from = next;
    if (row < (dialect.headerRows[0] ?? 1)) continue;
    const cells = new Map<number, string>();
    for (const [column, header] of headers.entries()) {
      const cell = unquoted(text.slice(spans[2 * column] ?? 0, spans[2 * column + 1] ?? 0));
      if (!needsGuard(cell, dialect.decimal, before.has(header))) continue;
      cells.set(column, putApostrophe(cell));
      guarded.add(header);
    }
    if (cells.size > 0) patches.set(row, { kind: "cells", cells });
  }
  const patched =
    patches.size === 0
      ? bytes
      : encodeText(patchCsv(text, patches, dialect.delimiter), dialect.encoding, bytes);
  return { bytes: patched, guarded: headers.filter((header) => guarded.has(header)) };
}

const isCommaNumber = /^[+-]?(?:\d+,?\d*|,\d+)(?:[eE][+-]?\d+)?$/;

/** In a column that is guarded already, an apostrophe that stands there is the one of the writing before. */
function needsGuard(cell: string, decimal: "point" | "comma", isGuarded: boolean): boolean {
  if (!needsApostrophe(cell) || (isGuarded && cell.startsWith("'"))) return false;
  return decimal === "point" || !isCommaNumber.test(cell);
}

/** The data package as it was described, with the apostrophes of now; a new one where there was none. */
function packageText(
  name: string,
  resources: readonly PackageResource[],
  described: string | undefined,
): string {
  const fresh = writeDataPackage(name, resources);
  const before = parsed(described ?? "");
  const own = parsed(fresh);
  if (before === undefined || own === undefined) return fresh;
  const now = new Map(own.resources.map((resource) => [fileOf(resource), resource]));
  const known = before.resources.map((resource) => {
    const guarded = now.get(fileOf(resource))?.[apostrophesProperty];
    return guarded === undefined ? resource : { ...resource, [apostrophesProperty]: guarded };
  });
  const knownFiles = new Set(known.map(fileOf));
  const added = own.resources.filter((resource) => !knownFiles.has(fileOf(resource)));
  return `${JSON.stringify({ ...before, resources: [...known, ...added] }, null, 2)}\n`;
}

const fileOf = ({ path }: PackageJson["resources"][number]): string =>
  typeof path === "string" ? baseName(path) : "";

interface PackageJson {
  readonly resources: readonly Readonly<Record<string, unknown>>[];
}

function parsed(text: string): PackageJson | undefined {
  if (readDataPackage(text) === undefined) return undefined;
  const value: PackageJson = JSON.parse(text);
  return Array.isArray(value.resources) ? value : undefined;
}
