import type { Analysis } from "../../core/analysis-result.ts";
import type { Outcome } from "../../core/basis.ts";
import type { Leaning, RangeEnd, RangeMethod, Taper } from "../../core/ranges/result.ts";
import { byLastFind, byTaxon, type DrawnTaxon, drawnTaxa, type OpenKind, openKind } from "./drawn-taxa.ts";
import type { RangeOrder, RangeView } from "./range-view.ts";
import { groupSigns } from "./searched-groups.ts";

/** What a method says of one end. */
export interface DrawnEnd {
  readonly method: RangeMethod;
  readonly outcome: Outcome;
  readonly pointM?: number;
  /** The limit that lies outward of the outermost find. */
  readonly boundM?: number;
}

/** A find as a mark of its own: the row that it comes from. */
export interface FindMark {
  readonly heightM: number;
  readonly row: string;
  /** Absent where it counts. */
  readonly open?: OpenKind;
}

/** A taxon with both its ends by one method. */
export interface ChartedTaxon extends DrawnTaxon {
  readonly baseTaper?: Taper;
  readonly top?: DrawnEnd;
  readonly base?: DrawnEnd;
  /** Nearest and furthest bound of its top under other shapes of recovery. */
  readonly leaning?: { readonly nearestM: number; readonly furthestM: number };
  /** Present for the taxon in focus. */
  readonly marks?: readonly FindMark[];
}

/** The taxa of the section with their ends by the method in view, in the order asked for. */
export function chartedTaxa(analysis: Analysis, view: RangeView): readonly ChartedTaxon[] {
  const { section, method, tapers = [], order = "group" } = view;
  const given = new Map(tapers.map((each) => [each.taxon, each]));
  const baseTapers = byTaxon(analysis.ranges.baseTapers, section);
  const rows = endRows(analysis, section);
  const leanings = topLeanings(analysis, section);
  const aside = view.aside ?? [];
  const charted = drawnTaxa(analysis, section, groupSigns(analysis)).map((taxon): ChartedTaxon => {
    const name = taxon.taxon;
    const [taper, baseTaper] =
      method === undefined
        ? [taxon.taper, baseTapers.get(name)]
        : [given.get(name)?.top, given.get(name)?.base];
    const open = aside.filter((find) => find.taxon === name);
    return {
      ...taxon,
      open: [...taxon.open, ...open.map(({ heightM }) => ({ heightM, kind: "set-aside" as const }))],
      taper,
      baseTaper,
      top: drawnEnd(rows.get(`top ${name}`), method ?? taper?.method),
      base: drawnEnd(rows.get(`base ${name}`), method ?? baseTaper?.method),
      ...(view.isLeaningShown === false ? {} : leaningOf(leanings.get(name))),
      ...(view.focus === name ? { marks: findMarks(analysis, view, name) } : {}),
    };
  });
  return ordered(charted, order);
}

function ordered(taxa: readonly ChartedTaxon[], order: RangeOrder): readonly ChartedTaxon[] {
  switch (order) {
    case "group":
      return taxa;
    case "last":
      return taxa.toSorted(byLastFind);
    case "name":
      return taxa.toSorted((a, b) => (a.taxon < b.taxon ? -1 : 1));
    default:
      return order satisfies never;
  }
}

/** The rows of each end of each taxon, the leading method's first; those under names read otherwise left out. */
export function endRows(analysis: Analysis, section: string): ReadonlyMap<string, readonly RangeEnd[]> {
  const rows = new Map<string, RangeEnd[]>();
  for (const row of analysis.ranges.ends) {
    if (row.section !== section || row.identification !== analysis.study.settings.taxa.identification)
      continue;
    const key = `${row.end} ${row.taxon}`;
    const list = rows.get(key);
    if (list === undefined) rows.set(key, [row]);
    else list.push(row);
  }
  return rows;
}

/** The row of a method as it is drawn; of the leading one where none is named. */
function drawnEnd(
  rows: readonly RangeEnd[] | undefined,
  method: RangeMethod | undefined,
): DrawnEnd | undefined {
  const row = method === undefined ? rows?.[0] : rows?.find((each) => each.method === method);
  return row && endOf(row);
}

export function endOf({ method, outcome, pointM, lowM, highM, end }: RangeEnd): DrawnEnd {
  const boundM = end === "base" ? lowM : highM;
  return {
    method,
    outcome,
    ...(pointM === undefined ? {} : { pointM }),
    ...(boundM === undefined ? {} : { boundM }),
  };
}

function topLeanings(analysis: Analysis, section: string): ReadonlyMap<string, Leaning> {
  return byTaxon(
    analysis.ranges.leanings.filter(({ end }) => end === "top"),
    section,
  );
}

function leaningOf(leaning: Leaning | undefined): Pick<ChartedTaxon, "leaning"> {
  if (leaning?.nearestM === undefined || leaning.furthestM === undefined) return {};
  return { leaning: { nearestM: leaning.nearestM, furthestM: leaning.furthestM } };
}

function findMarks(analysis: Analysis, { section, aside = [] }: RangeView, taxon: string): FindMark[] {
  const own = analysis.finds.filter((find) => find.section === section && find.accepted === taxon);
  const byHand = aside.filter((find) => find.taxon === taxon);
  const isByHand = new Set(byHand.map(({ row }) => row));
  const marks = own.flatMap((find): FindMark[] => {
    const open = openKind(find);
    const row = `${find.origin.file}:${find.origin.row}`;
    if ((find.used === "no" && open === undefined) || isByHand.has(row)) return [];
    return [open === undefined ? { heightM: find.heightM, row } : { heightM: find.heightM, row, open }];
  });
  return [
    ...marks,
    ...byHand.map(({ heightM, row }) => ({ heightM, row, open: "set-aside" as const })),
  ].toSorted((a, b) => a.heightM - b.heightM);
}
