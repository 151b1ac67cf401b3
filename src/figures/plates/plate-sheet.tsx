import { Fragment, type ReactNode } from "react";
import { Credits, creditLines, creditsDepth } from "../credits.tsx";
import { Legend, type LegendEntry, legendLayout } from "../legend.tsx";
import { PATTERN_CREDIT } from "../lithology/lithology-legend.ts";
import { PATTERN_TILES, type PatternId } from "../lithology/pattern-tiles.ts";
import { Plate } from "../plate.tsx";
import { PlateText } from "../plate-text.tsx";
import { fitText, textWidth, wrapText } from "../text.ts";
import { COLOURS, TEXT } from "../theme.ts";
import type { Drawing, Panel, View } from "./drawing.ts";
import type { PlacedColumn } from "./plate-columns.ts";

export const MARGIN = 14;
/** Where columns begin: below title, subtitle and the columns' heads. */
export const BODY_TOP = 76;
const LINE = 9.5;

/** The parts that every plate has, before they are set on paper. */
export interface SheetParts {
  readonly id: string;
  readonly title: string;
  readonly subtitle: string;
  readonly description: string;
  /** Right edge of what is drawn in the body, and its lower edge with names and tick labels. */
  readonly right: number;
  readonly bottom: number;
  /** Least width of the sheet; default that of a plate on a page of its own. */
  readonly narrowest?: number;
  readonly body: ReactNode;
  readonly columns?: readonly PlacedColumn[];
  readonly legend?: readonly LegendEntry[];
  readonly patterns?: readonly PatternId[];
  readonly notes?: readonly string[];
  readonly panels: readonly Panel[];
  readonly view: View;
}

const NARROWEST = 300;
/** A sheet grows to hold its subtitle, up to this. */
const WIDEST_SUBTITLE = 420;

/** Title above, legend, notes and credits beneath: a drawing that can be published as it stands. */
export function setSheet(parts: SheetParts): Drawing {
  const { id, title, description, columns = [], panels, view, narrowest = NARROWEST } = parts;
  const subtitleWidth = Math.min(
    textWidth(parts.subtitle, TEXT.unit) + 1,
    narrowest < NARROWEST ? narrowest - 2 * MARGIN : WIDEST_SUBTITLE,
  );
  const width = Math.max(parts.right + MARGIN, narrowest, subtitleWidth + 2 * MARGIN);
  const room = width - 2 * MARGIN;
  const patterns = [
    ...new Set([...columns.flatMap((column) => column.patterns ?? []), ...(parts.patterns ?? [])]),
  ];
  const entries = distinct([...(parts.legend ?? []), ...columns.flatMap((column) => column.legend ?? [])]);
  const legend = legendLayout(entries, room);
  const notes = (parts.notes ?? []).flatMap((note) => wrapText(shortened(note), room, TEXT.unit));
  const credits = creditLines(patterns.some(isStandardPattern) ? [PATTERN_CREDIT] : [], room);
  const legendY = parts.bottom + 14;
  const notesY = legendY + legend.height + (legend.height > 0 ? 10 : 0);
  const creditsY = notesY + notes.length * LINE + (notes.length > 0 ? 3 : 0);
  const height = creditsY + creditsDepth(credits) + MARGIN - 6;
  return {
    id,
    title,
    description,
    width,
    height,
    panels,
    element: (
      <Plate {...{ id, title, description, width, height, patterns }} fontFaces={view.fontFaces}>
        <PlateText x={MARGIN} y={MARGIN + 9} style={TEXT.title}>
          {fitText(title, room, TEXT.title)}
        </PlateText>
        <PlateText x={MARGIN} y={MARGIN + 20} style={TEXT.unit} colour={COLOURS.soft}>
          {fitText(parts.subtitle, room, TEXT.unit)}
        </PlateText>
        {columns.map((column) => (
          <Fragment key={column.key}>{column.draw(column.x)}</Fragment>
        ))}
        {parts.body}
        <Legend plateId={id} x={MARGIN} y={legendY} layout={legend} />
        <Notes y={notesY} lines={notes} />
        <Credits x={MARGIN} y={creditsY} lines={credits} />
      </Plate>
    ),
  };
}

const LONGEST_NOTE = 900;

/** A note made of somebody's 200 kB cell still fits a plate. */
function shortened(note: string): string {
  return note.length <= LONGEST_NOTE
    ? note
    : `${Array.from(note.slice(0, LONGEST_NOTE)).slice(0, -1).join("")}…`;
}

function isStandardPattern(pattern: PatternId): boolean {
  return "fgdc" in PATTERN_TILES[pattern];
}

function distinct(entries: readonly LegendEntry[]): readonly LegendEntry[] {
  return [...new Map(entries.map((entry) => [`${entry.sign.kind} ${entry.label}`, entry] as const)).values()];
}

function Notes({ y, lines }: { readonly y: number; readonly lines: readonly string[] }) {
  return (
    <g>
      {lines.map((line, i) => (
        <PlateText key={`${i} ${line}`} x={MARGIN} y={y + i * LINE} style={TEXT.unit}>
          {line}
        </PlateText>
      ))}
    </g>
  );
}
