import { excerpt, type ProblemCode } from "./problem-wordings.ts";
import type { ColumnDeclaration } from "./tables/declare.ts";

type CellValue = string | number | boolean | undefined;

/** A cell's value, or the code of what is wrong with it and what the wording needs. */
export type ParsedCell =
  | { readonly value: CellValue }
  | { readonly code: ProblemCode; readonly detail?: string };

/** No section reaches further from its zero, in any unit (the Earth's radius is 6.4e9 mm). */
const largestPosition = 1e10;

const decimal = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?$/;
const notFinite = /^[+-]?(?:nan|inf|infinity)$/i;
const missing = new Set(["", "na", "NA", "n/a", "N/A"]);
const yes = new Set(["yes", "y", "true", "1", "x"]);
const no = new Set(["no", "n", "false", "0"]);

/** Reads a number written with a decimal point; a Unicode minus is a minus. */
export function parseNumber(text: string): number | "not-a-number" | "not-finite" {
  const plain = text.trim().replaceAll("\u2212", "-");
  if (notFinite.test(plain)) return "not-finite";
  if (!decimal.test(plain)) return "not-a-number";
  const value = Number(plain);
  return Number.isFinite(value) ? value : "not-finite";
}

const numeric = /^[\s<>≤≥=+\-\u2212\d,.eEuU]*$/;

/** A cell of a file with decimal commas, with decimal points; undefined where it holds a decimal point already. */
export function withDecimalPoint(text: string): string | undefined {
  if (!numeric.test(text)) return text;
  return /(?<!\.)\.(?!\.)/.test(text) ? undefined : text.replaceAll(",", ".");
}

/** Reads one cell as its column's declaration says. Blank is undefined. */
export function parseCell(text: string, column: ColumnDeclaration): ParsedCell {
  const cell = text.trim();
  if (column.type === "text") return { value: cell === "" ? undefined : cell.normalize("NFC") };
  if (missing.has(cell)) return { value: undefined };
  switch (column.type) {
    case "number":
    case "integer":
      return parseNumberCell(cell, column);
    case "enum":
      return parseWord(cell, column.values ?? []);
    case "boolean":
      return parseYesNo(cell);
    default:
      return column.type satisfies never;
  }
}

function parseNumberCell(cell: string, column: ColumnDeclaration): ParsedCell {
  const value = parseNumber(cell);
  if (typeof value === "string") return { code: value };
  if (column.type === "integer" && !Number.isInteger(value)) return { code: "not-an-integer" };
  const { minimum, maximum } = column;
  if (minimum !== undefined && value < minimum) return { code: "out-of-limits", detail: limits(column) };
  if (maximum !== undefined && value > maximum) return { code: "out-of-limits", detail: limits(column) };
  if (column.unit === "section" && Math.abs(value) > largestPosition) {
    return { code: "out-of-limits", detail: `within ${largestPosition} of zero` };
  }
  return { value: value === 0 ? 0 : value };
}

function limits({ minimum, maximum }: ColumnDeclaration): string {
  if (minimum !== undefined && maximum !== undefined) return `from ${minimum} to ${maximum}`;
  return minimum === undefined ? `of at most ${maximum}` : `of at least ${minimum}`;
}

function parseWord(cell: string, words: readonly string[]): ParsedCell {
  const plain = cell.toLowerCase();
  const word = words.find((word) => word === plain);
  return word === undefined ? { code: "not-in-list", detail: words.join(", ") } : { value: word };
}

function parseYesNo(cell: string): ParsedCell {
  const plain = cell.toLowerCase();
  if (yes.has(plain)) return { value: true };
  return no.has(plain) ? { value: false } : { code: "not-yes-or-no", detail: excerpt(cell) };
}
