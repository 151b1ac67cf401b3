import type { ReactElement } from "react";
import type { Problem } from "../../core/study/problem.ts";
import { CellEditor, type CellEditorProps } from "./cell-editor.tsx";
import { cellId, short } from "./grid-row.tsx";
import { ProblemSign } from "./problem-sign.tsx";
import type { Sorting } from "./row-choice.ts";
import { HEADER } from "./selection.ts";
import { cellKey, type ShownTable } from "./shown-table.ts";
import styles from "./tables.module.css";

interface GridHeadProps {
  readonly table: ShownTable;
  readonly problems: ReadonlyMap<string, readonly Problem[]>;
  readonly sort?: Sorting;
  readonly sortBy: (column: number) => void;
  /** The column whose name the keys act on. */
  readonly activeColumn?: number;
  /** Present while that name is written. */
  readonly editor?: Omit<CellEditorProps, "label">;
}

/**
 * The names of the columns; pressing one sorts by it. By keyboard the list above the table does, and a name is reached
 * from the first row and written as any cell is.
 */
export function GridHead(props: GridHeadProps): ReactElement {
  const { table, problems, sort, sortBy, activeColumn, editor } = props;
  const row = table.headerRows[0] ?? 1;
  return (
    <thead>
      <tr aria-rowindex={1}>
        <th scope="col" className={styles.rowNumber} aria-colindex={1}>
          <span className={styles.said}>Row</span>
        </th>
        {table.columns.map(({ header, meaning, isNumber, isBeyond }, column) => {
          const isSorted = sort?.column === column;
          const isActive = activeColumn === column;
          const names = [
            isNumber && styles.number,
            isBeyond && styles.beyond,
            isActive && styles.active,
            isActive && editor && styles.written,
          ];
          return (
            // oxlint-disable-next-line jsx-a11y/click-events-have-key-events -- the list above the table sorts by keyboard
            <th
              key={`${column}`}
              id={cellId(HEADER, column)}
              scope="col"
              title={meaning}
              aria-colindex={column + 2}
              aria-sort={isSorted ? (sort.isDown ? "descending" : "ascending") : undefined}
              className={names.filter(Boolean).join(" ") || undefined}
              onClick={() => !(isActive && editor) && sortBy(column)}
            >
              {isActive && editor ? (
                <CellEditor {...editor} label={`Name of column ${column + 1}`} />
              ) : (
                <>
                  <ProblemSign problems={problems.get(cellKey(row, column))} />
                  {isBeyond ? <small>beyond the header</small> : short(header)}
                  {meaning !== header && !meaning.includes(" ") && <small> → {meaning}</small>}
                  {isSorted && <span aria-hidden="true">{sort.isDown ? " ↓" : " ↑"}</span>}
                </>
              )}
            </th>
          );
        })}
      </tr>
    </thead>
  );
}
