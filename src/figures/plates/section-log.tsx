import type { Analysis } from "../../core/analysis-result.ts";
import { formatGiven } from "../../core/study/heights.ts";
import type { Section } from "../../core/study/model.ts";
import { clippedSpan, type HeightScale } from "../height-scale.ts";
import { boxPath } from "../marks/mark-path.ts";
import { round } from "../numbers.ts";
import { COLOURS } from "../theme.ts";
import type { Drawing, SectionView } from "./drawing.ts";
import { axisColumns, lineLeft, logColumns, railColumn } from "./log-columns.tsx";
import { placeColumns } from "./plate-columns.ts";
import { BODY_TOP, MARGIN, setSheet } from "./plate-sheet.tsx";
import { sectionFrame } from "./section-frame.ts";
import { slugOf } from "./slugs.ts";

/** What one row of a table says of a section, in metres of height: a level where both ends are one. */
export interface MarkedRow {
  readonly baseM: number;
  readonly topM: number;
  readonly label: string;
}

const BODY_HEIGHT = 420;
const NARROWEST = 150;

/**
 * A section as it was logged and searched, narrow enough to stand beside a table; drawn once for whatever rows are marked
 * in it one after another.
 */
export function markableLog(
  analysis: Analysis,
  view: SectionView,
): (marked: MarkedRow | undefined) => Drawing {
  const names = analysis.study.sections.map((section) => section.name);
  const id = `log-${slugOf(view.section, names, "section")}`;
  const span = { top: BODY_TOP, bottom: BODY_TOP + (view.bodyHeight ?? BODY_HEIGHT) };
  const frame = sectionFrame(analysis, view.section, { view: { ...view, vertical: "own" }, span });
  const { section, y } = frame;
  const columns = [
    ...axisColumns({ ...frame, second: undefined }),
    ...logColumns(id, frame),
    ...railColumn(id, analysis, frame),
  ];
  const { placed, right } = placeColumns(columns, MARGIN + POINTER);
  return (marked) =>
    setSheet({
      id,
      title: section.title,
      subtitle: `${section.axis === "depth" ? "Depth" : "Height"} in ${section.unit}`,
      description: describe(section, marked),
      right: Math.max(right, lineLeft(placed) + 24),
      bottom: span.bottom,
      narrowest: NARROWEST,
      columns: placed,
      body: marked && <RowMark y={y} marked={marked} left={lineLeft(placed)} right={right} />,
      panels: [{ section: section.name, left: MARGIN, right, ...span, scale: y }],
      view,
    });
}

function describe(section: Section, marked: MarkedRow | undefined): string {
  const log = `The log of ${section.title} and who searched where`;
  if (marked === undefined) return `${log}; no row is marked.`;
  const { baseM, topM, label } = marked;
  const at =
    baseM === topM
      ? `at ${formatGiven(baseM, section)}`
      : `from ${formatGiven(baseM, section)} to ${formatGiven(topM, section)}`;
  return `${log}; ${label} is ${at}.`;
}

const POINTER = 7;

interface RowMarkProps {
  readonly y: HeightScale;
  readonly marked: MarkedRow;
  readonly left: number;
  readonly right: number;
}

/** A band or a line across the log, and a wedge at its left that points at it. */
function RowMark({ y, marked: { baseM, topM, label }, left, right }: RowMarkProps) {
  const span = clippedSpan(y, baseM, topM);
  if (span === undefined) return null;
  const { top, bottom } = span;
  const middle = (top + bottom) / 2;
  return (
    <g data-mark="row">
      <title>{label}</title>
      {bottom - top > 1.5 && (
        <path d={boxPath(left, top, right - left, bottom - top)} fill={COLOURS.blue} fillOpacity={0.18} />
      )}
      <path
        d={`M${round(left)} ${round(top)}H${round(right)}M${round(left)} ${round(bottom)}H${round(right)}`}
        stroke={COLOURS.blue}
        strokeWidth={0.9}
      />
      <path
        d={`M${round(MARGIN - 4)} ${round(middle - 4)}L${round(MARGIN + POINTER - 3)} ${round(middle)}L${round(MARGIN - 4)} ${round(middle + 4)}Z`}
        fill={COLOURS.blue}
      />
    </g>
  );
}
