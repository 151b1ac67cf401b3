import { type ReactElement, useMemo } from "react";
import { usePage } from "../state/page-context.ts";
import { Confirm } from "./confirm/confirm.tsx";
import { editsByFile } from "./edits.ts";
import { heldEdits } from "./history.ts";
import { type Found, readTables, shownResults, studyTables } from "./shown-table.ts";
import { TableTabs } from "./table-tabs.tsx";
import styles from "./tables.module.css";
import { WorkedTable } from "./worked-table.tsx";

/** The study's tables to work in, and the result tables, each problem marked at its cell. */
export function TablesStation(): ReactElement | null {
  const { state, study, open } = usePage();
  const { place, history } = state;
  const { tables: given, history: foundAt } = study.workedOut ?? {};
  const analysis = open?.analysis;
  const edits = useMemo(() => editsByFile(heldEdits(history)), [history]);
  const found = useMemo<Found | undefined>(
    () => analysis && foundAt && { ...analysis.study, edits: editsByFile(heldEdits(foundAt)) },
    [analysis, foundAt],
  );
  const read = useMemo(
    () => (given === undefined || found === undefined ? [] : readTables(given, found)),
    [given, found],
  );
  const tables = useMemo(() => studyTables(read, edits), [read, edits]);
  const results = useMemo(() => (analysis === undefined ? [] : shownResults(analysis)), [analysis]);
  const table = [...tables, ...results].find(({ id }) => id === place.table) ?? tables[0];
  if (table === undefined || open === undefined || found === undefined) return null;
  return (
    <div className={styles.station}>
      <Confirm />
      <TableTabs
        groups={[
          ["Study", tables],
          ["Results", results],
        ]}
        current={table.id}
      />
      <WorkedTable key={table.id} {...{ table, open, found }} />
    </div>
  );
}
