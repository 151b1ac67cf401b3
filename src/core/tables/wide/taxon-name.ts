const genus = String.raw`\p{Lu}(?:\p{Ll}[\p{Ll}-]*)?\.?`;
const sign = String.raw`(?:cf|aff|ex gr|gr|spp|sp|indet|nov|n)\b\.?`;
const binomial = new RegExp(
  String.raw`^["“?]*${genus}(?:\s*\(\p{Lu}\p{L}+\.?\))?\s*\??\s+(?:${sign}|\?|["“]?\p{Ll}[\p{Ll}-]{2,})`,
  "u",
);

/** Second words of headers that look like the name of a species and are none. */
const notEpithets = new Set(
  "size number depth height thickness weight mass content index ratio total name type percent colour color code date unit units age zone level residue error position interval description contact formation member".split(
    " ",
  ),
);

/** True for a name as systematists write it: genus and species, a sign of open nomenclature for either. */
export function isTaxonName(text: string): boolean {
  const name = text.trim();
  if (name.length > 120 || !binomial.test(name)) return false;
  return !name.split(/\s+/).some((word) => notEpithets.has(word.toLowerCase()));
}

/** Headers of columns that sum the others up, plain. */
const sums = new Set(
  "total totals totaln sum n diversity richness species speciesrichness numberoftaxa numberofspecies summe gesamt somme suma somma soma".split(
    " ",
  ),
);

export const isSum = (plain: string): boolean => sums.has(plain);
