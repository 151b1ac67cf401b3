import type { Row } from "./csv.ts";
import type { Draws } from "./draws.ts";
import type { ExampleFind } from "./fossils.ts";
import type { TrueSection } from "./truth.ts";

const genusOf = (name: string): string => name.split(" ")[0] ?? name;
const epithetOf = (name: string): string => name.split(" ").slice(1).join(" ");

/** The name as a person wrote it: an older name here and there, and the usual signs of doubt. */
function written(name: string, chance: number): { taxon: string; qualifier: string } {
  const [genus, epithet] = [genusOf(name), epithetOf(name)];
  if (chance < 0.016) return { taxon: `${genus} cf. ${epithet}`, qualifier: "" };
  if (chance < 0.024) return { taxon: `${genus} aff. ${epithet}`, qualifier: "" };
  if (chance < 0.032) return { taxon: name, qualifier: "?" };
  if (chance < 0.038) return { taxon: name, qualifier: "cf." };
  if (chance < 0.042) return { taxon: `?${genus} ${epithet}`, qualifier: "" };
  return { taxon: name, qualifier: "" };
}

const usesOlderNames = (section: TrueSection, leg: string | undefined): boolean =>
  section.unit === "cm" || leg === section.legs[0]?.leg;

/** Rows of occurrences.csv for one find; now and then a fragment beside it is named to genus only. */
export function occurrenceRows(find: ExampleFind, section: TrueSection, draws: Draws): Row[] {
  const [older, doubt, fragment] = [draws.uniform(), draws.uniform(), draws.uniform()];
  const { sample, taxon } = find;
  const isOlder = taxon.synonym !== undefined && usesOlderNames(section, sample.leg) && older < 0.6;
  const name = isOlder && taxon.synonym !== undefined ? taxon.synonym : taxon.name;
  const isCounted = taxon.meanCount > 0;
  const row: Row = {
    section: section.section,
    sample: sample.code,
    ...(find.reworked === "" ? written(name, doubt) : { taxon: name }),
    count: isCounted ? find.count : undefined,
    reworked: find.reworked,
    doubtful: doubt > 0.993 && find.reworked === "" ? "yes" : undefined,
  };
  if (fragment >= 0.012) return [row];
  const toGenus = { section: section.section, sample: sample.code, taxon: `${genusOf(taxon.name)} sp.` };
  return [row, { ...toGenus, count: isCounted ? 1 : undefined }];
}
