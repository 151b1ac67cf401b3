import type { ReactElement } from "react";
import type { Analysis } from "../../core/analysis-result.ts";
import { ColumnHead } from "../columns/column-head.tsx";
import { type HeightScale, spanOf } from "../height-scale.ts";
import { GroupBracket } from "../marks/group-bracket.tsx";
import { PlateText } from "../plate-text.tsx";
import { textWidth } from "../text.ts";
import { COLOURS, TEXT } from "../theme.ts";
import type { ChartLayout } from "./chart-layout.ts";
import { FoldedGroup } from "./folded-group.tsx";
import { groupSigns } from "./searched-groups.ts";
import { BRACKET_LIFT, bracketName, HEAD_LIFT } from "./taxa-block.tsx";
import { TaxonRange } from "./taxon-range.tsx";

interface ChartBlockProps {
  readonly analysis: Analysis;
  readonly layout: ChartLayout;
  readonly left: number;
  readonly y: HeightScale;
  readonly title: string;
  /** Beside the title: whose ends are drawn. */
  readonly words: string;
}

const WORDS_GAP = 6;

/** Width that the head of a block needs. */
export const chartHeadWidth = (title: string, words: string): number =>
  textWidth(title, TEXT.heading) + WORDS_GAP + textWidth(words, TEXT.unit);

/** The bars and strips of a range chart under the brackets of their groups. */
export function ChartBlock({ analysis, layout, left, y, title, words }: ChartBlockProps): ReactElement {
  const signs = groupSigns(analysis);
  const { top } = spanOf(y);
  return (
    <g>
      <ColumnHead x={left} top={top - HEAD_LIFT} title={title} />
      {words !== "" && (
        <PlateText
          x={left + textWidth(title, TEXT.heading) + WORDS_GAP}
          y={top - HEAD_LIFT - 18}
          style={TEXT.unit}
          colour={COLOURS.soft}
        >
          {words}
        </PlateText>
      )}
      {layout.groups.map(({ group, x, width }, i) => {
        const sign = signs.get(group);
        return (
          sign && (
            <GroupBracket
              key={`${i} ${group}`}
              {...{ x, width, sign }}
              y={top - BRACKET_LIFT}
              name={bracketName(group, width)}
            />
          )
        );
      })}
      {layout.items.map((item) => {
        const colour = signs.get(item.group)?.colour ?? "";
        return item.kind === "taxon" ? (
          <TaxonRange key={item.taxon.taxon} x={item.x} {...{ y, colour }} taxon={item.taxon} />
        ) : (
          <FoldedGroup key={`folded ${item.group}`} {...{ item, y, colour }} />
        );
      })}
    </g>
  );
}
