import type { ReactElement } from "react";
import { COLOURS } from "../theme.ts";
import { PATTERN_TILES, type PatternId, type PatternTile } from "./pattern-tiles.ts";

const STROKE_WIDTH = 0.35;

export function patternElementId(plateId: string, pattern: PatternId): string {
  return `${plateId}-${pattern}`;
}

/** The paint of an area with this pattern on this plate. */
export function patternFill(plateId: string, pattern: PatternId): string {
  return `url(#${patternElementId(plateId, pattern)})`;
}

interface PatternDefinitionsProps {
  readonly plateId: string;
  /** The patterns the plate uses; each is defined once, whatever the order. */
  readonly patterns: Iterable<PatternId>;
}

export function PatternDefinitions({ plateId, patterns }: PatternDefinitionsProps): ReactElement {
  const used = Array.from(new Set(patterns)).toSorted();
  return (
    <defs>
      {used.map((pattern) => (
        <Pattern key={pattern} id={patternElementId(plateId, pattern)} tile={PATTERN_TILES[pattern]} />
      ))}
    </defs>
  );
}

function Pattern({ id, tile }: { readonly id: string; readonly tile: PatternTile }): ReactElement {
  const { width, height, strokes, solids, ground } = tile;
  const fill = ground === "ink" ? COLOURS.ink : COLOURS.paper;
  return (
    <pattern id={id} width={width} height={height} patternUnits="userSpaceOnUse">
      <rect width={width} height={height} fill={fill} />
      {strokes && <path d={strokes} fill="none" stroke={COLOURS.ink} strokeWidth={STROKE_WIDTH} />}
      {solids && <path d={solids} fill={COLOURS.ink} />}
    </pattern>
  );
}
