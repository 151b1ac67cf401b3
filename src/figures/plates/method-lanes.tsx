import type { ReactElement } from "react";
import { clippedSpan, type HeightScale, isInFrame, spanOf } from "../height-scale.ts";
import { EndSign } from "../marks/end-sign.tsx";
import { boxPath, markPath } from "../marks/mark-path.ts";
import { SlantedNames } from "../marks/slanted-names.tsx";
import { round } from "../numbers.ts";
import { COLOURS, type MarkShape, TEXT } from "../theme.ts";
import type { DrawnEnd } from "./charted-taxa.ts";
import { boundName, type ComparedMethod, type ComparedTaxon } from "./compared-ends.ts";

export const LANE = 13;
const MARK = 6;
const POINTS: Readonly<Record<ComparedMethod["stance"], MarkShape>> = {
  "holds-under-decline": "diamond",
  "fits-recovery": "triangle",
  "even-recovery": "circle",
};

interface LaneProps {
  readonly x: number;
  readonly y: HeightScale;
  readonly colour: string;
  readonly compared: ComparedTaxon;
}

interface MethodLaneProps extends LaneProps {
  readonly of: ComparedMethod;
}

/** One method: the interval of each end from the outermost find to its bound, and the point. */
export function MethodLane({ x, y, colour, compared, of }: MethodLaneProps): ReactElement {
  const { firstM, lastM } = compared.taxon;
  const { top, bottom } = spanOf(y);
  const style = of.isLeading ? TEXT.labelStrong : TEXT.label;
  return (
    <g data-method={of.method}>
      {of.isLeading && <path d={boxPath(x - LANE / 2, top, LANE, bottom - top)} fill={COLOURS.column} />}
      {of.top && <Interval {...{ x, y, colour, of }} end={of.top} side="top" findM={lastM} />}
      {of.base && <Interval {...{ x, y, colour, of }} end={of.base} side="base" findM={firstM} />}
      <SlantedNames names={[{ text: of.method, markX: x, x }]} y={bottom} style={style} />
    </g>
  );
}

interface IntervalProps extends Omit<MethodLaneProps, "compared"> {
  readonly end: DrawnEnd;
  readonly side: "top" | "base";
  readonly findM: number;
}

function Interval({ x, y, colour, of, end, side, findM }: IntervalProps): ReactElement {
  const reachM = reachOf(end, side, y);
  const span =
    reachM === undefined ? undefined : clippedSpan(y, Math.min(findM, reachM), Math.max(findM, reachM));
  const isBoundShown = end.boundM !== undefined && isInFrame(y, end.boundM);
  return (
    <>
      {span && (
        <path
          d={`M${round(x)} ${round(span.bottom)}V${round(span.top)}`}
          stroke={colour}
          strokeWidth={1}
          strokeDasharray={of.isTooShort ? "2 1.2" : undefined}
        />
      )}
      {isBoundShown && (
        <path
          d={`M${round(x - MARK / 2)} ${round(y(end.boundM ?? 0))}h${MARK}`}
          stroke={colour}
          strokeWidth={0.9}
        />
      )}
      {end.pointM !== undefined && isInFrame(y, end.pointM) && (
        <path d={markPath(POINTS[of.stance], x, y(end.pointM), 1.8)} fill={colour} />
      )}
      <EndSign {...{ x, y, colour, findM, ...end }} end={side} width={MARK} />
    </>
  );
}

/** How far an interval is drawn: to its bound, or out of the frame where it leaves the section or has none. */
function reachOf({ outcome, boundM }: DrawnEnd, side: "top" | "base", y: HeightScale): number | undefined {
  if (outcome === "undefined" || outcome === "not-applicable" || outcome === "empty") return undefined;
  const extent = y.domain();
  const edge = side === "top" ? Math.max(...extent) : Math.min(...extent);
  return outcome === "leaves-section" || outcome === "open" ? edge : boundM;
}

/** How far the upper end leans on the shape of recovery: the whole spread first, then the bound under each shape. */
export function LeaningLanes({ x, y, colour, compared }: LaneProps): ReactElement | null {
  const { leaning } = compared;
  if (leaning === undefined) return null;
  const { nearestM, furthestM, bounds } = leaning;
  const spread =
    nearestM === undefined || furthestM === undefined ? undefined : clippedSpan(y, nearestM, furthestM);
  const bottom = spanOf(y).bottom;
  return (
    <g data-leaning={compared.taxon.taxon}>
      {spread && (
        <path
          d={boxPath(x - MARK / 2, spread.top, MARK, Math.max(0.8, spread.bottom - spread.top))}
          fill={COLOURS.blue}
          fillOpacity={0.28}
          stroke={COLOURS.blue}
          strokeWidth={0.6}
        />
      )}
      <SlantedNames names={[{ text: LEANING_NAME, markX: x, x }]} y={bottom} style={TEXT.labelStrong} />
      {bounds.map((bound, i) => {
        const at = x + (i + 1) * LANE;
        const end = { outcome: bound.outcome, boundM: bound.boundM };
        return (
          <g key={boundName(bound)}>
            {bound.boundM !== undefined && isInFrame(y, bound.boundM) && (
              <path
                d={`M${round(at - MARK / 2)} ${round(y(bound.boundM))}h${MARK}`}
                stroke={COLOURS.blue}
                strokeWidth={0.9}
              />
            )}
            <EndSign x={at} {...{ y, colour, ...end }} end="top" findM={leaning.lastM} width={MARK} />
            <SlantedNames
              names={[{ text: boundName(bound), markX: at, x: at }]}
              y={bottom}
              style={TEXT.label}
            />
          </g>
        );
      })}
    </g>
  );
}

export const LEANING_NAME = "nearest to furthest";
