import type { Qualifier } from "./model.ts";

/** A name taken apart by its signs of open nomenclature. */
export interface ParsedName {
  /** The clean name; names that are labels of their own (sp. A, quoted names) with their sign. */
  readonly name: string;
  readonly qualifier?: Qualifier;
  readonly rank: "species" | "subspecies" | "above-species";
}

const signs: readonly (readonly [RegExp, string])[] = [
  [/^c\.?\s?f\.?$/i, "cf."],
  [/^aff\.?$/i, "aff."],
  [/^(?:ex\.?gr\.?|exgr\.?|gr\.?)$/i, "ex gr."],
  [/^(?:nov|n)\.?\s?sp\.?$/i, "sp. nov."],
  [/^spp\.?$/i, "spp."],
  [/^sp\.?$/i, "sp."],
  [/^indet\.?$/i, "indet."],
  [/^s\.?\s?l\.?$/, "s.l."],
  [/^s\.?\s?s\.?$/, "s.s."],
];

/** Signs of two words written as one, so that words can be looked at one by one. */
const joined = (text: string): string =>
  text
    .replace(/\bex\.?\s+gr\b\.?/gi, "ex.gr.")
    .replace(/\b(?:sp\.?\s*nov\b\.?|nov\.?\s+sp\b\.?|n\.\s*sp\b\.?)/gi, "n.sp.")
    .replace(/\bsensu\s+lato\b|\bs\.\s+l\./gi, "s.l.")
    .replace(/\bsensu\s+stricto\b|\bs\.\s+s\.|\bs\.\s*str\.?/gi, "s.s.")
    .replace(/\bc\.\s?f\./gi, "cf.");

const signOf = (word: string): string | undefined => signs.find(([form]) => form.test(word))?.[1];

interface Words {
  readonly plain: string[];
  sign?: string;
  /** The number of plain words before the sign; of a question mark, before the word it doubts. */
  at: number;
}

/** Parts the words of a name from the first sign; a question mark doubts the word it touches, else the next. */
function wordsOf(text: string): Words {
  const words: Words = { plain: [], at: 0 };
  for (const word of joined(text).split(/\s+/).filter(Boolean)) {
    const sign = signOf(word);
    const isQuestioned = /^\?|\?$|\(\?\)$/.test(word);
    const plain = word.replace(/^\?+|\(\?\)$|\?+$/g, "");
    if (words.sign === undefined && (sign !== undefined || isQuestioned)) {
      words.sign = sign ?? "?";
      words.at = words.plain.length;
      if (sign === undefined && plain !== "") words.plain.push(plain);
    } else if (sign === undefined && plain !== "") words.plain.push(plain);
  }
  return words;
}

function rankOf(plain: readonly string[]): ParsedName["rank"] {
  const epithets = plain.slice(1).filter((word) => /^\p{Ll}/u.test(word)).length;
  if (epithets === 0) return "above-species";
  return epithets === 1 ? "species" : "subspecies";
}

/**
 * Parts a name as written into the clean name and its sign of open nomenclature, after the usage of Bengtson 1988
 * (Palaeontology 31:223-227) and Sigovini et al. 2016 (doi:10.1111/2041-210X.12594). `qualifierCell` is the content of
 * a qualifier column ("cf.", or "cf. epithet" as in Darwin Core), used where the name itself carries no sign.
 */
export function parseName(text: string, qualifierCell = ""): ParsedName {
  const written = text.trim().normalize("NFC").replace(/\s+/g, " ");
  if (/["“”«»]/.test(written)) return { name: written, rank: "species" };
  const own = wordsOf(written);
  const words =
    own.sign === undefined && qualifierCell.trim() !== "" ? withQualifier(own, qualifierCell) : own;
  return named(words, written);
}

function withQualifier(own: Words, qualifierCell: string): Words {
  const cell = wordsOf(qualifierCell.trim());
  if (cell.sign === undefined) return own;
  const isRepeated = cell.plain.every((word) => own.plain.includes(word));
  const plain = isRepeated ? own.plain : [...own.plain, ...cell.plain];
  return { plain, sign: cell.sign, at: Math.max(plain.length, 2) };
}

function named({ plain, sign, at }: Words, written: string): ParsedName {
  const name = plain.join(" ");
  const rank = rankOf(plain);
  switch (sign) {
    case undefined:
      return { name: name || written, rank };
    case "cf.":
    case "aff.":
      return name === "" ? { name: written, rank } : { name, qualifier: sign, rank };
    case "?":
      if (name === "") return { name: written, rank };
      return { name, qualifier: at === 0 && rank !== "above-species" ? "? genus" : "?", rank };
    case "sp.":
      return plain.length > at
        ? { name: [...plain.slice(0, at), "sp.", ...plain.slice(at)].join(" "), rank: "species" }
        : { name: name || written, qualifier: sign, rank: "above-species" };
    case "sp. nov.":
      return { name: name || written, qualifier: sign, rank: "species" };
    case "ex gr.":
    case "spp.":
    case "indet.":
    case "s.l.":
    case "s.s.":
      return { name: name || written, qualifier: sign, rank };
    default:
      return { name: written, rank };
  }
}
