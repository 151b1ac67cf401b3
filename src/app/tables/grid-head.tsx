import type { ReactElement } from "react";
import type { Problem } from "../../core/study/problem.ts";
import { short } from "./grid-row.tsx";
import { ProblemSign } from "./problem-sign.tsx";
import { cellKey, type ShownTable, type Sorting } from "./shown-table.ts";
import styles from "./tables.module.css";

interface GridHeadProps {
  readonly table: ShownTable;
  readonly problems: ReadonlyMap<string, readonly Problem[]>;
  readonly sort?: Sorting;
  readonly sortBy: (column: number) => void;
}

/** The names of the columns; pressing one sorts by it. By keyboard the list above the table does. */
export function GridHead({ table, problems, sort, sortBy }: GridHeadProps): ReactElement {
  return (
    <thead>
      <tr aria-rowindex={1}>
        <th scope="col" className={styles.rowNumber} aria-colindex={1}>
          <span className={styles.said}>Row</span>
        </th>
        {table.columns.map(({ header, meaning, isNumber }, column) => {
          const isSorted = sort?.column === column;
          return (
            // oxlint-disable-next-line jsx-a11y/click-events-have-key-events -- the list above the table sorts by keyboard
            <th
              key={`${column}`}
              scope="col"
              title={meaning}
              aria-colindex={column + 2}
              aria-sort={isSorted ? (sort.isDown ? "descending" : "ascending") : undefined}
              className={isNumber ? styles.number : undefined}
              onClick={() => sortBy(column)}
            >
              <ProblemSign problems={problems.get(cellKey(1, column))} />
              {short(header)}
              {meaning !== header && !meaning.includes(" ") && <small> → {meaning}</small>}
              {isSorted && <span aria-hidden="true">{sort.isDown ? " ↓" : " ↑"}</span>}
            </th>
          );
        })}
      </tr>
    </thead>
  );
}
