import { valueAt } from "../coded.ts";
import { acceptedName } from "../finds.ts";
import { formatGiven } from "../heights.ts";
import { sameLevelM } from "../legs.ts";
import type { Occurrence, Origin, Section, Study, Taxon } from "../model.ts";
import { suggestName } from "../nearest.ts";
import { occurrenceColumns } from "../occurrence-list.ts";
import { excerpt } from "../problem-wordings.ts";
import { checkFinds } from "./check-finds.ts";
import { checkNames } from "./check-names.ts";
import { checkAges, checkHorizonOrder } from "./check-order.ts";
import { checkRock } from "./check-rock.ts";
import type { Assembly, SectionFrame } from "./context.ts";
import { declaredHorizons } from "./declared-horizons.ts";
import type { SearchList } from "./search-list.ts";

/** Names listed in a sentence. */
const mostListed = 12;

type DeclaredEnds = SectionFrame["declared"];

/** Cautions on what is read well but gives little, or lies where it should not. */
export function checkSection(section: Section, declared: DeclaredEnds, assembly: Assembly): void {
  checkFinds(section, assembly);
  checkEnds(section, declared, assembly);
  checkRock(section, assembly);
  checkAges(section, assembly);
}

/** Cautions and errors that need every section. */
export function checkStudy(
  study: Pick<Study, "sections" | "taxa">,
  searches: ReadonlyMap<string, SearchList>,
  assembly: Assembly,
): void {
  checkImpacts(study.sections, assembly);
  checkMainHorizon(study.sections, assembly);
  checkSets(study, assembly);
  checkSynonyms(study.taxa, assembly);
  checkNames({ ...study, searches }, assembly);
  checkHorizonOrder(study.sections, assembly);
}

function checkEnds(section: Section, { bottomM, topM }: DeclaredEnds, assembly: Assembly): void {
  const detail = `${formatGiven(section.bottomM, section)} to ${formatGiven(section.topM, section)}`;
  const isInside = isInsideOf(section);
  for (const { heightM, origin, column } of placesOf(section, bottomM !== undefined && topM !== undefined)) {
    if (isInside(heightM)) continue;
    const found = formatGiven(heightM, section);
    assembly.problems.addOnce(section.name, "outside-section", { ...origin, column, found, detail });
  }
}

const isInsideOf =
  ({ bottomM, topM }: Section) =>
  (heightM: number): boolean =>
    heightM >= bottomM - sameLevelM && heightM <= topM + sameLevelM;

/** Finds, where any of them lies outside: most studies have none. */
const findsOutside = (section: Section): Iterable<Occurrence> =>
  occurrenceColumns(section.occurrences).heightM.values.every(isInsideOf(section)) ? [] : section.occurrences;

/** Every level that a section's rows place, with the column that places it. */
function* placesOf(
  section: Section,
  isDeclared: boolean,
): Generator<{
  readonly heightM: number;
  readonly origin: Origin;
  readonly column: string;
}> {
  const { samples, measurements, horizons, beds, publishedRanges } = section;
  for (const list of [samples, findsOutside(section), measurements, horizons])
    for (const { heightM, origin } of list) yield { heightM, origin, column: "position" };
  // Where no ends are declared, the section is what was searched and logged, and rock beyond it may be covered.
  const intervals = isDeclared ? section.intervals : [];
  for (const { baseM, topM, origin } of [...beds, ...intervals]) {
    // A bed or a cover goes on beyond the section's end; only one that lies wholly outside is odd.
    if (baseM > section.bottomM) yield { heightM: baseM, origin, column: "base" };
    else yield { heightM: topM, origin, column: "top" };
  }
  for (const { firstM, lastM, origin } of publishedRanges) {
    yield { heightM: firstM, origin, column: "first" };
    yield { heightM: lastM, origin, column: "last" };
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

/** A main horizon that is neither placed nor declared, nor could be found in what was measured (`<analyte>-<number>`). */
function checkMainHorizon(sections: readonly Section[], { settings, problems }: Assembly): void {
  const { horizon, same } = settings.boundary;
  if (horizon === undefined) return;
  const known = new Set([...sections.flatMap(({ horizons }) => horizons), ...same].map(({ name }) => name));
  const analyte = /^(.+)-[1-9]\d*$/.exec(horizon)?.[1];
  const isMeasured = sections.some(({ measurements }) => measurements.some((m) => m.analyte === analyte));
  if (known.has(horizon) || isMeasured) return;
  const listed = [...known].slice(0, mostListed).map((name) => excerpt(name));
  problems.add("main-horizon-unknown", {
    file: "settings.json",
    column: "boundary.horizon",
    found: horizon,
    detail: known.size === 0 ? undefined : `one of the horizons of the study (${listed.join(", ")})`,
    nearest: suggestName(horizon, known),
  });
}

/** Declared sets that name a taxon which no table holds. */
function checkSets(
  { sections, taxa }: Pick<Study, "sections" | "taxa">,
  { settings, problems }: Assembly,
): void {
  const known = new Set(taxa.keys());
  for (const { occurrences, publishedRanges } of sections) {
    const { taxon, qualifier } = occurrenceColumns(occurrences);
    for (let find = 0; find < occurrences.length; find++)
      if (valueAt(qualifier, find)) known.add(`${valueAt(taxon, find)} ${valueAt(qualifier, find)}`);
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
