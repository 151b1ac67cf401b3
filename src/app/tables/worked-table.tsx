import { type ReactElement, useDeferredValue, useMemo, useRef, useState } from "react";
import { plural } from "../../report/wordings/words.ts";
import { type Opened, usePage } from "../state/page-context.ts";
import { FindTools } from "./find-tools.tsx";
import { Grid } from "./grid.tsx";
import { insertedRowStep, rowId } from "./grid-steps.ts";
import { chosenRows, type Sorting, sortedBy } from "./row-choice.ts";
import { rowInHand } from "./row-in-hand.ts";
import { rowNumbering } from "./row-order.ts";
import { nearestRow, rowPlace } from "./row-places.ts";
import { SectionLog } from "./section-log.tsx";
import { FIRST_CELL, HEADER } from "./selection.ts";
import type { Found, ShownTable } from "./shown-table.ts";
import { TableTools } from "./table-tools.tsx";
import styles from "./tables.module.css";
import { useFind } from "./use-find.ts";
import type { Draft } from "./use-grid.ts";

interface WorkedTableProps {
  readonly table: ShownTable;
  /** Absent until the study is worked out. */
  readonly open?: Opened;
  readonly found: Found;
}

/** One table with its tools, and the log of the section that its row in hand belongs to. */
export function WorkedTable({ table, open, found }: WorkedTableProps): ReactElement {
  const { state, go, dispatch } = usePage();
  const { place } = state;
  const [selection, select] = useState(FIRST_CELL);
  const [draft, setDraft] = useState<Draft>();
  const [wantsProblems, setOnlyProblems] = useState(false);
  const [wantsAll, setAll] = useState(false);
  const onlyProblems = wantsProblems && table.problems.length > 0;
  const [sort, setSort] = useState<Sorting>();
  const [told, tell] = useState("");
  const words = useDeferredValue(place.find ?? "");
  const places = useMemo(
    () => chosenRows(table, { words: wantsAll ? "" : words, onlyProblems, sort }),
    [table, words, wantsAll, onlyProblems, sort],
  );
  const field = useRef<HTMLInputElement>(null);
  const find = useFind({ field, table, places, words: place.find ?? "", selection, select, tell });
  const sortBy = (column: number | undefined) =>
    setSort(
      column === undefined ? undefined : sortedBy(table, column, column === sort?.column && !sort.isDown),
    );
  const selectPlace = (place: number, column = 0) =>
    select({ anchor: { place, column }, active: { place, column } });
  const insert = (place: number) => {
    dispatch({ kind: "edited", step: insertedRowStep(table, place) });
    selectPlace(Math.min(place, table.rows.length));
    setOnlyProblems(false);
    if (words !== "") go({ table: table.id, row: undefined, find: undefined });
  };
  const goToNew = () => {
    selectPlace(table.rows.length);
    setOnlyProblems(false);
    go({ table: table.id, row: table.nextRow.shown, find: undefined });
  };
  const rename = () => {
    const { column } = selection.active;
    selectPlace(HEADER, column);
    setDraft(table.columns[column]?.header ?? "");
  };
  const log = useLog({ table, open, found }, selection.active.place);
  // An edit can make a section that the last analysis does not have yet.
  const isDrawable = open?.analysis.study.sections.some(({ name }) => name === log?.hand.section) === true;
  const goToLevel = (heightM: number) => {
    const row = log?.nearest(heightM);
    const place = row === undefined ? -1 : table.rowIds.indexOf(row);
    if (places.includes(place)) selectPlace(place, Math.max(0, selection.active.column));
    else tell("No row that is shown here lies in this section.");
  };
  return (
    <>
      <div className={styles.finder}>
        <FindTools {...{ table, field, find, wantsAll, setAll }} />
        <TableTools
          {...{ table, places, selection, onlyProblems, sort, sortBy, tell, insert, goToNew, rename }}
          choose={setOnlyProblems}
        />
        <output>
          {countWords(table, places.length)}
          {told !== "" && ` · ${told}`}
        </output>
      </div>
      <div className={styles.work}>
        <Grid
          {...{ table, places, selection, select, sort, sortBy, tell, insert, draft, setDraft, find, words }}
          row={place.table === table.id ? place.row : undefined}
          edit={(step) => dispatch({ kind: "edited", step })}
        />
        {state.isLogOpen && log && open && isDrawable && (
          <SectionLog
            open={open}
            hand={log.hand}
            goTo={goToLevel}
            close={() => dispatch({ kind: "log-turned" })}
          />
        )}
      </div>
    </>
  );
}

/** The section of the row in hand and where it lies there, and the row nearest to a height of that section. */
function useLog({ table, open, found }: WorkedTableProps, place: number) {
  const { sections } = found;
  const { shown, known } = useMemo(
    () => rowNumbering(found.edits.get(table.id)?.added ?? []),
    [found, table.id],
  );
  const otherwise = open?.focus.section?.name;
  const id = rowId(table, place);
  const hand = useMemo(
    () => rowInHand(table, place, { sections, at: rowPlace(sections, table.id, shown(id)), otherwise }),
    // oxlint-disable-next-line react-hooks/exhaustive-deps -- another cell of the same row changes nothing
    [table.id, id, table.rowNumbers[place], sections, shown, otherwise],
  );
  const section = sections.find(({ name }) => name === hand?.section);
  const nearest = (heightM: number) => {
    const row = section && nearestRow(section, table.id, heightM);
    return row === undefined ? undefined : known(row);
  };
  return hand && { hand, nearest };
}

function countWords({ rows }: ShownTable, found: number): string {
  return found === rows.length ? plural(found, "row") : `${found} of ${plural(rows.length, "row")}`;
}
