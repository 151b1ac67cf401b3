import { type ReactElement, useDeferredValue, useMemo } from "react";
import { plural } from "../../report/wordings/words.ts";
import { usePage } from "../state/page-context.ts";
import { Grid } from "./grid.tsx";
import { rowsWith, type ShownTable, shownResults, studyTables } from "./shown-table.ts";
import { TableTabs } from "./table-tabs.tsx";
import styles from "./tables.module.css";

/** The study's tables as they were read, and the result tables, each problem marked at its cell. */
export function TablesStation(): ReactElement | null {
  const { state, go, open } = usePage();
  const { place } = state;
  const analysis = open?.analysis;
  const sheets = useMemo(() => (analysis === undefined ? [] : studyTables(analysis)), [analysis]);
  const results = useMemo(() => (analysis === undefined ? [] : shownResults(analysis)), [analysis]);
  const table = [...sheets, ...results].find(({ id }) => id === place.table) ?? sheets[0];
  const find = useDeferredValue(place.find ?? "");
  const found = useMemo(() => (table === undefined ? [] : rowsWith(table, find)), [table, find]);
  if (table === undefined) return null;
  return (
    <div className={styles.station}>
      <TableTabs
        groups={[
          ["Study", sheets],
          ["Results", results],
        ]}
        current={table.id}
      />
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
        <output>{countWords(table, found.length)}</output>
      </div>
      <Grid
        key={table.id}
        table={table}
        places={found}
        row={place.table === table.id ? place.row : undefined}
      />
    </div>
  );
}

function countWords({ rows }: ShownTable, found: number): string {
  return found === rows.length ? plural(found, "row") : `${found} of ${plural(rows.length, "row")}`;
}
