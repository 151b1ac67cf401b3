import type { ReactElement } from "react";
import type { NumberLine } from "../../report/findings/finding.ts";
import styles from "./margin.module.css";

const LONGEST_ON_ONE_LINE = 22;

interface NumbersProps {
  readonly lines: readonly NumberLine[];
  /** The same before what is tried: what differs is told with what it was. */
  readonly before?: readonly NumberLine[];
}

export function Numbers({ lines, before }: NumbersProps): ReactElement | null {
  if (lines.length === 0) return null;
  return (
    <section className={styles.part}>
      <h2>Numbers</h2>
      <dl className={styles.numbers}>
        {lines.map(({ label, value, note }, place) => (
          <div key={`${place} ${label}`}>
            <dt>{label}</dt>
            <dd className={value.length <= LONGEST_ON_ONE_LINE ? styles.short : undefined}>{value}</dd>
            {before && <Before line={lines[place]} before={before} />}
            {note && <dd className={styles.note}>{note}</dd>}
          </div>
        ))}
      </dl>
    </section>
  );
}

function Before({
  line,
  before,
}: {
  readonly line: NumberLine | undefined;
  readonly before: readonly NumberLine[];
}): ReactElement | null {
  const was = before.find((other) => other.label === line?.label && other.note === line.note);
  const other = was ?? before.find(({ label }) => label === line?.label);
  if (line === undefined || other?.value === line.value) return null;
  return <dd className={styles.before}>{other === undefined ? "was not told" : `was ${other.value}`}</dd>;
}
