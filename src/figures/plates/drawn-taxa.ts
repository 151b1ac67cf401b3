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
  /** Finds that do not count: drawn open. */
  readonly open: readonly OpenFind[];
  /** The highest find under inclusive names, where it is higher than the last. */
  readonly inclusiveM?: number;
  readonly taper?: Taper;
}

/** Why a find is drawn open. */
export type OpenKind = "set-aside" | "reworked" | "doubtful";

export interface OpenFind {
  readonly heightM: number;
  readonly kind: OpenKind;
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
      return drawnTaxon(taxon, { candidate, taper, open: open.get(taxon.taxon) ?? [] });
    })
    .toSorted((a, b) => (place.get(a.group) ?? 0) - (place.get(b.group) ?? 0) || byLastFind(a, b));
}

/** By last find, then first find, then name. */
export function byLastFind(a: DrawnTaxon, b: DrawnTaxon): number {
  return a.lastM - b.lastM || a.firstM - b.firstM || (a.taxon < b.taxon ? -1 : 1);
}

interface TaxonParts {
  readonly candidate: Candidate | undefined;
  readonly taper: Taper | undefined;
  readonly open: readonly OpenFind[];
}

function drawnTaxon(taxon: LocalTaxon, { candidate, taper, open }: TaxonParts): readonly DrawnTaxon[] {
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
      open,
      ...(taxon.lastInclusiveM > lastM ? { inclusiveM: taxon.lastInclusiveM } : {}),
      taper,
    },
  ];
}

export function byTaxon<T extends { readonly section: string; readonly taxon: string }>(
  rows: readonly T[],
  section: string,
): ReadonlyMap<string, T> {
  return new Map(rows.filter((row) => row.section === section).map((row) => [row.taxon, row]));
}

/** Why a find does not count, as a plate tells it; undefined where it is not drawn open. */
export function openKind({ used, reason }: Pick<Find, "used" | "reason">): OpenKind | undefined {
  if (used !== "no" || NOT_DRAWN.has(reason)) return undefined;
  if (reason === "reworked" || reason === "reworking-suspected" || reason === "below-reworking-ceiling")
    return "reworked";
  return reason === "doubtful" ? "doubtful" : "set-aside";
}

function openFinds(finds: readonly Find[], section: string): ReadonlyMap<string, readonly OpenFind[]> {
  const open = finds.flatMap((find) => {
    const kind = find.section === section ? openKind(find) : undefined;
    return kind === undefined ? [] : [{ taxon: find.accepted, heightM: find.heightM, kind }];
  });
  const grouped = group(open, ({ taxon }) => taxon);
  return new Map(
    [...grouped].map(([taxon, list]) => [taxon, list.map(({ heightM, kind }) => ({ heightM, kind }))]),
  );
}

/** Names in a section that rest on finds set aside alone: they have no range to draw. */
export function namesWithoutRange(analysis: Analysis, section: string): readonly string[] {
  const drawn = new Set(
    analysis.taxa.filter((taxon) => taxon.section === section).map((taxon) => taxon.taxon),
  );
  return [...openFinds(analysis.finds, section).keys()].filter((name) => !drawn.has(name)).toSorted();
}
