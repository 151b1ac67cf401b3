import type { ReactElement } from "react";
import type { NumberLine } from "../../report/findings/finding.ts";
import styles from "./margin.module.css";

const LONGEST_ON_ONE_LINE = 22;

export function Numbers({ lines }: { readonly lines: readonly NumberLine[] }): ReactElement | null {
  if (lines.length === 0) return null;
  return (
    <section className={styles.part}>
      <h2>Numbers</h2>
      <dl className={styles.numbers}>
        {lines.map(({ label, value, note }, place) => (
          <div key={`${place} ${label}`}>
            <dt>{label}</dt>
            <dd className={value.length <= LONGEST_ON_ONE_LINE ? styles.short : undefined}>{value}</dd>
            {note && <dd className={styles.note}>{note}</dd>}
          </div>
        ))}
      </dl>
    </section>
  );
}
