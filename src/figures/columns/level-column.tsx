import { area, line } from "d3";
import type { ReactElement } from "react";
import { clippedSpan, type HeightScale, isInFrame, spanOf } from "../height-scale.ts";
import { WAS_PAINT } from "../legend-timing-swatch.tsx";
import { boxPath } from "../marks/mark-path.ts";
import { round } from "../numbers.ts";
import { COLOURS } from "../theme.ts";
import { ColumnGround } from "./column-ground.tsx";
import { ColumnHead } from "./column-head.tsx";
import type { LevelSet } from "./density-column.tsx";
import { linearColumn } from "./value-scale.ts";

/** How sets of levels are painted: filled where they assume one level, hollow where they do not. */
export function levelSetPaint(kind: "if-one" | "joint") {
  return {
    fill: kind === "if-one" ? COLOURS.blue : COLOURS.paper,
    fillOpacity: kind === "if-one" ? 0.35 : 1,
    stroke: COLOURS.blue,
    strokeWidth: kind === "if-one" ? 0.7 : 0.9,
    strokeDasharray: kind === "if-one" ? undefined : "2 1.2",
  };
}

export interface ChancePoint {
  readonly heightM: number;
  readonly p: number;
}

interface LevelColumnProps {
  readonly x: number;
  readonly width: number;
  readonly y: HeightScale;
  readonly title: string;
  readonly unit: string;
  readonly curve: readonly ChancePoint[];
  /** p under which a level is excluded. */
  readonly limit: number;
  readonly ifOne?: LevelSet;
  readonly joint: readonly LevelSet[];
  /** The curve before a choice that is only tried. */
  readonly ghost?: readonly ChancePoint[];
}

export const LEVEL_LANE = 9;
const LANE_GAP = 4;

/** Levels at which all could have ended: p along the section, and beside it the sets of levels not excluded. */
export function LevelColumn(props: LevelColumnProps): ReactElement {
  const { x, width, y, title, unit, curve, limit, ifOne, joint, ghost = [] } = props;
  const highest = Math.max(2 * limit, ...curve.map((point) => point.p));
  const { scale, tickLabels } = linearColumn([0, Math.min(1, highest)], width);
  const lane = (place: number) => x + width + LANE_GAP + place * (LEVEL_LANE + LANE_GAP);
  return (
    <g>
      <ColumnHead x={x} top={spanOf(y).top} title={title} unit={unit} />
      <ColumnGround x={x} width={width} y={y} scale={scale} tickLabels={tickLabels} />
      <ChanceCurve x={x} y={y} scale={scale} curve={curve} />
      <GhostCurve x={x} y={y} scale={scale} curve={ghost} />
      <LimitLine x={x + scale(limit)} y={y} />
      {ifOne && <path d={setBoxes([ifOne], lane(0), y)} {...levelSetPaint("if-one")} />}
      {joint.length > 0 && <path d={setBoxes(joint, lane(1), y)} {...levelSetPaint("joint")} />}
    </g>
  );
}

export function levelColumnWidth(width: number): number {
  return width + 2 * (LANE_GAP + LEVEL_LANE);
}

function LimitLine({ x, y }: { readonly x: number; readonly y: HeightScale }): ReactElement {
  const { top, bottom } = spanOf(y);
  return (
    <path
      d={`M${round(x)} ${round(top)}V${round(bottom)}`}
      stroke={COLOURS.soft}
      strokeWidth={0.5}
      strokeDasharray="2 1.5"
    />
  );
}

interface CurveProps {
  readonly x: number;
  readonly y: HeightScale;
  readonly scale: (p: number) => number;
  readonly curve: readonly ChancePoint[];
}

function ChanceCurve({ x, y, scale, curve }: CurveProps): ReactElement | null {
  const shown = curve.filter((point) => isInFrame(y, point.heightM));
  if (shown.length === 0) return null;
  const across = (point: ChancePoint) => x + scale(point.p);
  const filled = area<ChancePoint>()
    .y((point) => round(y(point.heightM)))
    .x0(round(x + scale(0)))
    .x1((point) => round(across(point)));
  const edge = line<ChancePoint>(
    (point) => round(across(point)),
    (point) => round(y(point.heightM)),
  );
  return (
    <>
      <path d={filled(shown) ?? ""} fill={COLOURS.blue} opacity={0.28} />
      <path d={edge(shown) ?? ""} fill="none" stroke={COLOURS.blue} strokeWidth={0.9} />
    </>
  );
}

function GhostCurve({ x, y, scale, curve }: CurveProps): ReactElement | null {
  const shown = curve.filter((point) => isInFrame(y, point.heightM));
  if (shown.length === 0) return null;
  const edge = line<ChancePoint>(
    (point) => round(x + scale(point.p)),
    (point) => round(y(point.heightM)),
  );
  return <path d={edge(shown) ?? ""} {...WAS_PAINT} />;
}

const THINNEST = 1.2;

function setBoxes(sets: readonly LevelSet[], x: number, y: HeightScale): string {
  return sets
    .flatMap(({ baseM, topM }) => {
      const span = clippedSpan(y, baseM, topM);
      if (span === undefined) return [];
      const height = Math.max(THINNEST, span.bottom - span.top);
      return [boxPath(x, (span.top + span.bottom - height) / 2, LEVEL_LANE, height)];
    })
    .join("");
}
