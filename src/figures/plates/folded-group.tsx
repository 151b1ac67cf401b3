import type { ReactElement } from "react";
import { type HeightScale, isInFrame, spanOf } from "../height-scale.ts";
import { boxPath } from "../marks/mark-path.ts";
import { SlantedNames } from "../marks/slanted-names.tsx";
import { round } from "../numbers.ts";
import { COLOURS, TEXT } from "../theme.ts";
import { itemName, type PlacedItem, STRIP_WIDTH } from "./chart-layout.ts";
import { isInQuestion } from "./taxon-range.tsx";

interface FoldedGroupProps {
  readonly item: Extract<PlacedItem, { readonly kind: "folded" }>;
  readonly y: HeightScale;
  readonly colour: string;
}

const INSET = 2;

/** A group as a strip of its last finds: a tick each, dashed where the end is not in question. */
export function FoldedGroup({ item, y, colour }: FoldedGroupProps): ReactElement {
  const { x, taxa, group } = item;
  const { top, bottom } = spanOf(y);
  const left = x - STRIP_WIDTH / 2;
  return (
    <g data-group={group}>
      <path d={boxPath(left, top, STRIP_WIDTH, bottom - top)} fill={COLOURS.column} />
      {taxa
        .filter(({ lastM }) => isInFrame(y, lastM))
        .map((taxon) => (
          <path
            key={taxon.taxon}
            data-taxon={taxon.taxon}
            d={`M${round(left + INSET)} ${round(y(taxon.lastM))}h${STRIP_WIDTH - 2 * INSET}`}
            stroke={colour}
            strokeWidth={0.75}
            strokeOpacity={0.8}
            strokeDasharray={isInQuestion(taxon) && taxon.role !== "survivor" ? undefined : "2 1.4"}
          />
        ))}
      <SlantedNames names={[{ text: itemName(item), markX: x, x }]} y={bottom} style={TEXT.label} />
    </g>
  );
}
