import type { Analysis } from "../../core/analysis-result.ts";
import { contactPath } from "../columns/contact.ts";
import { heightAxisWidth } from "../height-axis.tsx";
import { isInFrame, spanOf } from "../height-scale.ts";
import { HorizonLine } from "../marks/horizon-line.tsx";
import { PlateText } from "../plate-text.tsx";
import { fitText, textWidth } from "../text.ts";
import { COLOURS, TEXT } from "../theme.ts";
import { analyteColumns } from "./analyte-columns.tsx";
import type { FencePost } from "./fence-posts.ts";
import { axisColumns, logColumns } from "./log-columns.tsx";
import { type PlacedColumn, placeColumns } from "./plate-columns.ts";
import { hiddenRock, ownReading, type SectionFrame } from "./section-frame.ts";

/** A section of a fence with its columns placed. */
export interface PlacedPost extends FencePost {
  readonly left: number;
  readonly right: number;
  /** Where rock begins: right of the axis figures. */
  readonly rockLeft: number;
  readonly title: string;
  readonly columns: readonly PlacedColumn[];
}

const IRIDIUM_WIDTH = 30;
const NARROWEST = 70;
const LONGEST_TITLE = 130;
const TITLE = TEXT.heading;

export function postPanel(analysis: Analysis, post: FencePost, left: number): PlacedPost {
  const { section, y } = post;
  const reading = ownReading(section);
  const frame: SectionFrame = {
    section,
    vertical: "own",
    y,
    axis: { scale: y, reading },
    hidden: hiddenRock(section),
  };
  const log = logColumns("fence", frame).filter((column) => column.key !== "member");
  const iridium = analyteColumns(analysis, frame, { only: ["iridium"], width: IRIDIUM_WIDTH });
  const { placed, right } = placeColumns([...axisColumns(frame), ...log, ...iridium], left);
  const title = fitText(section.title, LONGEST_TITLE, TITLE);
  return {
    ...post,
    left,
    right: Math.max(right, left + NARROWEST, left + textWidth(title, TITLE)),
    rockLeft: left + heightAxisWidth(y, reading),
    title,
    columns: placed,
  };
}

const TITLE_LIFT = 30;

interface PostPanelProps {
  readonly panel: PlacedPost;
  readonly datum: string | undefined;
}

export function PostPanel({ panel, datum }: PostPanelProps) {
  const { section, y, left, title, columns } = panel;
  return (
    <g data-section={section.name}>
      <PlateText x={left} y={spanOf(y).top - TITLE_LIFT} style={TITLE}>
        {title}
      </PlateText>
      {columns.map((column) => (
        <g key={column.key}>{column.draw(column.x)}</g>
      ))}
      <PostHorizons panel={panel} datum={datum} />
    </g>
  );
}

function PostHorizons({ panel, datum }: PostPanelProps) {
  const { horizons, y, rockLeft, right } = panel;
  return horizons
    .filter((horizon) => isInFrame(y, horizon.positionM))
    .map((horizon) => (
      <g key={horizon.horizon} data-horizon={horizon.horizon}>
        {horizon.kind === "hiatus" ? (
          <HiatusLine x={rockLeft} width={right - rockLeft} at={y(horizon.positionM)} />
        ) : (
          <HorizonLine
            x={rockLeft}
            width={right - rockLeft}
            y={y}
            horizon={{
              label: "",
              heightM: horizon.positionM,
              lowM: horizon.lowM,
              highM: horizon.highM,
              rank: horizon.horizon === datum ? "main" : "other",
            }}
          />
        )}
      </g>
    ));
}

function HiatusLine({ x, width, at }: { readonly x: number; readonly width: number; readonly at: number }) {
  return (
    <path
      d={contactPath("erosive", { x, y: at, width })}
      fill="none"
      stroke={COLOURS.rust}
      strokeWidth={0.8}
    />
  );
}
