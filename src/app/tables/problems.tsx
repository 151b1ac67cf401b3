import { type ReactElement, useMemo, useState } from "react";
import type { Fix, Problem } from "../../core/study/problem.ts";
import marginStyles from "../margin/margin.module.css";
import { usePage } from "../state/page-context.ts";
import { editsByFile } from "./edits.ts";
import { heldEdits } from "./history.ts";
import { rowNumbering } from "./row-order.ts";
import styles from "./tables.module.css";

const SHOWN_AT_ONCE = 40;
const NO_PROBLEMS: readonly Problem[] = [];

/** Every problem of the input: where, what stands there, what was expected, how to mend it. */
export function Problems(): ReactElement {
  const { study } = usePage();
  const [most, setMost] = useState(SHOWN_AT_ONCE);
  const problems = study.readOut?.study.problems ?? NO_PROBLEMS;
  const sorted = useMemo(() => problems.toSorted((a, b) => rank(a) - rank(b)), [problems]);
  return (
    <section className={marginStyles.part}>
      <h2>Problems</h2>
      {problems.length === 0 && <p>None: every row was read as it stands.</p>}
      <ul className={styles.problems}>
        {sorted.slice(0, most).map((problem, place) => (
          <li key={`${place} ${problem.file} ${problem.row} ${problem.code}`}>
            <ProblemButton problem={problem} />
            {problem.fix && <Mend fix={problem.fix} />}
          </li>
        ))}
      </ul>
      {problems.length > most && (
        <button type="button" className={styles.more} onClick={() => setMost(most + SHOWN_AT_ONCE)}>
          {problems.length - most} more
        </button>
      )}
    </section>
  );
}

/** Writes what is safe to write where a problem has one mend alone. */
function Mend({ fix }: { readonly fix: Fix }): ReactElement | null {
  const { state, dispatch, study } = usePage();
  const { readOut } = study;
  const sheet = readOut?.study.sheets.find(({ file }) => file === fix.file);
  const column = sheet?.headers.indexOf(fix.column) ?? -1;
  if (readOut === undefined || sheet === undefined || column < 0) return null;
  const { file, now } = fix;
  const mend = () => {
    // The row as the last reading counts it, by the number by which edits know it.
    const foundAt = editsByFile(heldEdits(readOut.history)).get(file);
    const row = rowNumbering(foundAt?.added ?? []).known(fix.row);
    const edited = editsByFile(heldEdits(state.history)).get(file)?.cells.get(row)?.get(column);
    const was = edited ?? sheet.rows.at(sheet.rowNumbers.indexOf(fix.row))?.[column] ?? "";
    const label = `mending ${file}, row ${fix.row}`;
    dispatch({ kind: "edited", step: { label, edits: [{ kind: "cell", file, row, column, was, now }] } });
  };
  return (
    <button type="button" className={styles.more} onClick={mend}>
      {now === "" ? "Empty the cell" : `Write “${now}”`}
    </button>
  );
}

const rank = ({ severity }: Problem) => (severity === "error" ? 0 : 1);

function ProblemButton({ problem }: { readonly problem: Problem }): ReactElement {
  const { go } = usePage();
  const { severity, file, row, column, found, expected, mend } = problem;
  const where = [file, row !== undefined && `row ${row}`, column].filter(Boolean).join(" · ");
  return (
    <button
      type="button"
      className={styles.problem}
      data-severity={severity}
      onClick={() => go({ station: "tables", table: file, row: row ?? 1, find: undefined })}
    >
      <span className={severity === "error" ? styles.errorSign : styles.cautionSign} aria-hidden="true">
        {severity === "error" ? "△" : "○"}
      </span>
      <b>
        <span className={styles.said}>{severity}: </span>
        {where}
      </b>
      <span>
        {found === ""
          ? "Nothing stands there"
          : `Found “${found.slice(0, 120)}${found.length > 120 ? "…" : ""}”`}
        ; expected {expected}.
      </span>
      <span className={styles.mend}>{mend}</span>
    </button>
  );
}
