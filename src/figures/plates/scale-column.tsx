import { type HeightScale, type Lens, spanOf } from "../height-scale.ts";
import { ScaleBar, scaleBarLength } from "../marks/scale-bar.tsx";
import { textWidth } from "../text.ts";
import { TEXT } from "../theme.ts";
import type { PlateColumn } from "./plate-columns.ts";
import { roundedWords } from "./rounded-words.ts";

const LONGEST_BAR = 70;
const INSET = 3;
const LABEL_X = 7;
/** `scaleBarLength` gives a third of what it is asked for. */
const THIRDS = 2.4;

interface Bar {
  readonly y: number;
  readonly length: number;
  readonly label: string;
}

/** Upright scale bars: one for the section, and a second for the band that a lens magnifies. */
export function scaleColumn(y: HeightScale, lens?: Lens): PlateColumn {
  const bars = lens === undefined ? [wholeBar(y)] : [belowLens(y, lens), insideLens(y, lens)];
  const width = LABEL_X + Math.max(...bars.map((bar) => textWidth(bar.label, TEXT.unit)));
  return {
    key: "scale",
    width,
    draw: (x) => bars.map((bar) => <ScaleBar key={bar.label} x={x} {...bar} />),
  };
}

function wholeBar(y: HeightScale): Bar {
  const { top, bottom } = spanOf(y);
  return bar(bottom - INSET, Math.min(LONGEST_BAR, bottom - top - 2 * INSET), pointsPerMetre(y));
}

/** In the larger of the two stretches beside the lens. */
function belowLens(y: HeightScale, lens: Lens): Bar {
  const { top, bottom } = spanOf(y);
  const [above, below] = [y(lens.topM) - top, bottom - y(lens.baseM)];
  const foot = below >= above ? bottom - INSET : y(lens.topM) - INSET;
  return bar(
    foot,
    Math.min(LONGEST_BAR, Math.max(above, below) - 2 * INSET),
    pointsPerMetre(y, lens) / lens.magnification,
  );
}

function insideLens(y: HeightScale, lens: Lens): Bar {
  const [base, top] = [y(lens.baseM), y(lens.topM)];
  const made = bar(base - INSET, Math.min(LONGEST_BAR, base - top - 2 * INSET), pointsPerMetre(y, lens));
  return { ...made, label: `${made.label}, ×${roundedWords(lens.magnification)}` };
}

function pointsPerMetre(y: HeightScale, lens?: Lens): number {
  const [low, high] = lens ? [lens.baseM, lens.topM] : [Math.min(...y.domain()), Math.max(...y.domain())];
  return Math.abs(y(high) - y(low)) / (high - low);
}

/** The longest round bar within `room` points. */
function bar(y: number, room: number, scale: number): Bar {
  const longest = Math.max(room, 1) / scale;
  const metres =
    scaleBarLength(longest * THIRDS) > longest ? scaleBarLength(longest) : scaleBarLength(longest * THIRDS);
  return { y, length: metres * scale, label: lengthLabel(metres) };
}

function lengthLabel(metres: number): string {
  if (metres >= 1) return `${roundedWords(metres)} m`;
  return metres >= 0.01 ? `${roundedWords(metres * 100)} cm` : `${roundedWords(metres * 1000)} mm`;
}
