import type { Analysis } from "../../core/analysis-result.ts";
import type { Section } from "../../core/study/model.ts";
import type { SearchedGroup } from "../columns/search-rail.tsx";
import type { LegendEntry } from "../legend.tsx";
import { type GroupSign, groupSign } from "../theme.ts";

/** The groups of a study in the order of its taxa, each with its sign: the same on every plate. */
export function groupSigns({ study, taxa }: Analysis): ReadonlyMap<string, GroupSign> {
  const searched = study.sections.flatMap((section) => section.searches.map((search) => search.group));
  const drawn = new Set([...taxa.map((taxon) => taxon.group), ...searched]);
  const inTable = [...study.taxa.values()].map((taxon) => taxon.group).filter((group) => drawn.has(group));
  return new Map([...new Set([...inTable, ...drawn])].map((group, place) => [group, groupSign(place)]));
}

/** A group's name as it is printed. */
export function groupLabel(group: string): string {
  return group === "" ? "no group given" : group;
}

/** A group's letter and name in a legend. */
export function groupEntry(group: string, { colour, letter }: GroupSign): LegendEntry {
  return { sign: { kind: "group", colour, letter }, label: groupLabel(group) };
}

/** Every search of a section by group, and whether anything that counts was found. */
export function searchedGroups(analysis: Analysis, section: Section): readonly SearchedGroup[] {
  const found = foundSamples(analysis, section.name);
  return [...groupSigns(analysis)].flatMap(([group, sign]) => {
    const samples = section.searches
      .filter((search) => search.group === group)
      .map((search) => ({ heightM: search.heightM, isFound: found.get(group)?.has(search.sample) === true }));
    return samples.length === 0 ? [] : [{ name: group, sign, samples }];
  });
}

function foundSamples(analysis: Analysis, section: string): ReadonlyMap<string, ReadonlySet<string>> {
  const found = new Map<string, Set<string>>();
  for (const taxon of analysis.taxa) {
    if (taxon.section !== section) continue;
    const samples = found.get(taxon.group) ?? new Set<string>();
    for (const sample of taxon.samples) if (sample !== undefined) samples.add(sample);
    found.set(taxon.group, samples);
  }
  return found;
}
