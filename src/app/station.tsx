import type { ReactElement } from "react";
import { Empty } from "./empty.tsx";
import { Margin } from "./margin/margin.tsx";
import { PlateStation } from "./plate/plate-station.tsx";
import { lackOf } from "./state/lack.ts";
import { usePage } from "./state/page-context.ts";
import styles from "./station.module.css";
import { TablesStation } from "./tables/tables-station.tsx";

/** The station in view: its plate or tables on the left, the margin on the right. */
export function Station(): ReactElement {
  const { state, open } = usePage();
  if (open === undefined)
    return (
      <main className={styles.alone}>
        <Empty title={state.work.kind === "failed" ? "Nothing is open." : "Reading the study."}>
          {state.work.kind === "failed"
            ? "Open a study above, or drop its folder or CSV files anywhere."
            : "Ranges are being worked out on this machine."}
        </Empty>
      </main>
    );
  const lack = lackOf(open.focus.station, open.focus, open.analysis);
  return (
    <main className={state.isMarginOpen ? styles.station : `${styles.station} ${styles.wide}`}>
      <section className={styles.left} aria-label={open.focus.station === "tables" ? "Tables" : "Plate"}>
        {lack !== undefined && <Empty title={lack.what}>{lack.where}</Empty>}
        {lack === undefined && (open.focus.station === "tables" ? <TablesStation /> : <PlateStation />)}
      </section>
      <Margin />
    </main>
  );
}
