import type { ReactElement, ReactNode } from "react";
import styles from "./why.module.css";

/** One step of the chain behind a number: what it is, and the rows that it rests on. */
export interface WhyStep {
  readonly title: string;
  readonly words?: ReactNode;
  readonly rows?: readonly WhyRow[];
}

/** A row of a table of the study. */
export interface WhyRow {
  /** `file:row`. */
  readonly row: string;
  readonly words: string;
  readonly open: () => void;
}

interface WhyProps {
  readonly label: string;
  readonly value: string;
  readonly note?: string;
  readonly chain: readonly WhyStep[];
}

/** A number that opens, in place, the chain it rests on: method, inputs, finds, down to file and row. */
export function Why({ label, value, note, chain }: WhyProps): ReactElement {
  return (
    <details className={styles.why}>
      <summary>
        <span className={styles.label}>{label}</span>
        <span className={styles.value}>{value}</span>
        {note !== undefined && note !== "" && <span className={styles.note}>{note}</span>}
      </summary>
      <dl>
        {chain.map(({ title, words, rows = [] }) => (
          <div key={title}>
            <dt>{title}</dt>
            {words !== undefined && <dd>{words}</dd>}
            {rows.length > 0 && (
              <dd>
                <ul>
                  {rows.map(({ row, words: found, open }, i) => (
                    <li key={`${i} ${row}`}>
                      <span>{found}</span>
                      <button type="button" onClick={open}>
                        {row.replace(/:(\d+)$/, ", row $1")}
                      </button>
                    </li>
                  ))}
                </ul>
              </dd>
            )}
          </div>
        ))}
      </dl>
    </details>
  );
}
