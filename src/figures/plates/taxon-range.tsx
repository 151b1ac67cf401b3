import type { ReactElement } from "react";
import type { Taper as TaperResult } from "../../core/ranges/result.ts";
import type { Role } from "../../core/study/finds-result.ts";
import { clippedSpan, type HeightScale, isInFrame, spanOf } from "../height-scale.ts";
import { EndSign } from "../marks/end-sign.tsx";
import { boxPath, markPath } from "../marks/mark-path.ts";
import { SlantedNames } from "../marks/slanted-names.tsx";
import { type RangeBar, Taper, type TaperStep } from "../marks/taper.tsx";
import { round } from "../numbers.ts";
import { fitText } from "../text.ts";
import { COLOURS, TEXT } from "../theme.ts";
import type { ChartedTaxon, DrawnEnd } from "./charted-taxa.ts";
import type { DrawnTaxon } from "./drawn-taxa.ts";
import { FindMarks, OpenFinds } from "./find-marks.tsx";

export const BAR_WIDTH = 4.6;
/** From one bar to the next: as close as slanted names of 7.5 points can stand. */
export const PITCH = 9.2;
export const LONGEST_NAME = 150;

export const BARS: Readonly<Record<Role, RangeBar>> = {
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
  readonly taxon: ChartedTaxon;
}

/** One taxon: its bar, tapers, finds, the signs of its ends, that of its role above the frame, and its name beneath. */
export function TaxonRange({ x, y, colour, taxon }: TaxonRangeProps): ReactElement {
  const { taper, baseTaper, firstM, lastM, findsM, open, role, marks } = taxon;
  const isFilled = isInQuestion(taxon);
  const setAside = open.filter(({ kind }) => kind === "set-aside").map(({ heightM }) => heightM);
  return (
    <g data-taxon={taxon.taxon}>
      {marks !== undefined && <FocusBand x={x} y={y} />}
      <Taper
        {...{ x, y, colour, firstM, lastM }}
        width={BAR_WIDTH}
        bar={BARS[role]}
        above={isFilled ? taper && taperSteps(taper) : undefined}
        below={isFilled ? baseTaper && taperSteps(baseTaper) : undefined}
        topEndM={isFilled ? (closedBound(taxon.top) ?? (taxon.top ? undefined : taper?.endM)) : undefined}
        baseEndM={isFilled ? closedBound(taxon.base) : undefined}
        occurrencesM={marks === undefined ? findsM : []}
        openOccurrencesM={marks === undefined ? setAside : []}
      />
      {marks === undefined ? (
        <OpenFinds {...{ x, y, colour, open }} />
      ) : (
        <FindMarks {...{ x, y, colour, marks }} width={BAR_WIDTH} />
      )}
      {isFilled && <EndSigns {...{ x, y, colour, taxon }} />}
      <InclusiveLine {...{ x, y, colour, taxon }} />
      {isFilled && <LeaningLine {...{ x, y, colour, taxon }} />}
      <RoleSign x={x} y={y} colour={colour} taxon={taxon} />
      <SlantedNames
        names={[{ text: taxonLabel(taxon.taxon), markX: x, x }]}
        y={spanOf(y).bottom}
        style={TEXT.taxon}
      />
    </g>
  );
}

/** Whether the ends of a range are in question, so that its tapers are drawn. */
export function isInQuestion({ role }: DrawnTaxon): boolean {
  return BARS[role] === "filled";
}

function taperSteps({ heightsM, chances }: TaperResult): readonly TaperStep[] {
  return heightsM.map((heightM, i) => ({ heightM, confidence: 1 - chances[i] }));
}

function closedBound(end: DrawnEnd | undefined): number | undefined {
  return end?.outcome === "closed" || end?.outcome === "in-hiatus" ? end.boundM : undefined;
}

function FocusBand({ x, y }: Pick<TaxonRangeProps, "x" | "y">): ReactElement {
  const { top, bottom } = spanOf(y);
  return <path d={boxPath(x - PITCH / 2, top, PITCH, bottom - top)} fill={COLOURS.blue} fillOpacity={0.09} />;
}

function EndSigns({ x, y, colour, taxon }: TaxonRangeProps): ReactElement {
  const { top, base, firstM, lastM } = taxon;
  return (
    <>
      {top && <EndSign {...{ x, y, colour, ...top }} end="top" findM={lastM} width={BAR_WIDTH} />}
      {base && <EndSign {...{ x, y, colour, ...base }} end="base" findM={firstM} width={BAR_WIDTH} />}
    </>
  );
}

function InclusiveLine({ x, y, colour, taxon }: TaxonRangeProps): ReactElement | null {
  const span = taxon.inclusiveM === undefined ? undefined : clippedSpan(y, taxon.lastM, taxon.inclusiveM);
  if (span === undefined) return null;
  const d = `M${round(x)} ${round(span.bottom)}V${round(span.top)}`;
  return <path d={d} fill="none" stroke={colour} strokeWidth={0.7} strokeDasharray="0.7 1.1" />;
}

const LEANING_X = BAR_WIDTH / 2 + 1.7;

/** Beside the bar: from the nearest bound to the furthest as the assumed shape of recovery changes. */
function LeaningLine({ x, y, taxon }: TaxonRangeProps): ReactElement | null {
  const { leaning } = taxon;
  const span = leaning && clippedSpan(y, leaning.nearestM, leaning.furthestM);
  if (leaning === undefined || span === undefined) return null;
  const at = round(x + LEANING_X);
  const foot = (heightM: number) =>
    isInFrame(y, heightM) ? `M${round(at - 0.8)} ${round(y(heightM))}h1.6` : "";
  const d = `M${at} ${round(span.bottom)}V${round(span.top)}${foot(leaning.nearestM)}${foot(leaning.furthestM)}`;
  return <path d={d} fill="none" stroke={COLOURS.soft} strokeOpacity={0.7} strokeWidth={0.4} />;
}

const SIGN_LIFT = 4;

function RoleSign({ x, y, colour, taxon }: TaxonRangeProps): ReactElement | null {
  if (taxon.role !== "survivor" && !taxon.reachesTop) return null;
  const d = markPath("triangle", x, spanOf(y).top - SIGN_LIFT, 2.1);
  if (taxon.role === "survivor") return <path d={d} fill={colour} />;
  return <path d={d} fill={COLOURS.paper} stroke={colour} strokeWidth={0.6} />;
}
