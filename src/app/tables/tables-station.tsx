import { type ReactElement, useDeferredValue, useMemo, useState } from "react";
import { plural } from "../../report/wordings/words.ts";
import { usePage } from "../state/page-context.ts";
import { editsByFile } from "./edits.ts";
import { Grid } from "./grid.tsx";
import { heldEdits } from "./history.ts";
import { FIRST_CELL } from "./selection.ts";
import {
  chosenRows,
  readTables,
  type ShownTable,
  type Sorting,
  shownResults,
  sortedBy,
  studyTables,
} from "./shown-table.ts";
import { TableTabs } from "./table-tabs.tsx";
import { TableTools } from "./table-tools.tsx";
import styles from "./tables.module.css";

/** The study's tables to work in, and the result tables, each problem marked at its cell. */
export function TablesStation(): ReactElement | null {
  const { state, study, open } = usePage();
  const { place, history } = state;
  const sheets = study.workedOut?.sheets;
  const analysis = open?.analysis;
  const edits = useMemo(() => editsByFile(heldEdits(history)), [history]);
  const read = useMemo(
    () => (sheets === undefined || analysis === undefined ? [] : readTables(sheets, analysis.study.problems)),
    [sheets, analysis],
  );
  const tables = useMemo(() => studyTables(read, edits), [read, edits]);
  const results = useMemo(() => (analysis === undefined ? [] : shownResults(analysis)), [analysis]);
  const table = [...tables, ...results].find(({ id }) => id === place.table) ?? tables[0];
  if (table === undefined) return null;
  return (
    <div className={styles.station}>
      <TableTabs
        groups={[
          ["Study", tables],
          ["Results", results],
        ]}
        current={table.id}
      />
      <WorkedTable key={table.id} table={table} />
    </div>
  );
}

function WorkedTable({ table }: { readonly table: ShownTable }): ReactElement {
  const { state, go, dispatch } = usePage();
  const { place } = state;
  const [selection, select] = useState(FIRST_CELL);
  const [wantsProblems, setOnlyProblems] = useState(false);
  const onlyProblems = wantsProblems && table.problems.length > 0;
  const [sort, setSort] = useState<Sorting>();
  const [told, tell] = useState("");
  const words = useDeferredValue(place.find ?? "");
  const places = useMemo(
    () => chosenRows(table, { words, onlyProblems, sort }),
    [table, words, onlyProblems, sort],
  );
  const sortBy = (column: number | undefined) =>
    setSort(
      column === undefined ? undefined : sortedBy(table, column, column === sort?.column && !sort.isDown),
    );
  const goToNew = () => {
    const cell = { place: table.rows.length, column: 0 };
    select({ anchor: cell, active: cell });
    setOnlyProblems(false);
    go({ table: table.id, row: table.nextRow, find: undefined });
  };
  return (
    <>
      <div className={styles.finder}>
        <label>
          Find{" "}
          <input
            type="search"
            value={place.find ?? ""}
            placeholder={`in ${table.title}`}
            onChange={(event) => go({ find: event.currentTarget.value, table: table.id, row: undefined })}
          />
        </label>
        <TableTools
          {...{ table, places, selection, onlyProblems, sort, sortBy, tell, goToNew }}
          choose={setOnlyProblems}
        />
        <output>
          {countWords(table, places.length)}
          {told !== "" && ` · ${told}`}
        </output>
      </div>
      <Grid
        {...{ table, places, selection, select, sort, sortBy, tell }}
        row={place.table === table.id ? place.row : undefined}
        edit={(step) => dispatch({ kind: "edited", step })}
      />
    </>
  );
}

function countWords({ rows }: ShownTable, found: number): string {
  return found === rows.length ? plural(found, "row") : `${found} of ${plural(rows.length, "row")}`;
}
