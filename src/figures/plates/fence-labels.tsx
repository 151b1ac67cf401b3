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
}

/** What stands at the right of one section: labels, and the ties that leave it, which labels keep clear of. */
export interface LabelColumn {
  readonly x: number;
  readonly labels: readonly FenceLabel[];
  readonly tiesY: readonly number[];
}

const LONGEST = 110;
const LONGEST_BETWEEN = 70;
const LEAD = 10;
const LINE = 8.4;
const STEP = 2 * LINE + 2.6;

export function labelColumns(
  panels: readonly PlacedPost[],
  datum: string | undefined,
): readonly LabelColumn[] {
  const lastWith = new Map(
    panels.flatMap((panel, i) => shownHorizons(panel).map(({ horizon }) => [horizon, i] as const)),
  );
  return panels.map((panel, i) => {
    const room = i === panels.length - 1 ? LONGEST : LONGEST_BETWEEN;
    const labels = shownHorizons(panel)
      .filter(({ horizon }) => lastWith.get(horizon) === i)
      .map(({ horizon, positionM }) => ({
        name: horizon,
        text: fitText(horizon, room, TEXT.labelStrong),
        detail: fitText(formatGiven(positionM, panel.section), room, TEXT.unit),
        y: panel.y(positionM),
        isDatum: horizon === datum,
      }));
    const leaving = shownHorizons(panel).filter(({ horizon }) => lastWith.get(horizon) !== i);
    return { x: panel.right, labels, tiesY: leaving.map(({ positionM }) => panel.y(positionM)) };
  });
}

function shownHorizons({ horizons, y }: PlacedPost) {
  return horizons.filter((horizon) => isInFrame(y, horizon.positionM));
}

/** Room the labels of the last section need, in points. */
export function labelColumnWidth(column: LabelColumn | undefined): number {
  const widths = (column?.labels ?? []).flatMap(({ text, detail }) => [
    textWidth(text, TEXT.labelStrong),
    textWidth(detail, TEXT.unit),
  ]);
  return widths.length === 0 ? 0 : LEAD + Math.max(...widths);
}

interface FenceLabelsProps {
  readonly span: Span;
  readonly column: LabelColumn;
}

/** Labels beside a section, moved apart where they would touch each other or a tie. */
export function FenceLabels({ span, column }: FenceLabelsProps) {
  const { x, labels, tiesY } = column;
  const most = Math.max(1, Math.floor((span.bottom - span.top) / STEP) - tiesY.length);
  const kept = labels.slice(0, most);
  const wanted = [...kept.map((label) => label.y), ...tiesY];
  const places = spaceOut(wanted, STEP, [span.top + LINE, span.bottom - LINE]);
  return (
    <g>
      {kept.map((label, i) => (
        <FenceWords key={label.name} x={x} label={label} middle={places[i]} />
      ))}
    </g>
  );
}

interface FenceWordsProps {
  readonly x: number;
  readonly label: FenceLabel;
  readonly middle: number;
}

function FenceWords({ x, label, middle }: FenceWordsProps) {
  const colour = label.isDatum ? COLOURS.rust : COLOURS.ink;
  const lead = `M${round(x + 1)} ${round(label.y)}L${round(x + LEAD - 2)} ${round(middle)}`;
  return (
    <g data-horizon={label.name}>
      <path d={lead} fill="none" stroke={colour} strokeWidth={0.4} />
      <PlateText x={x + LEAD} y={middle - 1} style={TEXT.labelStrong} colour={colour}>
        {label.text}
      </PlateText>
      <PlateText x={x + LEAD} y={middle + LINE - 1.4} style={TEXT.unit} colour={COLOURS.soft}>
        {label.detail}
      </PlateText>
    </g>
  );
}
