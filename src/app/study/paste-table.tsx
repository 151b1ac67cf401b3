import { type Dispatch, type ReactElement, useEffect, useRef } from "react";
import { usePage } from "../state/page-context.ts";
import type { PageEvent } from "../state/page-state.ts";
import styles from "./paste-table.module.css";
import { pastedStudy, withPasted } from "./pasted-study.ts";

/** Takes a table pasted anywhere but into a field or a grid, as a new study or as one more table. */
export function PasteTable(): ReactElement | null {
  const { state, dispatch } = usePage();
  usePaste(dispatch);
  return state.pasted === undefined ? null : <PasteField text={state.pasted} />;
}

function usePaste(dispatch: Dispatch<PageEvent>): void {
  useEffect(() => {
    const take = (event: ClipboardEvent) => {
      const text = event.clipboardData?.getData("text/plain") ?? "";
      if (event.defaultPrevented || isTakenElsewhere(event.target) || text.trim() === "") return;
      event.preventDefault();
      dispatch({ kind: "pasted", text });
    };
    document.addEventListener("paste", take);
    return () => document.removeEventListener("paste", take);
  }, [dispatch]);
}

/** Fields and grids take what is pasted into them. */
const isTakenElsewhere = (target: EventTarget | null): boolean =>
  target instanceof Element &&
  target.closest("input, textarea, select, [role=grid], dialog, [contenteditable]") !== null;

function PasteField({ text }: { readonly text: string }): ReactElement {
  const { state, dispatch, study, go } = usePage();
  const { readOut } = study;
  const dialog = useRef<HTMLDialogElement>(null);
  const field = useRef<HTMLTextAreaElement>(null);
  const close = () => dispatch({ kind: "pasted", text: undefined });
  const isEmpty = (state.pasted ?? "").trim() === "";
  const open = (load: () => Promise<Parameters<typeof withPasted>[0]["given"]>) => {
    close();
    go({ station: "tables", table: undefined, row: undefined, find: undefined });
    study.open("what was pasted", load);
  };
  useEffect(() => {
    dialog.current?.showModal();
    field.current?.focus();
  }, []);
  return (
    <dialog ref={dialog} className={styles.dialog} aria-labelledby="paste-title" onClose={close}>
      <h2 id="paste-title">Paste a table</h2>
      <label>
        Cells copied from a spreadsheet, with their headers: any table of a study, or a wide sheet
        <textarea
          ref={field}
          rows={10}
          wrap="off"
          spellCheck={false}
          value={text}
          onChange={(event) => dispatch({ kind: "pasted", text: event.currentTarget.value })}
        />
      </label>
      <p className={styles.buttons}>
        <button type="button" disabled={isEmpty} onClick={() => open(async () => pastedStudy(text))}>
          As a new study
        </button>
        {readOut !== undefined && (
          <button
            type="button"
            disabled={isEmpty}
            onClick={() => open(() => withPasted(readOut, state.history, text))}
          >
            Add it to {readOut.study.name}
          </button>
        )}
        <button type="button" onClick={close}>
          Cancel
        </button>
      </p>
      <p className={styles.soft}>
        It stays on this machine. Edits made so far are written into the tables when one is added.
      </p>
    </dialog>
  );
}
