import { type ReactElement, useEffect, useMemo, useRef } from "react";
import type { Problem } from "../../core/study/problem.ts";
import { cellKey, problemsByCell, type ShownTable } from "./shown-table.ts";
import styles from "./tables.module.css";
import { useWindow } from "./use-window.ts";

const ROW_HEIGHT = 26;
/** A cell shows this much of its text; the rest stays in the file. */
const LONGEST_CELL = 300;
const WIDEST_COLUMN = 40;

interface GridProps {
  readonly table: ShownTable;
  /** Places of the rows to show. */
  readonly places: readonly number[];
  /** The row to bring into view, as a spreadsheet counts. */
  readonly row?: number;
}

/** A table of any length: only the rows in view are drawn. */
export function Grid({ table, places, row }: GridProps): ReactElement {
  const frame = useRef<HTMLDivElement>(null);
  const { first, last } = useWindow(frame, { rowHeight: ROW_HEIGHT, count: places.length });
  const problems = useMemo(() => problemsByCell(table), [table]);
  const widths = useMemo(() => table.columns.map((_, column) => widthOf(table, column)), [table]);

  useEffect(() => {
    const place = places.findIndex((index) => table.rowNumbers[index] === row);
    if (row === undefined || place < 0) return;
    frame.current?.scrollTo({ top: Math.max(0, (place - 4) * ROW_HEIGHT) });
  }, [row, places, table]);

  return (
    // oxlint-disable-next-line jsx-a11y/no-noninteractive-tabindex -- the keyboard scrolls it
    <section ref={frame} className={styles.frame} tabIndex={0} aria-label={`Table ${table.title}`}>
      <table className={styles.grid} aria-rowcount={places.length + 1}>
        <colgroup>
          <col style={{ width: "6ch" }} />
          {widths.map((width, column) => (
            <col key={`${column}`} style={{ width: `calc(${width}ch + 18px)` }} />
          ))}
        </colgroup>
        <thead>
          <tr aria-rowindex={1}>
            <th scope="col" className={styles.rowNumber}>
              <span className={styles.said}>Row</span>
            </th>
            {table.columns.map(({ header, meaning, isNumber }, column) => (
              <th
                key={`${column}`}
                scope="col"
                title={meaning}
                className={isNumber ? styles.number : undefined}
              >
                <ProblemSign problems={problems.get(cellKey(1, column))} />
                {short(header)}
                {meaning !== header && !meaning.includes(" ") && <small> → {meaning}</small>}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          <Gap rows={first} />
          {places.slice(first, last).map((place, index) => (
            <GridRow
              key={place}
              table={table}
              place={place}
              problems={problems}
              isSought={table.rowNumbers[place] === row}
              rowIndex={first + index + 2}
            />
          ))}
          <Gap rows={places.length - last} />
        </tbody>
      </table>
    </section>
  );
}

interface GridRowProps {
  readonly table: ShownTable;
  readonly place: number;
  readonly problems: ReadonlyMap<string, readonly Problem[]>;
  readonly isSought: boolean;
  readonly rowIndex: number;
}

function GridRow({ table, place, problems, isSought, rowIndex }: GridRowProps): ReactElement {
  const row = table.rowNumbers[place] ?? 0;
  const cells = table.rows[place] ?? [];
  return (
    <tr
      aria-rowindex={rowIndex}
      className={isSought ? styles.sought : undefined}
      aria-current={isSought || undefined}
    >
      <th scope="row" className={styles.rowNumber}>
        <ProblemSign problems={problems.get(cellKey(row, -1))} />
        {row}
      </th>
      {table.columns.map(({ isNumber, meaning, header }, column) => {
        const own = problems.get(cellKey(row, column));
        const name = [isNumber && styles.number, own && styles[worst(own)]].filter(Boolean).join(" ");
        return (
          <td key={`${column}`} className={name || undefined}>
            <ProblemSign problems={own} />
            {meaning === "taxon" || header === "taxon" ? (
              <i>{short(cells[column] ?? "")}</i>
            ) : (
              short(cells[column] ?? "")
            )}
          </td>
        );
      })}
    </tr>
  );
}

/** Stands for the rows that are not drawn. */
function Gap({ rows }: { readonly rows: number }): ReactElement | null {
  return rows > 0 ? <tr aria-hidden="true" style={{ height: rows * ROW_HEIGHT }} /> : null;
}

function ProblemSign({
  problems,
}: {
  readonly problems: readonly Problem[] | undefined;
}): ReactElement | null {
  if (problems === undefined || problems.length === 0) return null;
  const words = problems.map(({ expected, mend }) => `expected ${expected}. ${mend}`).join(" ");
  return (
    <span className={styles.sign} title={words}>
      <span aria-hidden="true">{worst(problems) === "error" ? "△ " : "○ "}</span>
      <span className={styles.said}>
        {worst(problems)}: {words}{" "}
      </span>
    </span>
  );
}

const worst = (problems: readonly Problem[]): Problem["severity"] =>
  problems.some(({ severity }) => severity === "error") ? "error" : "caution";

const short = (text: string): string =>
  text.length > LONGEST_CELL ? `${text.slice(0, LONGEST_CELL)}…` : text;

function widthOf({ columns, rows }: ShownTable, column: number): number {
  const { header, meaning } = columns[column] ?? { header: "", meaning: "" };
  const label =
    meaning === header || meaning.includes(" ") ? header.length : header.length + meaning.length + 3;
  const longest = rows.slice(0, 400).reduce((most, row) => Math.max(most, row[column]?.length ?? 0), 0);
  return Math.min(WIDEST_COLUMN, Math.max(label + 1, longest, 3));
}
