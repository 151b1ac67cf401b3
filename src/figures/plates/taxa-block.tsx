import type { Analysis } from "../../core/analysis-result.ts";
import { ColumnHead } from "../columns/column-head.tsx";
import { type HeightScale, spanOf } from "../height-scale.ts";
import { slantedDepth, slantedOverhang } from "../layout/slanted-names.ts";
import type { LegendEntry } from "../legend.tsx";
import { GroupBracket } from "../marks/group-bracket.tsx";
import { fitText } from "../text.ts";
import { TEXT } from "../theme.ts";
import type { DrawnTaxon } from "./drawn-taxa.ts";
import { groupEntry, groupLabel, groupSigns } from "./searched-groups.ts";
import { BAR_WIDTH, PITCH, TaxonRange, taxonLabel } from "./taxon-range.tsx";

/** Where the bars of a block stand, and what room the block takes. */
export interface TaxaLayout {
  readonly places: readonly { readonly taxon: DrawnTaxon; readonly x: number }[];
  readonly groups: readonly { readonly group: string; readonly x: number; readonly width: number }[];
  readonly right: number;
  /** Right end of the last slanted name; beneath the frame. */
  readonly namesRight: number;
  readonly namesDepth: number;
}

const GROUP_GAP = 6;
const NAMES_DROP = 8;

/** Bars from the left edge on, a little apart between groups. */
export function layTaxa(taxa: readonly DrawnTaxon[], left: number): TaxaLayout {
  const places: { taxon: DrawnTaxon; x: number }[] = [];
  const groups: { group: string; x: number; width: number }[] = [];
  let x = left + PITCH / 2;
  for (const taxon of taxa) {
    const group = groups.at(-1);
    if (group !== undefined && group.group === taxon.group) {
      groups[groups.length - 1] = { ...group, width: x + BAR_WIDTH / 2 - group.x };
    } else {
      if (group !== undefined) x += GROUP_GAP;
      groups.push({ group: taxon.group, x: x - BAR_WIDTH / 2, width: BAR_WIDTH });
    }
    places.push({ taxon, x });
    x += PITCH;
  }
  const names = places.map(({ taxon }) => taxonLabel(taxon.taxon));
  return {
    places,
    groups,
    right: x - PITCH / 2,
    namesRight: Math.max(left, ...places.map((place, i) => place.x + slantedOverhang(names[i], TEXT.taxon))),
    namesDepth: names.length === 0 ? 0 : NAMES_DROP + slantedDepth(names, TEXT.taxon),
  };
}

/** The letters of the groups that are drawn. */
export function groupLegend(
  analysis: Analysis,
  { groups }: { readonly groups: readonly { readonly group: string }[] },
): readonly LegendEntry[] {
  const signs = groupSigns(analysis);
  return groups.flatMap(({ group }) => {
    const sign = signs.get(group);
    return sign ? [groupEntry(group, sign)] : [];
  });
}

interface TaxaBlockProps {
  readonly analysis: Analysis;
  readonly layout: TaxaLayout;
  readonly left: number;
  readonly y: HeightScale;
  readonly title: string;
}

const LETTER_ROOM = 12;

/** The name where it fits whole; else its letter, which the legend names, says it alone. */
export function bracketName(group: string, width: number): string {
  const name = groupLabel(group);
  return fitText(name, width - LETTER_ROOM, TEXT.unit) === name ? name : "";
}

export const BRACKET_LIFT = 9;
export const HEAD_LIFT = 8;

export function TaxaBlock({ analysis, layout, left, y, title }: TaxaBlockProps) {
  const signs = groupSigns(analysis);
  const { top } = spanOf(y);
  return (
    <g>
      <ColumnHead x={left} top={top - HEAD_LIFT} title={title} />
      {layout.groups.map(({ group, x, width }) => {
        const sign = signs.get(group);
        return (
          sign && (
            <GroupBracket
              key={group}
              {...{ x, width, sign }}
              y={top - BRACKET_LIFT}
              name={bracketName(group, width)}
            />
          )
        );
      })}
      {layout.places.map(({ taxon, x }) => (
        <TaxonRange key={taxon.taxon} {...{ x, y, taxon }} colour={signs.get(taxon.group)?.colour ?? ""} />
      ))}
    </g>
  );
}
