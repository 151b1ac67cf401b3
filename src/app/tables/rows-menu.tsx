import type { ReactElement } from "react";
import { usePage } from "../state/page-context.ts";
import { addedRowStep, filledDownStep } from "./grid-steps.ts";
import { blockOf, isHeader, type Selection } from "./selection.ts";
import type { ShownTable } from "./shown-table.ts";
import { ToolMenu } from "./tool-menu.tsx";

interface RowsMenuProps {
  readonly table: ShownTable;
  readonly places: readonly number[];
  readonly selection: Selection;
  /** Puts a blank row above the row of a place, and goes to it. */
  readonly insert: (place: number) => void;
  /** Goes to the row that was just added behind all. */
  readonly goToNew: () => void;
  /** Writes the name of the column that the keys act on. */
  readonly rename: () => void;
}

/** What can be done with rows and columns beside writing in their cells. */
export function RowsMenu(props: RowsMenuProps): ReactElement {
  const { table, places, selection, insert, goToNew, rename } = props;
  const { dispatch } = usePage();
  const { place, column } = selection.active;
  const isNoRow = isHeader(selection) || places.length === 0;
  const header = table.columns[column]?.header ?? "";
  return (
    <ToolMenu
      title="Rows…"
      tools={[
        { title: "New row above", help: "Alt + ↑", isDisabled: isNoRow, act: () => insert(place) },
        { title: "New row below", help: "Alt + ↓", isDisabled: isNoRow, act: () => insert(place + 1) },
        {
          title: "New row at the end",
          act: () => {
            dispatch({ kind: "edited", step: addedRowStep(table) });
            goToNew();
          },
        },
        {
          title: "Fill down",
          help: "Ctrl + D",
          isDisabled: isNoRow,
          act: () =>
            dispatch({ kind: "edited", step: filledDownStep(table, blockOf(selection, places), places) }),
        },
        {
          title: "Rename the column",
          help: header === "" ? "F2 on its name" : `${header}: F2 on its name`,
          isDisabled: table.headerRows.length === 0 || table.columns[column]?.isBeyond === true,
          act: rename,
        },
      ]}
    />
  );
}
