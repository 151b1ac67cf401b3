import type { CodeMeaning } from "../../study/recognised.ts";

/** What a cell of a wide sheet says of its taxon in its sample. */
export type WideCell =
  | { readonly kind: "blank" }
  | { readonly kind: "not-found" }
  | { readonly kind: "not-searched" }
  | {
      readonly kind: "found";
      /** A number as written, with a decimal point. */
      readonly number?: string;
      /** A letter of a scale. */
      readonly code?: string;
      readonly qualifier?: string;
      readonly isDoubtful?: boolean;
      readonly isReworked?: boolean;
    }
  /** A code that nothing explains. */
  | { readonly kind: "unknown"; readonly code: string }
  /** Too long or too odd to be a code. */
  | { readonly kind: "text" };

const presence = /^(?:[xX+*×•●■✓✔]|present)$/u;
const absence = /^(?:0|0[.,]0*|[-\u2212–—]|absent|not found)$/iu;
/** `nd` is none of these: it can mean not determined or not detected. */
const unsearched = /^(?:n\/a|na|n\.a\.|ns|not searched|not examined)$/iu;
const number = /^\d+(?:[.,]\d+)?$/;
const code = /^[\p{L}]{1,4}\.?$/u;
const qualifiers = /(?:^|\s)(cf\.?|aff\.?)(?=\s|$|\d)/i;

/** Reads a cell: numbers, the usual signs, and what is told of codes. */
export function wideCell(text: string, codes: ReadonlyMap<string, CodeMeaning>): WideCell {
  const cell = text.trim();
  if (cell === "") return { kind: "blank" };
  const told = codes.get(cell);
  if (told !== undefined) return meant(cell, told);
  if (absence.test(cell)) return { kind: "not-found" };
  if (unsearched.test(cell)) return { kind: "not-searched" };
  const [, written] = qualifiers.exec(cell) ?? [];
  const rest = (written === undefined ? cell : cell.replace(written, "")).replaceAll("?", "").trim();
  const marks = {
    ...(written === undefined ? {} : { qualifier: written.replace(/\.?$/, ".").toLowerCase() }),
    ...(cell.includes("?") ? { isDoubtful: true } : {}),
  };
  if (rest === "" || presence.test(rest)) return { kind: "found", ...marks };
  if (number.test(rest)) return { kind: "found", number: rest.replace(",", "."), ...marks };
  const restTold = codes.get(rest);
  if (restTold !== undefined) return { ...meant(rest, restTold), ...marks };
  return code.test(rest) ? { kind: "unknown", code: rest } : { kind: "text" };
}

function meant(code: string, meaning: CodeMeaning): WideCell {
  switch (meaning) {
    case "found":
      return { kind: "found", ...(presence.test(code) ? {} : { code }) };
    case "doubtful":
      return { kind: "found", isDoubtful: true };
    case "reworked":
      return { kind: "found", isReworked: true };
    case "not-found":
    case "not-searched":
      return { kind: meaning };
    default:
      return meaning satisfies never;
  }
}

const noCodes: ReadonlyMap<string, CodeMeaning> = new Map();

/** True where the cells can be those of a taxon; a few that cannot are mistakes. */
export function areTaxonCells(cells: readonly string[]): boolean {
  const filled = cells.filter((cell) => cell.trim() !== "");
  const odd = filled.filter((cell) => wideCell(cell, noCodes).kind === "text").length;
  return odd === 0 || (filled.length >= 5 && odd / filled.length <= 0.1);
}
