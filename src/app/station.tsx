import type { ReactElement } from "react";
import { Empty } from "./empty.tsx";
import { Margin } from "./margin/margin.tsx";
import { PlateStation } from "./plate/plate-station.tsx";
import { RangesStation } from "./ranges/ranges-station.tsx";
import { lackOf } from "./state/lack.ts";
import { usePage } from "./state/page-context.ts";
import type { Work } from "./state/page-state.ts";
import styles from "./station.module.css";
import { TablesStation } from "./tables/tables-station.tsx";

/** The station in view: its plate or tables on the left, the margin on the right. */
export function Station(): ReactElement {
  const { state, open, study } = usePage();
  const isTables = state.place.station === "tables";
  const isRanges = state.place.station === "ranges";
  if (open === undefined && !(isTables && study.readOut)) return <Waiting />;
  const lack = open && lackOf(open.focus.station, open.focus, open.analysis);
  return (
    <main className={state.isMarginOpen ? styles.station : `${styles.station} ${styles.wide}`}>
      <section className={styles.left} aria-label={isTables ? "Tables" : "Plate"}>
        {lack !== undefined && <Empty title={lack.what}>{lack.where}</Empty>}
        {lack === undefined &&
          (isTables ? <TablesStation /> : isRanges ? <RangesStation /> : <PlateStation />)}
      </section>
      <Margin />
    </main>
  );
}

/** Nothing can be shown here yet. */
function Waiting(): ReactElement {
  const { state, study } = usePage();
  const [title, help] = waitingWords(state.work, study.readOut?.study.name);
  return (
    <main className={styles.alone}>
      <Empty title={title}>{help}</Empty>
    </main>
  );
}

function waitingWords({ kind }: Work, read: string | undefined): readonly [title: string, help: string] {
  const isBusy = kind === "busy";
  if (read !== undefined)
    return isBusy
      ? [
          `${read} is being worked out.`,
          "Its tables are read: look at them and mend them at Tables meanwhile.",
        ]
      : [`${read} is not worked out.`, "Its tables are read: an edit at Tables works it out anew."];
  return isBusy || kind === "idle"
    ? ["Reading the study.", "Ranges are being worked out on this machine."]
    : ["Nothing is open.", "Open a study above, or drop its folder or CSV files anywhere."];
}
