import { type ReactElement, useState } from "react";
import { usePage } from "../state/page-context.ts";
import { GridKeys } from "./grid-keys.tsx";
import { rowId, setAsideStep, takenBackStep } from "./grid-steps.ts";
import type { Sorting } from "./row-choice.ts";
import { RowsMenu } from "./rows-menu.tsx";
import { SaveMenu } from "./save-menu.tsx";
import { blockOf, blockPlaces, type Selection } from "./selection.ts";
import type { ShownTable } from "./shown-table.ts";
import styles from "./tables.module.css";

interface TableToolsProps {
  readonly table: ShownTable;
  readonly places: readonly number[];
  readonly selection: Selection;
  readonly onlyProblems: boolean;
  readonly choose: (onlyProblems: boolean) => void;
  readonly sort?: Sorting;
  readonly sortBy: (column: number | undefined) => void;
  readonly tell: (words: string) => void;
  readonly insert: (place: number) => void;
  /** Goes to the row that was just added. */
  readonly goToNew: () => void;
  readonly rename: () => void;
}

/** What can be done with a table beside writing in it. */
export function TableTools(props: TableToolsProps): ReactElement {
  const { table, onlyProblems, choose, sort, sortBy, tell } = props;
  const { state, dispatch } = usePage();
  const { steps, held } = state.history;
  return (
    <div className={styles.tools}>
      {table.problems.length > 0 && (
        <label className={styles.check}>
          <input
            type="checkbox"
            checked={onlyProblems}
            onChange={(event) => choose(event.currentTarget.checked)}
          />
          only rows with problems
        </label>
      )}
      <label>
        Sort by{" "}
        <select
          value={sort?.column ?? ""}
          onChange={({ currentTarget: { value } }) => sortBy(value === "" ? undefined : Number(value))}
        >
          <option value="">the file's order</option>
          {table.columns.map(({ header }, column) => (
            <option key={`${column}`} value={column}>
              {header}
            </option>
          ))}
        </select>
      </label>
      {table.isEditable && (
        <>
          <RowsMenu {...props} />
          <SetAside {...props} />
          <button type="button" disabled={held === 0} onClick={() => dispatch({ kind: "undone" })}>
            Undo
          </button>
          <button type="button" disabled={held === steps.length} onClick={() => dispatch({ kind: "redone" })}>
            Redo
          </button>
          <SaveMenu file={table.id} tell={tell} />
        </>
      )}
      <button type="button" aria-pressed={state.isLogOpen} onClick={() => dispatch({ kind: "log-turned" })}>
        Section log
      </button>
      <GridKeys />
    </div>
  );
}

/** Sets the selected rows aside, with a reason, or takes them back. */
function SetAside({ table, places, selection, tell }: TableToolsProps): ReactElement {
  const { dispatch } = usePage();
  const [isAsking, setIsAsking] = useState(false);
  const [reason, setReason] = useState("");
  const end = () => {
    setIsAsking(false);
    setReason("");
  };
  const own = blockPlaces(blockOf(selection, places), places);
  const aside = own.map((place) => rowId(table, place)).filter((row) => table.setAside.has(row));
  const name = own.length === 1 ? `row ${table.rowNumbers[own[0] ?? 0]}` : `${own.length} rows`;
  if (aside.length > 0)
    return (
      <button
        type="button"
        onClick={() => dispatch({ kind: "edited", step: takenBackStep(table.id, aside) })}
      >
        Take back
      </button>
    );
  if (!isAsking)
    return (
      <button type="button" disabled={own.length === 0} onClick={() => setIsAsking(true)}>
        Set aside…
      </button>
    );
  return (
    <form
      className={styles.asking}
      onSubmit={(event) => {
        event.preventDefault();
        dispatch({ kind: "edited", step: setAsideStep(table, own, reason.trim()) });
        tell(`${name} set aside.`);
        end();
      }}
    >
      <label>
        Why{" "}
        <input
          required
          // oxlint-disable-next-line jsx-a11y/no-autofocus -- a person who asks for this is about to type
          autoFocus
          pattern=".*\S.*"
          value={reason}
          onChange={(event) => setReason(event.currentTarget.value)}
          onKeyDown={(event) => {
            if (event.key === "Escape") end();
          }}
        />
      </label>
      <button type="submit">Set aside {name}</button>
    </form>
  );
}
