import type { ReactElement } from "react";
import { clippedSpan, type HeightScale, isInFrame, spanOf } from "../height-scale.ts";
import type { PatternId } from "../lithology/pattern-tiles.ts";
import { patternFill } from "../lithology/patterns.tsx";
import { boxPath } from "../marks/mark-path.ts";
import { round } from "../numbers.ts";
import { PlateText } from "../plate-text.tsx";
import { COLOURS, type GroupSign, TEXT } from "../theme.ts";
import type { HiddenRock } from "./lithology-column.tsx";

export interface SearchedSample {
  readonly heightM: number;
  /** Whether anything of the group was found. */
  readonly isFound: boolean;
}

export interface SearchedGroup {
  readonly name: string;
  readonly sign: GroupSign;
  readonly samples: readonly SearchedSample[];
}

interface SearchRailProps {
  readonly plateId: string;
  readonly x: number;
  readonly y: HeightScale;
  readonly groups: readonly SearchedGroup[];
  readonly hidden?: readonly HiddenRock[];
}

const LANE = 7;
const GAP = 2;
const TICK_HEIGHT = 1.1;

export function searchRailWidth(groups: number): number {
  return groups * (LANE + GAP) - GAP;
}

/** The patterns a rail needs in its plate's definitions. */
export function searchRailPatterns(hidden: readonly HiddenRock[] = []): readonly PatternId[] {
  return hidden.map(({ kind }) => kind);
}

/**
 * Who looked where: a lane per group, a filled tick at a sample that held it, an open one at a sample searched in vain; nothing where
 * nobody looked, and hatching where there was no rock to search.
 */
export function SearchRail({ plateId, x, y, groups, hidden = [] }: SearchRailProps): ReactElement {
  const width = searchRailWidth(groups.length);
  return (
    <g>
      {groups.map((group, i) => (
        <SearchLane key={group.name} x={x + i * (LANE + GAP)} y={y} group={group} />
      ))}
      {hidden.map(({ kind, baseM, topM }) => {
        const span = clippedSpan(y, baseM, topM);
        if (span === undefined) return null;
        const box = boxPath(x, span.top, width, span.bottom - span.top);
        return <path key={`${kind} ${baseM}`} d={box} fill={patternFill(plateId, kind)} opacity={0.5} />;
      })}
    </g>
  );
}

interface SearchLaneProps {
  readonly x: number;
  readonly y: HeightScale;
  readonly group: SearchedGroup;
}

function SearchLane({ x, y, group }: SearchLaneProps): ReactElement {
  const { top, bottom } = spanOf(y);
  const shown = group.samples.filter((sample) => isInFrame(y, sample.heightM));
  const filled = shown.filter((sample) => sample.isFound).map((sample) => filledTick(x, y(sample.heightM)));
  const open = shown.filter((sample) => !sample.isFound).map((sample) => openTick(x, y(sample.heightM)));
  const { colour, letter } = group.sign;
  return (
    <>
      <PlateText x={x + LANE / 2} y={top - 8} style={TEXT.labelStrong} anchor="middle" colour={colour}>
        {letter}
      </PlateText>
      <path
        d={`M${round(x + LANE / 2)} ${round(top)}V${round(bottom)}`}
        stroke={COLOURS.hair}
        strokeWidth={0.4}
      />
      {open.length > 0 && <path d={open.join("")} fill={COLOURS.paper} stroke={colour} strokeWidth={0.35} />}
      {filled.length > 0 && <path d={filled.join("")} fill={colour} />}
    </>
  );
}

export function filledTick(x: number, y: number): string {
  return boxPath(x, y - TICK_HEIGHT / 2, LANE, TICK_HEIGHT);
}

export function openTick(x: number, y: number): string {
  return boxPath(x + 2, y - TICK_HEIGHT / 2, LANE - 4, TICK_HEIGHT);
}
