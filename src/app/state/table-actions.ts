import { giveOutStudy, giveOutWorkbook } from "../study/give-out.ts";
import type { Action } from "./actions.ts";
import type { PageContents } from "./page-context.ts";
import { isTrying } from "./page-state.ts";

/** What can be done with the edits of the tables, from anywhere. */
export function tableActions({ state, dispatch, go, study }: PageContents): Action[] {
  const { steps, held } = state.history;
  const [last, next] = [steps[held - 1], steps[held]];
  const isTried = isTrying(state.trial);
  const tables = { group: "Tables" };
  const shown = (file: string | undefined) => go({ station: "tables", table: file, find: undefined });
  return [
    {
      ...tables,
      id: "undo",
      label: isTried ? "Let go of what is tried" : last === undefined ? "Undo" : `Undo ${last.label}`,
      shortcut: "Control+z",
      otherShortcut: isTried ? "Escape" : undefined,
      isAvailable: isTried || last !== undefined,
      act: () => {
        dispatch({ kind: "undone" });
        if (!isTried && state.place.station === "tables") shown(last?.edits[0]?.file);
      },
    },
    {
      ...tables,
      id: "redo",
      label: next === undefined ? "Redo" : `Redo ${next.label}`,
      shortcut: "Control+y",
      otherShortcut: "Control+Shift+z",
      isAvailable: next !== undefined,
      act: () => {
        dispatch({ kind: "redone" });
        if (state.place.station === "tables") shown(next?.edits[0]?.file);
      },
    },
    {
      ...tables,
      id: "undo-all",
      label: "Back to the tables as they were",
      isAvailable: held > 0,
      act: () => dispatch({ kind: "all-undone" }),
    },
    {
      ...tables,
      id: "give-out-study",
      label: "Save the study as a zip",
      isAvailable: study.readOut !== undefined,
      act: () => study.readOut && void giveOutStudy(study.readOut, state.history),
    },
    {
      ...tables,
      id: "give-out-workbook",
      label: "Save the tables as a workbook",
      isAvailable: study.readOut !== undefined,
      act: () => study.readOut && void giveOutWorkbook(study.readOut, state.history),
    },
    {
      ...tables,
      id: "log",
      label: state.isLogOpen ? "Close the section log" : "Open the section log",
      shortcut: "l",
      isAvailable: state.place.station === "tables",
      act: () => dispatch({ kind: "log-turned" }),
    },
  ];
}
