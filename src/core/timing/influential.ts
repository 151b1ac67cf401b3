import type { Influence } from "./result.ts";

const MOST = 3;
/** Of the largest move of the level; under it a taxon is no cause of its own. */
const LEAST_SHARE = 0.25;
/** Taking out the highest find says the same as taking out the taxon where it moves the level this nearly as far. */
const AS_FAR = 0.9;

/** The few taxa, or highest finds, of one set whose removal moves the level most, the largest move first. */
export function mostInfluential(
  influence: readonly Influence[],
  { section, set }: { readonly section: string; readonly set: string },
): readonly Influence[] {
  const here = influence.filter((one) => one.section === section && one.set === set && move(one) > 0);
  const largest = Math.max(0, ...here.map(move));
  const byTaxon = new Map<string, Influence>();
  for (const one of here) {
    const other = byTaxon.get(one.taxon);
    if (other === undefined || comesBefore(one, other)) byTaxon.set(one.taxon, one);
  }
  return [...byTaxon.values()]
    .filter((one) => move(one) >= LEAST_SHARE * largest)
    .toSorted((a, b) => move(b) - move(a))
    .slice(0, MOST);
}

const move = ({ levelM = 0 }: Influence): number => Math.abs(levelM);

function comesBefore(one: Influence, other: Influence): boolean {
  return one.removed === "highest-find"
    ? move(one) >= AS_FAR * move(other)
    : AS_FAR * move(one) > move(other);
}
