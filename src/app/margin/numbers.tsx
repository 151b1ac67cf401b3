import type { ReactElement } from "react";
import type { NumberLine } from "../../report/findings/finding.ts";
import styles from "./margin.module.css";

const LONGEST_ON_ONE_LINE = 22;

interface NumbersProps {
  readonly lines: readonly NumberLine[];
  /** The same before what is tried: what differs is told with what it was. */
  readonly before?: readonly NumberLine[];
}

/** The numbers of a finding, kind by kind; those that a first look does not need are folded. */
export function Numbers({ lines, before }: NumbersProps): ReactElement | null {
  if (lines.length === 0) return null;
  const groups = [...new Set(lines.map(({ group }) => group ?? "Numbers"))];
  return (
    <>
      {groups.map((group) => (
        <Group
          key={group}
          title={group}
          before={before}
          lines={lines.filter((line) => (line.group ?? "Numbers") === group)}
        />
      ))}
    </>
  );
}

function Group({ title, lines, before }: NumbersProps & { readonly title: string }): ReactElement {
  const shown = lines.filter(({ isMore }) => isMore !== true);
  const more = lines.filter(({ isMore }) => isMore === true);
  return (
    <section className={styles.part}>
      <h2>{title}</h2>
      {shown.length > 0 && <Lines lines={shown} before={before} />}
      {more.length > 0 && (
        <details className={styles.method}>
          <summary>{shown.length > 0 ? `${more.length} more` : `${more.length} answers`}</summary>
          <Lines lines={more} before={before} />
        </details>
      )}
    </section>
  );
}

function Lines({ lines, before }: NumbersProps): ReactElement {
  return (
    <dl className={styles.numbers}>
      {lines.map((line, place) => (
        <div key={`${place} ${line.label}`}>
          <dt>{line.label}</dt>
          <dd className={line.value.length <= LONGEST_ON_ONE_LINE ? styles.short : undefined}>
            {line.share !== undefined && (
              <meter className={styles.share} aria-hidden="true" min={0} max={1} value={line.share} />
            )}
            {line.value}
          </dd>
          {before && <Before line={line} before={before} />}
          {line.note && <dd className={styles.note}>{line.note}</dd>}
        </div>
      ))}
    </dl>
  );
}

function Before({
  line,
  before,
}: {
  readonly line: NumberLine;
  readonly before: readonly NumberLine[];
}): ReactElement | null {
  const was = before.find((other) => other.label === line.label && other.note === line.note);
  const other = was ?? before.find(({ label }) => label === line.label);
  if (other?.value === line.value) return null;
  return <dd className={styles.before}>{other === undefined ? "was not told" : `was ${other.value}`}</dd>;
}
