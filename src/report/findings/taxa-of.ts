import { plural } from "../wordings/words.ts";

/** The set in words: `39 candidates`, `8 taxa of ammonoids`, `27 taxa of open-shelf`. */
export function taxaOf(set: string, count: number): string {
  if (set === "candidates") return plural(count, "candidate");
  if (set === "candidates-closed") return `${plural(count, "candidate")} that end below the top`;
  if (set === "candidates-without-isolated")
    return `${plural(count, "candidate")} without isolated highest finds`;
  if (set === "candidates-untrimmed")
    return `${plural(count, "candidate")} with finds below the reworking ceiling`;
  if (set === "step:early") return `${plural(count, "taxon", "taxa")} of the declared earlier step`;
  if (set === "step:late") return `${plural(count, "taxon", "taxa")} of the declared later step`;
  return `${plural(count, "taxon", "taxa")} of ${set.replace(/^group:/, "")}`;
}
