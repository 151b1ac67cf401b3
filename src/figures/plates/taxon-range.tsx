import type { ReactElement } from "react";
import type { Role } from "../../core/study/finds-result.ts";
import { type HeightScale, isInFrame, spanOf } from "../height-scale.ts";
import type { LegendEntry } from "../legend.tsx";
import { markPath } from "../marks/mark-path.ts";
import { SlantedNames } from "../marks/slanted-names.tsx";
import { type RangeBar, Taper } from "../marks/taper.tsx";
import { fitText } from "../text.ts";
import { COLOURS, TEXT } from "../theme.ts";
import type { DrawnTaxon } from "./drawn-taxa.ts";

export const BAR_WIDTH = 4.6;
/** From one bar to the next: as close as slanted names of 7.5 points can stand. */
export const PITCH = 9.2;
export const LONGEST_NAME = 150;

const BARS: Readonly<Record<Role, RangeBar>> = {
  candidate: "filled",
  survivor: "filled",
  "late-start": "dashed",
  aftermath: "outlined",
  "too-few": "dotted",
};

export function taxonLabel(taxon: string): string {
  return fitText(taxon, LONGEST_NAME, TEXT.taxon);
}

interface TaxonRangeProps {
  readonly x: number;
  readonly y: HeightScale;
  readonly colour: string;
  readonly taxon: DrawnTaxon;
}

/** One taxon: its bar, taper, finds, sign of its role above the frame, and its name beneath. */
export function TaxonRange({ x, y, colour, taxon }: TaxonRangeProps): ReactElement {
  const { taper, firstM, lastM, findsM, openM, role } = taxon;
  const isFilled = BARS[role] === "filled";
  const above = taper?.heightsM.map((heightM, i) => ({ heightM, confidence: 1 - taper.chances[i] }));
  return (
    <g data-taxon={taxon.taxon}>
      <Taper
        {...{ x, y, colour, firstM, lastM }}
        width={BAR_WIDTH}
        bar={BARS[role]}
        above={isFilled ? above : undefined}
        topEndM={isFilled ? taper?.endM : undefined}
        occurrencesM={findsM}
        openOccurrencesM={openM}
      />
      <RoleSign x={x} y={y} colour={colour} taxon={taxon} />
      <SlantedNames
        names={[{ text: taxonLabel(taxon.taxon), markX: x, x }]}
        y={spanOf(y).bottom}
        style={TEXT.taxon}
      />
    </g>
  );
}

const SIGN_LIFT = 4;

function RoleSign({ x, y, colour, taxon }: TaxonRangeProps): ReactElement | null {
  if (taxon.role !== "survivor" && !taxon.reachesTop) return null;
  const d = markPath("triangle", x, spanOf(y).top - SIGN_LIFT, 2.1);
  if (taxon.role === "survivor") return <path d={d} fill={colour} />;
  return <path d={d} fill={COLOURS.paper} stroke={colour} strokeWidth={0.6} />;
}

/** What the signs of these taxa mean, each only where it is used. */
export function rangeLegend(taxa: readonly DrawnTaxon[], y: HeightScale): readonly LegendEntry[] {
  const colour = COLOURS.soft;
  const has = (test: (taxon: DrawnTaxon) => boolean) => taxa.some(test);
  const bar = (role: Role, label: string): readonly LegendEntry[] =>
    has((taxon) => taxon.role === role) ? [{ sign: { kind: "bar", colour, bar: BARS[role] }, label }] : [];
  const sign = (
    kind: "find" | "open-find" | "taper" | "interval-end" | "survivor" | "cut-off",
    label: string,
    isUsed: boolean,
  ): readonly LegendEntry[] => (isUsed ? [{ sign: { kind, colour }, label }] : []);
  return [
    ...sign(
      "find",
      "find",
      has(({ findsM }) => findsM.length > 0),
    ),
    ...sign(
      "open-find",
      "find set aside",
      has(({ openM }) => openM.length > 0),
    ),
    ...sign(
      "taper",
      "taper: chance that the taxon was still here",
      has(({ taper }) => taper !== undefined),
    ),
    ...sign(
      "interval-end",
      "end of the interval",
      has(({ taper }) => taper?.endM !== undefined && isInFrame(y, taper.endM)),
    ),
    ...sign(
      "survivor",
      "survivor",
      has(({ role }) => role === "survivor"),
    ),
    ...sign(
      "cut-off",
      "found in the highest sample searched",
      has(({ role, reachesTop }) => role !== "survivor" && reachesTop),
    ),
    ...bar("aftermath", "first found after the horizon"),
    ...bar("late-start", "starts late"),
    ...bar("too-few", "too few horizons"),
  ];
}
