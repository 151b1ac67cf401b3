import { group } from "d3";
import { slantedDepth, slantedOverhang } from "../layout/slanted-names.ts";
import { fitText } from "../text.ts";
import { TEXT } from "../theme.ts";
import type { ChartedTaxon } from "./charted-taxa.ts";
import type { RangeView } from "./range-view.ts";
import { groupLabel } from "./searched-groups.ts";
import { BAR_WIDTH, LONGEST_NAME, PITCH, taxonLabel } from "./taxon-range.tsx";

/** What stands beside each other in a range chart: a taxon, or a group folded into a strip of its last finds. */
export type ChartItem =
  | { readonly kind: "taxon"; readonly group: string; readonly taxon: ChartedTaxon }
  | { readonly kind: "folded"; readonly group: string; readonly taxa: readonly ChartedTaxon[] };

/** The items of a chart in their order; folded groups keep their place among groups, and stand last in other orders. */
export function chartItems(
  taxa: readonly ChartedTaxon[],
  { folded, order = "group" }: Pick<RangeView, "folded" | "order">,
): readonly ChartItem[] {
  const items: ChartItem[] = [];
  const strips: ChartItem[] = [];
  const byGroup = group(taxa, (taxon) => taxon.group);
  for (const taxon of taxa) {
    if (folded?.has(taxon.group) !== true) {
      items.push({ kind: "taxon", group: taxon.group, taxon });
      continue;
    }
    const own = byGroup.get(taxon.group) ?? [];
    if (own[0] !== taxon) continue;
    (order === "group" ? items : strips).push({ kind: "folded", group: taxon.group, taxa: own });
  }
  return [...items, ...strips];
}

export const STRIP_WIDTH = 16;
const STRIP_PITCH = 21;
const GROUP_GAP = 6;
const NAMES_DROP = 8;

export type PlacedItem = ChartItem & { readonly x: number };

export interface ChartLayout {
  readonly items: readonly PlacedItem[];
  /** Neighbours of one group. */
  readonly groups: readonly { readonly group: string; readonly x: number; readonly width: number }[];
  readonly right: number;
  readonly namesRight: number;
  readonly namesDepth: number;
}

export const pitchOf = (item: ChartItem): number => (item.kind === "taxon" ? PITCH : STRIP_PITCH);

/** The items from the left edge on, a little apart between groups where the groups stand together. */
export function layChart(
  items: readonly ChartItem[],
  { left, isByGroup }: { readonly left: number; readonly isByGroup: boolean },
): ChartLayout {
  const placed: PlacedItem[] = [];
  const groups: { group: string; x: number; width: number }[] = [];
  let edge = left;
  for (const item of items) {
    const last = groups.at(-1);
    const isNew = last === undefined || last.group !== item.group;
    if (isNew && last !== undefined && isByGroup) edge += GROUP_GAP;
    const x = edge + pitchOf(item) / 2;
    const width = item.kind === "taxon" ? BAR_WIDTH : STRIP_WIDTH;
    if (isNew) groups.push({ group: item.group, x: x - width / 2, width });
    else groups[groups.length - 1] = { ...last, width: x + width / 2 - last.x };
    placed.push({ ...item, x });
    edge += pitchOf(item);
  }
  const names = placed.map((item) => ({ x: item.x, text: itemName(item), style: nameStyle(item) }));
  return {
    items: placed,
    groups,
    right: edge,
    namesRight: Math.max(left, ...names.map(({ x, text, style }) => x + slantedOverhang(text, style))),
    namesDepth:
      names.length === 0
        ? 0
        : NAMES_DROP + Math.max(...names.map(({ text, style }) => slantedDepth([text], style))),
  };
}

export function itemName(item: ChartItem): string {
  if (item.kind === "taxon") return taxonLabel(item.taxon.taxon);
  const count = ` (${item.taxa.length})`;
  return fitText(groupLabel(item.group), LONGEST_NAME - 24, TEXT.label) + count;
}

const nameStyle = ({ kind }: ChartItem) => (kind === "taxon" ? TEXT.taxon : TEXT.label);
