import { formatGiven } from "../../core/study/heights.ts";
import { isInFrame, type Span } from "../height-scale.ts";
import { spaceOut } from "../layout/space-out.ts";
import { round } from "../numbers.ts";
import { PlateText } from "../plate-text.tsx";
import { fitText, textWidth } from "../text.ts";
import { COLOURS, TEXT } from "../theme.ts";
import type { PlacedPost } from "./post-panel.tsx";

/** The name of a horizon at the right of the last section that has it. */
export interface FenceLabel {
  readonly name: string;
  readonly text: string;
  readonly detail: string;
  readonly y: number;
  readonly isDatum: boolean;
  /** Right edge of the section the label stands beside. */
  readonly x: number;
  readonly isLast: boolean;
}

const LONGEST = 110;
const LONGEST_BETWEEN = 50;
const LEAD = 10;
const LINE = 8.4;
const STEP = 2 * LINE + 2.6;

export function fenceLabels(panels: readonly PlacedPost[], datum: string | undefined): readonly FenceLabel[] {
  const labels = new Map<string, FenceLabel>();
  panels.forEach(({ section, horizons, y, right }, i) => {
    const isLast = i === panels.length - 1;
    const room = isLast ? LONGEST : LONGEST_BETWEEN;
    for (const { horizon, positionM } of horizons) {
      if (!isInFrame(y, positionM)) continue;
      const text = fitText(horizon, room, TEXT.labelStrong);
      const detail = fitText(formatGiven(positionM, section), room, TEXT.unit);
      labels.set(horizon, { name: horizon, text, detail, y: y(positionM), isDatum: horizon === datum, x: right, isLast });
    }
  });
  return [...labels.values()];
}

export function fenceLabelsWidth(labels: readonly FenceLabel[]): number {
  const widths = labels
    .filter((label) => label.isLast)
    .flatMap(({ text, detail }) => [textWidth(text, TEXT.labelStrong), textWidth(detail, TEXT.unit)]);
  return widths.length === 0 ? 0 : LEAD + Math.max(...widths);
}

interface FenceLabelsProps {
  readonly span: Span;
  readonly labels: readonly FenceLabel[];
}

/** Labels beside each section, moved apart where they would touch. */
export function FenceLabels({ span, labels }: FenceLabelsProps) {
  const edges = [...new Set(labels.map((label) => label.x))];
  return (
    <g>
      {edges.map((edge) => (
        <LabelColumn key={edge} edge={edge} span={span} labels={labels.filter((label) => label.x === edge)} />
      ))}
    </g>
  );
}

interface LabelColumnProps {
  readonly edge: number;
  readonly span: Span;
  readonly labels: readonly FenceLabel[];
}

function LabelColumn({ edge, span, labels }: LabelColumnProps) {
  const kept = labels.slice(0, Math.max(1, Math.floor((span.bottom - span.top) / STEP)));
  const places = spaceOut(kept.map((label) => label.y), STEP, [span.top + LINE, span.bottom - LINE]);
  return kept.map((label, i) => {
    const colour = label.isDatum ? COLOURS.rust : COLOURS.ink;
    const middle = places[i];
    return (
      <g key={label.name} data-horizon={label.name}>
        <path
          d={`M${round(edge + 1)} ${round(label.y)}L${round(edge + LEAD - 2)} ${round(middle)}`}
          fill="none"
          stroke={colour}
          strokeWidth={0.4}
        />
        <PlateText x={edge + LEAD} y={middle - 1} style={TEXT.labelStrong} colour={colour}>
          {label.text}
        </PlateText>
        <PlateText x={edge + LEAD} y={middle + LINE - 1.4} style={TEXT.unit} colour={COLOURS.soft}>
          {label.detail}
        </PlateText>
      </g>
    );
  });
}
