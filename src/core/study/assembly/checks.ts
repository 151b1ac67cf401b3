import { formatGiven } from "../heights.ts";
import { sameLevelM } from "../legs.ts";
import type { Occurrence, Section } from "../model.ts";
import { type Assembly, gather } from "./context.ts";
import { isToGenus } from "./occurrences.ts";

/** Cautions on what is read well but gives little, or lies where it should not. */
export function checkSection(section: Section, assembly: Assembly): void {
  checkLevels(section, assembly);
  checkEnds(section, assembly);
}

function checkLevels({ name, occurrences }: Section, assembly: Assembly): void {
  const byTaxon = new Map<string, Occurrence[]>();
  for (const find of occurrences) if (find.count !== 0 && !isToGenus(find)) gather(byTaxon, find.taxon, find);
  for (const [taxon, finds] of byTaxon) {
    if (finds.some(({ heightM }) => Math.abs(heightM - finds[0].heightM) > sameLevelM)) continue;
    const code = finds.length === 1 ? "one-occurrence" : "one-level";
    const found = `${taxon} in ${name}`;
    assembly.problems.addOnce(name, code, { ...finds[0].origin, column: "taxon", found });
  }
}

function checkEnds(section: Section, assembly: Assembly): void {
  const detail = `${formatGiven(section.bottomM, section)} to ${formatGiven(section.topM, section)}`;
  for (const { heightM, origin } of [
    ...section.samples,
    ...section.occurrences,
    ...section.measurements,
    ...section.horizons,
  ]) {
    if (heightM >= section.bottomM - sameLevelM && heightM <= section.topM + sameLevelM) continue;
    const found = formatGiven(heightM, section);
    assembly.problems.addOnce(section.name, "outside-section", {
      ...origin,
      column: "position",
      found,
      detail,
    });
  }
}
