import type { ReactElement } from "react";
import type { NumberLine } from "../../report/findings/finding.ts";
import styles from "./margin.module.css";

const LONGEST_ON_ONE_LINE = 22;

export function Numbers({ lines }: { readonly lines: readonly NumberLine[] }): ReactElement | null {
  if (lines.length === 0) return null;
  return (
    <section className={styles.part}>
      <h2>Numbers</h2>
      <table className={styles.numbers}>
        <tbody>
          {lines.map(({ label, value, note }, place) => (
            <tr key={`${place} ${label}`}>
              <th scope="row">
                {label}
                {note && <small>{note}</small>}
              </th>
              <td className={value.length <= LONGEST_ON_ONE_LINE ? styles.short : undefined}>{value}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </section>
  );
}
