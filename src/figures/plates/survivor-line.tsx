import { markPath } from "../marks/mark-path.ts";
import { PlateText } from "../plate-text.tsx";
import { textWidth, wrapText } from "../text.ts";
import { COLOURS, TEXT } from "../theme.ts";
import { taxonLabel } from "./taxon-range.tsx";

const LINE = 10;
const WORD = "Survivors, not in the test:";
const WORD_X = 9;
const INDENT = WORD_X + textWidth(WORD, TEXT.unit) + 4;
const MOST_LINES = 4;

/** Names of the survivors in lines of the width given; the last says how many more there are. */
export function survivorLines(names: readonly string[], width: number): readonly string[] {
  if (names.length === 0) return [];
  const labels = names.map(taxonLabel);
  for (let shown = labels.length; shown > 0; shown--) {
    const more = labels.length - shown;
    const text = labels.slice(0, shown).join(", ") + (more > 0 ? ` and ${more} more` : "");
    const lines = wrapText(text, width - INDENT, TEXT.taxon);
    if (lines.length <= MOST_LINES) return lines;
  }
  return [`${labels.length}`];
}

export function survivorDepth(lines: readonly string[]): number {
  return lines.length * LINE;
}

interface SurvivorLineProps {
  readonly x: number;
  readonly y: number;
  readonly lines: readonly string[];
}

/** Who is found above the main horizon: counted and named, never tested as if it ended there. */
export function SurvivorLine({ x, y, lines }: SurvivorLineProps) {
  if (lines.length === 0) return null;
  return (
    <g>
      <path d={markPath("triangle", x + 3, y - 2.4, 2.2)} fill={COLOURS.ink} />
      <PlateText x={x + WORD_X} y={y} style={TEXT.unit} colour={COLOURS.soft}>
        {WORD}
      </PlateText>
      {lines.map((line, i) => (
        <PlateText key={line} x={x + INDENT} y={y + i * LINE} style={TEXT.taxon}>
          {line}
        </PlateText>
      ))}
    </g>
  );
}
