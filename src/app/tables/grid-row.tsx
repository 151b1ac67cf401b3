import type { PointerEvent, ReactElement } from "react";
import type { Problem } from "../../core/study/problem.ts";
import { CellEditor, type CellEditorProps } from "./cell-editor.tsx";
import { rowId } from "./grid-steps.ts";
import { ProblemSign, worst } from "./problem-sign.tsx";
import { cellKey, type ShownTable } from "./shown-table.ts";
import styles from "./tables.module.css";

/** A cell shows this much of its text; the rest stays in the file. */
const LONGEST_CELL = 300;

export const short = (text: string): string =>
  text.length > LONGEST_CELL ? `${text.slice(0, LONGEST_CELL)}…` : text;

export const cellId = (place: number, column: number): string => `cell-${place}-${column}`;

export interface GridRowProps {
  readonly table: ShownTable;
  readonly place: number;
  readonly problems: ReadonlyMap<string, readonly Problem[]>;
  readonly isSought: boolean;
  /** Whether a cell's text holds the words that are looked for. */
  readonly isFound: (text: string) => boolean;
  readonly rowIndex: number;
  /** Columns of the row that are selected, first and last. */
  readonly selected?: readonly [first: number, last: number];
  readonly activeColumn?: number;
  /** Present while the active cell is written in. */
  readonly editor?: Omit<CellEditorProps, "label">;
}

export function GridRow(props: GridRowProps): ReactElement {
  const { table, place, problems, isSought, rowIndex } = props;
  const row = table.rowNumbers[place] ?? 0;
  const reason = table.setAside.get(rowId(table, place));
  const isUnread = table.unread.has(rowId(table, place)) && problems.has(cellKey(row, -1));
  const names = [
    isSought && styles.sought,
    reason !== undefined && styles.setAside,
    isUnread && styles.unread,
  ].filter(Boolean);
  return (
    <tr
      aria-rowindex={rowIndex}
      className={names.join(" ") || undefined}
      aria-current={isSought || undefined}
    >
      <th scope="row" className={styles.rowNumber} aria-colindex={1} title={reason}>
        <ProblemSign problems={problems.get(cellKey(row, -1))} />
        {reason !== undefined && <span className={styles.said}>set aside: {reason} </span>}
        {row}
      </th>
      {table.columns.map((_, column) => (
        <GridCell key={`${column}`} {...props} row={row} column={column} />
      ))}
    </tr>
  );
}

interface GridCellProps extends GridRowProps {
  readonly row: number;
  readonly column: number;
}

function GridCell(props: GridCellProps) {
  const { table, place, row, column, problems, selected, activeColumn, editor, isFound } = props;
  const { isNumber, meaning, header, isBeyond } = table.columns[column];
  const text = table.rows[place]?.[column] ?? "";
  const own = problems.get(cellKey(row, column));
  const isActive = activeColumn === column;
  const isSelected = selected !== undefined && column >= selected[0] && column <= selected[1];
  const names = [
    isNumber && styles.number,
    isBeyond && styles.beyond,
    isFound(text) && styles.found,
    own && styles[worst(own)],
    isSelected && styles.selected,
    isActive && styles.active,
    isActive && editor && styles.written,
  ];
  return (
    <td
      id={cellId(place, column)}
      aria-colindex={column + 2}
      aria-selected={isSelected}
      aria-readonly={!table.isEditable || table.setAside.has(rowId(table, place)) || undefined}
      className={names.filter(Boolean).join(" ") || undefined}
    >
      {isActive && editor ? (
        <CellEditor {...editor} label={`Row ${row}, ${isBeyond ? "beyond the header" : header}`} />
      ) : (
        <>
          <ProblemSign problems={own} />
          {meaning === "taxon" || header === "taxon" ? <i>{short(text)}</i> : short(text)}
        </>
      )}
    </td>
  );
}

/** The cell under a pointer. */
export function cellUnder(event: PointerEvent | React.MouseEvent) {
  const { target } = event;
  const element = target instanceof Element ? target.closest("td[id^=cell-]") : null;
  const [, place, column] = element?.id.split("-") ?? [];
  return place === undefined || column === undefined
    ? undefined
    : { place: Number(place), column: Number(column) };
}
