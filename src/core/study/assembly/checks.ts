import { acceptedName, hasNoRecovery, isWithin } from "../finds.ts";
import { formatGiven } from "../heights.ts";
import { sameLevelM } from "../legs.ts";
import type { Occurrence, Origin, Section, Study, Taxon } from "../model.ts";
import { suggestName } from "../nearest.ts";
import { excerpt } from "../problem-wordings.ts";
import { checkNames } from "./check-names.ts";
import { checkAges, checkHorizonOrder } from "./check-order.ts";
import { checkRock } from "./check-rock.ts";
import { type Assembly, gather } from "./context.ts";
import { declaredHorizons } from "./declared-horizons.ts";
import { isToGenus } from "./occurrences.ts";

/** Cautions on what is read well but gives little, or lies where it should not. */
export function checkSection(section: Section, assembly: Assembly): void {
  checkLevels(section, assembly);
  checkEnds(section, assembly);
  checkHiddenFinds(section, assembly);
  checkRock(section, assembly);
  checkAges(section, assembly);
}

/** Cautions and errors that need every section. */
export function checkStudy(study: Pick<Study, "sections" | "taxa">, assembly: Assembly): void {
  checkImpacts(study.sections, assembly);
  checkSets(study, assembly);
  checkSynonyms(study.taxa, assembly);
  checkNames(study, assembly);
  checkHorizonOrder(study.sections, assembly);
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
  for (const { heightM, origin, column } of placesOf(section)) {
    if (heightM >= section.bottomM - sameLevelM && heightM <= section.topM + sameLevelM) continue;
    const found = formatGiven(heightM, section);
    assembly.problems.addOnce(section.name, "outside-section", { ...origin, column, found, detail });
  }
}

/** Every level that a section's rows place, with the column that places it. */
function* placesOf(section: Section): Generator<{
  readonly heightM: number;
  readonly origin: Origin;
  readonly column: string;
}> {
  const { samples, occurrences, measurements, horizons, beds, publishedRanges } = section;
  for (const list of [samples, occurrences, measurements, horizons])
    for (const { heightM, origin } of list) yield { heightM, origin, column: "position" };
  for (const { baseM, topM, origin } of beds) {
    // A bed goes on beyond the section's end; only one that lies wholly outside is odd.
    if (baseM > section.bottomM) yield { heightM: baseM, origin, column: "base" };
    else yield { heightM: topM, origin, column: "top" };
  }
  for (const { firstM, lastM, origin } of publishedRanges) {
    yield { heightM: firstM, origin, column: "first" };
    yield { heightM: lastM, origin, column: "last" };
  }
}

/** Finds inside rock that nobody could search. */
function checkHiddenFinds(section: Section, assembly: Assembly): void {
  const hidden = section.intervals.filter(hasNoRecovery);
  for (const find of section.occurrences) {
    if (find.count === 0) continue;
    const interval = hidden.find((each) => isWithin(find.heightM, each));
    if (interval === undefined) continue;
    const ends = [interval.baseM, interval.topM].map((heightM) => formatGiven(heightM, section));
    assembly.problems.addOnce(`${section.name} ${interval.origin.row}`, "find-in-hidden-rock", {
      ...find.origin,
      column: find.sample === undefined ? "position" : "sample",
      found: `${find.taxon} at ${formatGiven(find.heightM, section)}`,
      detail: `the ${interval.kind} interval (${ends.join(" to ")})`,
    });
  }
}

/** Two names for the main horizon: nobody but the person can say which is meant. */
function checkImpacts(sections: readonly Section[], { settings, problems }: Assembly): void {
  if (settings.boundary.horizon !== undefined) return;
  const declared = declaredHorizons(settings);
  const impacts = sections.flatMap((section) =>
    section.horizons
      .filter(({ kind }) => kind === "impact")
      .map(({ name, origin }) => ({
        name: declared.get(JSON.stringify([section.name, name])) ?? name,
        origin,
      })),
  );
  impacts.sort((a, b) => a.origin.row - b.origin.row);
  const names = [...new Set(impacts.map(({ name }) => name))];
  const second = impacts.find(({ name }) => name !== names[0]);
  if (second === undefined) return;
  const detail = names.map((name) => excerpt(name)).join(", ");
  problems.add("impact-ambiguous", { ...second.origin, column: "horizon", found: names.join(", "), detail });
}

/** Declared sets that name a taxon which no table holds. */
function checkSets(
  { sections, taxa }: Pick<Study, "sections" | "taxa">,
  { settings, problems }: Assembly,
): void {
  const known = new Set(taxa.keys());
  for (const { occurrences, publishedRanges } of sections) {
    for (const { taxon, qualifier } of occurrences) if (qualifier) known.add(`${taxon} ${qualifier}`);
    for (const { taxon } of publishedRanges) known.add(taxon);
  }
  for (const [set, members] of Object.entries(settings.timing.sets))
    for (const member of members) {
      if (known.has(member)) continue;
      const nearest = suggestName(member, known);
      const column = `timing.sets.${set}`;
      problems.add("set-taxon-unknown", {
        file: "settings.json",
        column,
        found: member,
        detail: set,
        nearest,
      });
    }
}

/** Synonyms that accept each other in a circle. */
function checkSynonyms(taxa: ReadonlyMap<string, Taxon>, { problems }: Assembly): void {
  for (const { name, accepted, origin } of taxa.values()) {
    if (accepted === undefined || accepted === name || acceptedName(name, taxa) !== name) continue;
    problems.addOnce("circle", "accepted-circle", {
      ...origin,
      column: "accepted",
      found: accepted,
      detail: `${excerpt(name)} and ${excerpt(accepted)} lead back to each other`,
    });
  }
}
