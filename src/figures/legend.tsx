import type { ReactElement } from "react";
import { type LegendSign, LegendSwatch, SWATCH_HEIGHT, SWATCH_WIDTH } from "./legend-swatch.tsx";
import { PlateText } from "./plate-text.tsx";
import { fitText, textWidth } from "./text.ts";
import { TEXT } from "./theme.ts";

export interface LegendEntry {
  readonly sign: LegendSign;
  readonly label: string;
}

interface PlacedEntry extends LegendEntry {
  readonly x: number;
  readonly y: number;
}

export interface LegendLayout {
  readonly entries: readonly PlacedEntry[];
  readonly height: number;
}

const LABEL_GAP = 4;
const ENTRY_GAP = 12;
const ROW = 12.5;

/** Sets the entries in rows of the width given, in their order. */
export function legendLayout(entries: readonly LegendEntry[], width: number): LegendLayout {
  const placed: PlacedEntry[] = [];
  let [x, row] = [0, 0];
  for (const entry of entries) {
    const label = fitText(entry.label, width - SWATCH_WIDTH - LABEL_GAP, TEXT.unit);
    const length = SWATCH_WIDTH + LABEL_GAP + textWidth(label, TEXT.unit);
    if (x > 0 && x + length > width) [x, row] = [0, row + 1];
    placed.push({ ...entry, label, x, y: row * ROW });
    x += length + ENTRY_GAP;
  }
  return { entries: placed, height: placed.length === 0 ? 0 : (row + 1) * ROW };
}

interface LegendProps {
  readonly plateId: string;
  readonly x: number;
  readonly y: number;
  readonly layout: LegendLayout;
}

export function Legend({ plateId, x, y, layout }: LegendProps): ReactElement {
  return (
    <g>
      {layout.entries.map((entry) => (
        <g key={`${entry.sign.kind} ${entry.label}`}>
          <LegendSwatch plateId={plateId} x={x + entry.x} y={y + entry.y} sign={entry.sign} />
          <PlateText
            x={x + entry.x + SWATCH_WIDTH + LABEL_GAP}
            y={y + entry.y + SWATCH_HEIGHT / 2 + 2.5}
            style={TEXT.unit}
          >
            {entry.label}
          </PlateText>
        </g>
      ))}
    </g>
  );
}
