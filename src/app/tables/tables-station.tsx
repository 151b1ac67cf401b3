import { type ReactElement, useMemo } from "react";
import { resultDeclarations } from "../../report/tables/index.ts";
import { usePage } from "../state/page-context.ts";
import { Confirm } from "./confirm/confirm.tsx";
import { editsByFile } from "./edits.ts";
import { heldEdits } from "./history.ts";
import { type Found, readTables, shownResult, studyTables } from "./shown-table.ts";
import { TableTabs } from "./table-tabs.tsx";
import styles from "./tables.module.css";
import { WorkedTable } from "./worked-table.tsx";

/** Result tables are filled when they are looked at. */
const RESULTS = resultDeclarations.map(({ name }) => ({ id: name, problems: [] }));

/** The study's tables to work in, and the result tables, each problem marked at its cell. */
export function TablesStation(): ReactElement | null {
  const { state, study, open } = usePage();
  const { place, history } = state;
  const { readOut } = study;
  const analysis = open?.analysis;
  const edits = useMemo(() => editsByFile(heldEdits(history)), [history]);
  const found = useMemo<Found | undefined>(
    () => readOut && { ...readOut.study, edits: editsByFile(heldEdits(readOut.history)) },
    [readOut],
  );
  const given = readOut?.tables;
  const read = useMemo(
    () => (given === undefined || found === undefined ? [] : readTables(given, found)),
    [given, found],
  );
  const tables = useMemo(() => studyTables(read, edits), [read, edits]);
  const result = resultDeclarations.find(({ name }) => name === place.table);
  const shown = useMemo(() => analysis && result && shownResult(result, analysis), [analysis, result]);
  const table = tables.find(({ id }) => id === place.table) ?? shown ?? tables[0];
  if (table === undefined || found === undefined) return null;
  return (
    <div className={styles.station}>
      <Confirm />
      <TableTabs
        groups={[["Study", tables], ...(analysis === undefined ? [] : [["Results", RESULTS] as const])]}
        current={table.id}
      />
      <WorkedTable key={table.id} {...{ table, open, found }} />
    </div>
  );
}
