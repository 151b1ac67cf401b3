import { type ReactElement, useMemo } from "react";
import { readingFacts } from "../reading/reading-facts.ts";
import { heightOf } from "../state/level.ts";
import { usePage } from "../state/page-context.ts";
import styles from "./status.module.css";

/** What lies under the reading line, and the promise that holds everywhere. */
export function Status(): ReactElement {
  const { state, open } = usePage();
  const { reading } = state;
  const facts = useMemo(() => {
    const section = open?.focus.section;
    if (open === undefined || section === undefined || reading === undefined) return undefined;
    const heightM = heightOf(open.analysis, section.name, reading);
    return heightM === undefined ? undefined : readingFacts(open.analysis, section, heightM);
  }, [open, reading]);
  return (
    <footer className={styles.status}>
      <section className={styles.facts} aria-label="Under the reading line">
        {facts === undefined ? (
          <span>Reading line: point at a plate, or use its up and down arrows.</span>
        ) : (
          <>
            <b>{facts.own}</b>
            {facts.beyond && <span>{facts.beyond}</span>}
            {[facts.fromHorizon, facts.common, facts.rock].map(
              (fact) => fact && <span key={fact}>{fact}</span>,
            )}
            {facts.sample && (
              <span>
                sample {facts.sample}
                {facts.search && ` · ${facts.search}`}
              </span>
            )}
            {facts.iridium && <span>{facts.iridium}</span>}
          </>
        )}
      </section>
      <span className={styles.promise}>offline · nothing leaves this machine</span>
    </footer>
  );
}
