import { type ReactElement, useCallback, useEffect, useMemo, useRef } from "react";
import { GridHead } from "./grid-head.tsx";
import { cellId, GridRow } from "./grid-row.tsx";
import type { EditStep } from "./history.ts";
import type { Sorting } from "./row-choice.ts";
import { blockOf, type Cell, isHeader, type Selection } from "./selection.ts";
import { problemsByCell, type ShownTable } from "./shown-table.ts";
import styles from "./tables.module.css";
import type { Finding } from "./use-find.ts";
import { type Draft, useGrid } from "./use-grid.ts";
import { useWindow } from "./use-window.ts";

const ROW_HEIGHT = 26;
const HEAD_HEIGHT = 31;
const WIDEST_COLUMN = 40;

interface GridProps {
  readonly table: ShownTable;
  /** Places of the rows to show. */
  readonly places: readonly number[];
  /** The row to bring into view, as a spreadsheet counts. */
  readonly row?: number;
  readonly selection: Selection;
  readonly select: (selection: Selection) => void;
  readonly edit: (step: EditStep) => void;
  readonly insert: (place: number) => void;
  readonly draft: Draft;
  readonly setDraft: (draft: Draft) => void;
  readonly find: Finding;
  /** The words that are looked for. */
  readonly words: string;
  readonly tell: (words: string) => void;
  readonly sort?: Sorting;
  readonly sortBy: (column: number) => void;
}

/** A table of any length: only the rows in view are drawn. One tab stop; keys move within. */
export function Grid(props: GridProps): ReactElement {
  const { table, places, row, selection, select, sort, sortBy } = props;
  const frame = useRef<HTMLElement>(null);
  const grid = useRef<HTMLTableElement>(null);
  const { first, last } = useWindow(frame, { rowHeight: ROW_HEIGHT, count: places.length });
  const { columns } = table;
  const problems = useMemo(() => problemsByCell(columns, table.problems), [columns, table.problems]);
  const widths = useMemo(() => table.columns.map((_, column) => widthOf(table, column)), [table]);
  const { active } = selection;
  const activeIndex = places.indexOf(active.place);
  const pageRows = () =>
    Math.max(1, Math.floor(((frame.current?.clientHeight ?? 0) - HEAD_HEIGHT) / ROW_HEIGHT) - 1);
  const isFilled = ({ place, column }: Cell) => (table.rows[place]?.[column] ?? "").trim() !== "";
  const view = { places, columns: table.columns.length, hasHeader: table.isEditable, isFilled };
  const { editor, handlers } = useGrid(grid, { ...props, view, pageRows });
  const block = blockOf(selection, places);
  const isInHeader = isHeader(selection);
  const isFound = useFound(props.words);

  useSoughtRow({ row, table, places, frame, select });
  const shown = useRef(active);
  useEffect(() => {
    // Only a cell that was gone to, never one that an edit elsewhere moved.
    if (activeIndex >= 0 && shown.current !== active)
      bringIntoView(frame.current, { index: activeIndex, column: active.column, widths });
    shown.current = active;
  }, [activeIndex, active, widths]);

  return (
    <section ref={frame} className={styles.frame} aria-label={`Table ${table.title}`}>
      <table
        ref={grid}
        // oxlint-disable-next-line jsx-a11y/no-noninteractive-element-to-interactive-role -- a table that takes keys is a grid
        role="grid"
        className={styles.grid}
        tabIndex={0}
        aria-label={`${table.title}, Escape then Tab leaves it`}
        aria-rowcount={places.length + 1}
        aria-colcount={table.columns.length + 1}
        aria-multiselectable="true"
        aria-activedescendant={
          isInHeader || (activeIndex >= first && activeIndex < last)
            ? cellId(active.place, active.column)
            : undefined
        }
        {...handlers}
      >
        <colgroup>
          <col style={{ width: "6ch" }} />
          {widths.map((width, column) => (
            <col key={`${column}`} style={{ width: `calc(${width}ch + 18px)` }} />
          ))}
        </colgroup>
        <GridHead
          {...{ table, problems, sort, sortBy }}
          activeColumn={isInHeader ? active.column : undefined}
          editor={isInHeader ? editor : undefined}
        />
        <tbody>
          <Gap rows={first} />
          {places.slice(first, last).map((place, at) => {
            const index = first + at;
            return (
              <GridRow
                key={place}
                table={table}
                place={place}
                problems={problems}
                isFound={isFound}
                isSought={table.rowNumbers[place] === row}
                rowIndex={index + 2}
                selected={index >= block.rows[0] && index <= block.rows[1] ? block.columns : undefined}
                activeColumn={index === activeIndex ? active.column : undefined}
                editor={index === activeIndex ? editor : undefined}
              />
            );
          })}
          <Gap rows={places.length - last} />
        </tbody>
      </table>
    </section>
  );
}

function useFound(words: string): (text: string) => boolean {
  const sought = words.trim().toLowerCase();
  return useCallback((text: string) => sought !== "" && text.toLowerCase().includes(sought), [sought]);
}

interface Sought extends Pick<GridProps, "row" | "table" | "places" | "select"> {
  readonly frame: React.RefObject<HTMLElement | null>;
}

/** Goes to the row that the address names, once for each time it names another. */
function useSoughtRow({ row, table, places, frame, select }: Sought): void {
  const found = useRef<number>(undefined);
  useEffect(() => {
    if (row === found.current) return;
    const index = places.findIndex((place) => table.rowNumbers[place] === row);
    const place = places[index];
    if (row !== undefined && place === undefined) return;
    found.current = row;
    if (place === undefined) return;
    frame.current?.scrollTo({ top: Math.max(0, (index - 4) * ROW_HEIGHT) });
    const problem = table.problems.find((problem) => problem.row === row);
    const column = table.columns.findIndex(
      ({ header, meaning }) => problem !== undefined && [header, meaning].includes(problem.column ?? ""),
    );
    const cell = { place, column: Math.max(0, column) };
    select({ anchor: cell, active: cell });
  }, [row, table, places, frame, select]);
}

interface Shown {
  readonly index: number;
  readonly column: number;
  readonly widths: readonly number[];
}

/** Scrolls only as far as the cell needs, out from under the header and the row numbers. */
function bringIntoView(frame: HTMLElement | null, { index, column, widths }: Shown): void {
  if (frame === null) return;
  const top = index * ROW_HEIGHT;
  const room = frame.clientHeight - HEAD_HEIGHT - ROW_HEIGHT;
  if (top < frame.scrollTop) frame.scrollTop = top;
  else if (top > frame.scrollTop + room) frame.scrollTop = top - room;
  const headers = [...frame.querySelectorAll<HTMLElement>("thead th")];
  const [numbers, header] = [headers[0], headers[column + 1]];
  if (numbers === undefined || header === undefined || widths.length === 0) return;
  const left = headers.slice(0, column + 1).reduce((sum, { offsetWidth }) => sum + offsetWidth, 0);
  if (left - numbers.offsetWidth < frame.scrollLeft) frame.scrollLeft = left - numbers.offsetWidth;
  else if (left + header.offsetWidth > frame.scrollLeft + frame.clientWidth)
    frame.scrollLeft = left + header.offsetWidth - frame.clientWidth;
}

/** Stands for the rows that are not drawn. */
function Gap({ rows }: { readonly rows: number }): ReactElement | null {
  return rows > 0 ? <tr aria-hidden="true" style={{ height: rows * ROW_HEIGHT }} /> : null;
}

function widthOf({ columns, rows }: ShownTable, column: number): number {
  const { header, meaning } = columns[column] ?? { header: "", meaning: "" };
  const label =
    meaning === header || meaning.includes(" ") ? header.length : header.length + meaning.length + 3;
  const longest = rows.slice(0, 400).reduce((most, row) => Math.max(most, row[column]?.length ?? 0), 0);
  return Math.min(WIDEST_COLUMN, Math.max(label + 3, longest, 3));
}
