import type { Analysis } from "../core/analysis-result.ts";
import type { Basis, Source } from "../core/basis.ts";

/** Everything a run rests on, once each, in the order of the flow; one name may stand for a taxon and for an assemblage. */
export function basesOf({ markers, alignment, ranges, timing }: Analysis): readonly Basis[] {
  const all = [...markers.basis, ...alignment.basis, ...ranges.basis, ...timing.basis];
  const seen = new Set<string>();
  return all.filter((basis) => !seen.has(keyOf(basis)) && seen.add(keyOf(basis)));
}

const keyOf = ({ method, statement }: Basis) => `${method}\n${statement}`;

/** A source as it stands in a list of references. */
export function reference({ authors, year, title, place, doi }: Source): string {
  const text = `${authors} ${year}. ${title}. ${place}.`;
  return doi === undefined ? text : `${text} doi:${doi}`;
}

/** `Strauss & Sadler 1989`; `after ...` where the algebra is ours. */
export function shortSources({ sources, after }: Basis): string {
  const short = sources.map(({ authors, year }) => `${shortAuthors(authors)} ${year}`).join("; ");
  return after && short !== "" ? `after ${short}` : short;
}

function shortAuthors(authors: string): string {
  const surnames = authors
    .split(/\s*(?:,|;|&| and )\s*/)
    .filter((part) => part !== "" && !/^(?:[A-Z]\.[\s-]*)+$/.test(part))
    .map((part) => part.replace(/\s+(?:[A-Z]\.[\s-]*)+$/, ""));
  if (surnames.length > 2) return `${surnames[0]} et al.`;
  return surnames.join(" & ");
}

/** The list of references of a run, alphabetical, without repeats. */
export function references(analysis: Analysis): readonly string[] {
  const all = basesOf(analysis).flatMap((basis) => basis.sources.map(reference));
  return [...new Set(all)].toSorted((a, b) => a.localeCompare(b, "en"));
}
