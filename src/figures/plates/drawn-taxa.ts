import { group } from "d3";
import type { Analysis } from "../../core/analysis-result.ts";
import type { Taper } from "../../core/ranges/result.ts";
import type { Candidate, Find, FindReason, LocalTaxon, Role } from "../../core/study/finds-result.ts";

/** One taxon of one section as a plate draws it. */
export interface DrawnTaxon {
  readonly taxon: string;
  readonly group: string;
  readonly role: Role;
  readonly reachesTop: boolean;
  readonly firstM: number;
  readonly lastM: number;
  readonly findsM: readonly number[];
  /** Finds set aside: reworked, doubtful, qualified; drawn open. */
  readonly openM: readonly number[];
  readonly taper?: Taper;
}

/** Reasons that say that nothing was found there, or that the find is drawn already. */
const NOT_DRAWN: ReadonlySet<FindReason> = new Set<FindReason>(["used", "same-horizon", "zero-count"]);

/** The taxa of a section with counted finds, by group in the study's order and within it by last find, first find and name. */
export function drawnTaxa(
  analysis: Analysis,
  section: string,
  groups: ReadonlyMap<string, unknown>,
): readonly DrawnTaxon[] {
  const candidates = byTaxon(analysis.candidates, section);
  const tapers = byTaxon(analysis.ranges.tapers, section);
  const open = openFinds(analysis.finds, section);
  const place = new Map([...groups.keys()].map((group, i) => [group, i]));
  return analysis.taxa
    .filter((taxon) => taxon.section === section)
    .flatMap((taxon) => {
      const [candidate, taper] = [candidates.get(taxon.taxon), tapers.get(taxon.taxon)];
      return drawnTaxon(taxon, { candidate, taper, openM: open.get(taxon.taxon) ?? [] });
    })
    .toSorted(
      (a, b) =>
        (place.get(a.group) ?? 0) - (place.get(b.group) ?? 0) ||
        a.lastM - b.lastM ||
        a.firstM - b.firstM ||
        (a.taxon < b.taxon ? -1 : 1),
    );
}

interface TaxonParts {
  readonly candidate: Candidate | undefined;
  readonly taper: Taper | undefined;
  readonly openM: readonly number[];
}

function drawnTaxon(taxon: LocalTaxon, { candidate, taper, openM }: TaxonParts): readonly DrawnTaxon[] {
  const firstM = candidate?.firstM ?? taxon.heightsM[0];
  const lastM = candidate?.lastM ?? taxon.heightsM.at(-1);
  if (firstM === undefined || lastM === undefined) return [];
  return [
    {
      taxon: taxon.taxon,
      group: taxon.group,
      role: candidate?.role ?? "candidate",
      reachesTop: candidate?.reachesTop ?? false,
      firstM,
      lastM,
      findsM: taxon.heightsM,
      openM,
      taper,
    },
  ];
}

function byTaxon<T extends { readonly section: string; readonly taxon: string }>(
  rows: readonly T[],
  section: string,
): ReadonlyMap<string, T> {
  return new Map(rows.filter((row) => row.section === section).map((row) => [row.taxon, row]));
}

function openFinds(finds: readonly Find[], section: string): ReadonlyMap<string, readonly number[]> {
  const open = finds.filter(
    (find) => find.section === section && find.used === "no" && !NOT_DRAWN.has(find.reason),
  );
  const grouped = group(open, (find) => find.accepted);
  return new Map([...grouped].map(([taxon, list]) => [taxon, list.map((find) => find.heightM)]));
}

/** Names in a section that rest on finds set aside alone: they have no range to draw. */
export function namesWithoutRange(analysis: Analysis, section: string): readonly string[] {
  const drawn = new Set(
    analysis.taxa.filter((taxon) => taxon.section === section).map((taxon) => taxon.taxon),
  );
  return [...openFinds(analysis.finds, section).keys()].filter((name) => !drawn.has(name)).toSorted();
}
