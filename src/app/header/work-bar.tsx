import type { ReactElement } from "react";
import { usePage } from "../state/page-context.ts";
import styles from "./work-bar.module.css";

/** What the worker is doing, with a way to stop it; what went wrong stays until it has been read. */
export function WorkBar(): ReactElement {
  const { state, dispatch, study, open } = usePage();
  const { work } = state;
  const { readOut } = study;
  const still =
    open !== undefined ? ` ${open.analysis.study.name} is still shown.` : readOut ? " Its tables stay." : "";
  return (
    <div className={styles.place}>
      <output className={work.kind === "failed" ? styles.none : undefined}>
        {work.kind === "busy" && !work.isTrial && (
          <div className={styles.bar}>
            <span>
              Working out {work.name}: {work.step}
            </span>
            <progress aria-label={`Working out ${work.name}`} max={1} value={work.share} />
            <button type="button" onClick={study.cancel}>
              Cancel
            </button>
          </div>
        )}
        {work.kind === "cancelled" && (
          <div className={styles.bar}>
            <span>
              Cancelled: {work.name} was not worked out.{still}
            </span>
            {readOut && (
              <button type="button" onClick={() => study.rework(state.history)}>
                Work out {readOut.study.name}
              </button>
            )}
            <button type="button" onClick={() => dispatch({ kind: "message-read" })}>
              Close
            </button>
          </div>
        )}
      </output>
      <div role="alert">
        {work.kind === "failed" && (
          <div className={`${styles.bar} ${styles.failed}`}>
            <span>
              <span aria-hidden="true">△ </span>
              {work.message}
              {still}
            </span>
            <button type="button" onClick={() => dispatch({ kind: "message-read" })}>
              Close
            </button>
          </div>
        )}
      </div>
    </div>
  );
}
