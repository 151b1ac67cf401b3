import { parseNumber, withDecimalPoint } from "../cells.ts";
import type { Decimal } from "../model.ts";
import { editDistance } from "../nearest.ts";
import { parseName } from "../open-nomenclature.ts";
import { plainForm } from "./similar-names.ts";

/** Words shorter than this are so near to each other that a slip in one cannot be told. */
const shortestMended = 4;

const only = <T>(values: readonly T[]): T | undefined => (values.length === 1 ? values[0] : undefined);

/** The one known name that a written name is but for case, spaces, hyphens and diacritics. */
export function sameButForForm(written: string, known: Iterable<string>): string | undefined {
  const form = plainForm(written);
  return only([...known].filter((name) => plainForm(name) === form));
}

/** The one word of a list that is meant: the same but for its form, else the only one a letter away. */
export function onlyWord(written: string, words: readonly string[]): string | undefined {
  const same = sameButForForm(written, words);
  if (same !== undefined) return same;
  const plain = written.trim().toLowerCase();
  if (plain.length < shortestMended || plain.length > 2 * longestOf(words)) return undefined;
  return only(words.filter((word) => word.length >= shortestMended && editDistance(plain, word) === 1));
}

const longestOf = (words: readonly string[]) => Math.max(0, ...words.map(({ length }) => length));

/** 1,234 is 1.234 or 1234, and 1.234 too where commas are the rule: nobody but the person can say. */
const couldBeGrouped = /^[+-]?[1-9]\d{0,2}(?:[.,]\d{3})+$/;

interface NumberCell {
  readonly decimal: Decimal;
  /** True for the unit that the number is in already. */
  readonly isOwnUnit: (written: string) => boolean;
}

/** A number cell as it must have been meant: the file's own decimal sign, without the unit its column has already. */
export function onlyNumber(written: string, { decimal, isOwnUnit }: NumberCell): string | undefined {
  const parts = /^([+\-\u2212]?[\d.,]+)\s*(\D.*)?$/s.exec(written.trim());
  if (parts === null) return undefined;
  const [, digits, unit] = parts;
  if (unit !== undefined && !isOwnUnit(unit.trim())) return undefined;
  const isOwnSign = !digits.includes(decimal === "point" ? "," : ".");
  if (!isOwnSign && couldBeGrouped.test(digits.replace("\u2212", "-"))) return undefined;
  const number = isOwnSign
    ? digits
    : decimal === "point"
      ? digits.replace(",", ".")
      : digits.replace(".", ",");
  const pointed = decimal === "point" ? number : withDecimalPoint(number);
  if (number === written.trim()) return undefined;
  return pointed !== undefined && typeof parseNumber(pointed) === "number" ? number : undefined;
}

const signs = ["cf.", "aff.", "?", "ex gr.", "sp.", "spp.", "indet.", "sp. nov.", "s.l.", "s.s."];
const signsInFull = new Map([
  ["confer", "cf."],
  ["conf", "cf."],
  ["affinis", "aff."],
  ["affin", "aff."],
  ["indeterminate", "indet."],
  ["indeterminata", "indet."],
  ["species", "sp."],
]);

/** True for the content of a qualifier column that holds a sign of open nomenclature. */
export const isQualifier = (written: string): boolean =>
  parseName("Genus species", written).qualifier !== undefined;

const unpointed = (text: string) => text.toLowerCase().replace(/[\s.,;:()]+/g, "");

/** The one sign of open nomenclature that is meant: written in full, or with other points, case or spaces. */
export function onlyQualifier(written: string): string | undefined {
  const bare = unpointed(written);
  return signsInFull.get(bare) ?? only(signs.filter((sign) => unpointed(sign) === bare));
}
