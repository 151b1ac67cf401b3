import type { ReactElement } from "react";
import marginStyles from "../margin/margin.module.css";
import { usePage } from "../state/page-context.ts";
import { editsByFile } from "./edits.ts";
import { takenBackStep } from "./grid-steps.ts";
import { heldEdits } from "./history.ts";
import { rowNumbering } from "./row-order.ts";
import styles from "./tables.module.css";

/** Every row that a person set aside, with the reason given. */
export function SetAsideList(): ReactElement | null {
  const { state, dispatch } = usePage();
  const rows = [...editsByFile(heldEdits(state.history))].flatMap(([file, { setAside, added }]) => {
    const { shown } = rowNumbering(added);
    return [...setAside].map(([id, reason]) => ({ file, id, row: shown(id), reason }));
  });
  if (rows.length === 0) return null;
  return (
    <section className={marginStyles.part}>
      <h2>Set aside</h2>
      <ul className={styles.problems}>
        {rows.map(({ file, id, row, reason }) => (
          <li key={`${file} ${row}`} className={styles.asideRow}>
            <span>
              <b>
                {file} · row {row}
              </b>
              : {reason}
            </span>
            <button
              type="button"
              className={styles.more}
              aria-label={`Take back row ${row} of ${file}`}
              onClick={() => dispatch({ kind: "edited", step: takenBackStep(file, [id]) })}
            >
              Take back
            </button>
          </li>
        ))}
      </ul>
    </section>
  );
}
