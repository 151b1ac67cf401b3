/** Two names that may be meant as one. */
export interface SimilarPair {
  readonly first: string;
  readonly second: string;
}

/** Beyond this many distinct names only those equal but for their form are sought. */
const mostByLetter = 10_000;

const longestWord = 40;

/**
 * A name without case, diacritics, spaces, underscores and hyphens; between two digits they part numbers, so one is kept
 * there (1-11 is not 11-1).
 */
export const plainForm = (name: string): string =>
  unaccented(name)
    .replace(/(?<=\d)[\s_\p{Pd}]+(?=\d)/gu, "|")
    .replace(/[\s_\p{Pd}]+/gu, "");

const unaccented = (name: string): string =>
  name
    .normalize("NFKD")
    .replace(/\p{M}+/gu, "")
    .toLowerCase();

/**
 * Pairs of distinct names that are equal but for case, spaces, hyphens and diacritics, or of which one word of four or
 * more letters differs by one letter; numbers and Roman numerals tell names apart. Each name is paired with the first of
 * its likes. Cost is linear in the names.
 */
export function similarNames(names: readonly string[], { byLetter }: { readonly byLetter: boolean }) {
  const pairs = new Map<string, SimilarPair>();
  const add = (first: string, second: string) =>
    pairs.set(JSON.stringify([first, second]), { first, second });
  const distinct = new Map<string, string>();
  for (const name of names) {
    const form = plainForm(name);
    const first = distinct.get(form);
    if (first === undefined) distinct.set(form, name);
    else if (first !== name) add(first, name);
  }
  if (byLetter && distinct.size <= mostByLetter) {
    for (const { first, second } of oneLetterApart([...distinct.values()])) add(first, second);
  }
  return [...pairs.values()];
}

function oneLetterApart(names: readonly string[]): readonly SimilarPair[] {
  const byRest = new Map<string, Map<string, string>>();
  for (const name of names) {
    for (const { rest, word } of wordsOf(name)) {
      const alike = byRest.get(rest);
      if (alike) alike.set(word, name);
      else byRest.set(rest, new Map([[word, name]]));
    }
  }
  return [...byRest.values()].flatMap((alike) => (alike.size > 1 ? pairsOf(alike) : []));
}

/** Pairs of words one letter apart, by what is left of each without one of its letters. */
function pairsOf(nameOf: ReadonlyMap<string, string>): readonly SimilarPair[] {
  const replaced = new Map<string, string>();
  const pairs: SimilarPair[] = [];
  for (const [word, name] of nameOf) {
    for (let at = 0; at < word.length; at++) {
      const [before, after] = [word.slice(0, at), word.slice(at + 1)];
      const shorter = nameOf.get(before + after);
      if (shorter !== undefined) pairs.push({ first: shorter, second: name });
      const key = `${before}*${after}`;
      const other = replaced.get(key);
      if (other === undefined) replaced.set(key, name);
      else pairs.push({ first: other, second: name });
    }
  }
  return pairs;
}

/** The words of a name that can be misspelt, each with the rest of the name. */
function wordsOf(name: string): readonly { readonly rest: string; readonly word: string }[] {
  const words = unaccented(name).split(/[\s_\p{Pd}]+/u);
  return words.flatMap((word, index) => {
    const isWord = /^\p{L}{4,}$/u.test(word) && word.length <= longestWord && !/^[ivxlc]+$/.test(word);
    return isWord ? [{ rest: words.with(index, "").join(" "), word }] : [];
  });
}
