import type { ReactElement } from "react";
import { clippedSpan, type HeightScale } from "../height-scale.ts";
import { boxPath } from "../marks/mark-path.ts";
import { PlateText } from "../plate-text.tsx";
import { capHeight, fitText } from "../text.ts";
import { COLOURS, TEXT } from "../theme.ts";

/** A stretch of rock under one name. */
export interface NamedRock {
  readonly name: string;
  readonly baseM: number;
  readonly topM: number;
}

interface FormationColumnProps {
  readonly x: number;
  readonly y: HeightScale;
  readonly units: readonly NamedRock[];
}

export const FORMATION_WIDTH = 11;
const INSET = 3;
const SHORTEST_NAME = 4;

/** Formations or members beside the log, their names upright along them where there is room. */
export function FormationColumn({ x, y, units }: FormationColumnProps): ReactElement {
  return (
    <g>
      {units.map(({ name, baseM, topM }) => {
        const span = clippedSpan(y, baseM, topM);
        if (span === undefined) return null;
        const height = span.bottom - span.top;
        const shown = fitText(name, height - 2 * INSET, TEXT.unit);
        const place = { x: x + FORMATION_WIDTH / 2 + capHeight(TEXT.unit) / 2, y: span.bottom - INSET };
        return (
          <g key={`${baseM} ${name}`}>
            <path
              d={boxPath(x, span.top, FORMATION_WIDTH, height)}
              fill="none"
              stroke={COLOURS.ink}
              strokeWidth={0.35}
            />
            {(shown === name || shown.length > SHORTEST_NAME) && (
              <PlateText {...place} style={TEXT.unit} turn={-90}>
                {shown}
              </PlateText>
            )}
          </g>
        );
      })}
    </g>
  );
}

/** Neighbouring beds under one name, joined; beds without a name are left out. */
export function namedRock(
  beds: readonly { readonly baseM: number; readonly topM: number; readonly name: string }[],
): readonly NamedRock[] {
  const units: NamedRock[] = [];
  for (const bed of beds.toSorted((a, b) => a.baseM - b.baseM)) {
    const before = units.at(-1);
    if (bed.name === "") continue;
    if (before !== undefined && before.name === bed.name)
      units[units.length - 1] = { ...before, topM: bed.topM };
    else units.push(bed);
  }
  return units;
}
