import { PanelRightClose, PanelRightOpen } from "lucide-react";
import { memo, type ReactElement } from "react";
import type { Finding } from "../../report/findings/finding.ts";
import { plain } from "../../report/wordings/words.ts";
import { KeptPart } from "../keeping/kept-part.tsx";
import { TaxonNotes } from "../ranges/taxon-notes.tsx";
import { type Opened, usePage } from "../state/page-context.ts";
import { findingOf } from "../state/station-state.ts";
import { Problems } from "../tables/problems.tsx";
import { ReadNotes } from "../tables/read-notes.tsx";
import { SetAsideList } from "../tables/set-aside-list.tsx";
import { TrialBar } from "../trial/trial-bar.tsx";
import { TrialFields } from "../trial/trial-fields.tsx";
import { Choices } from "./choices.tsx";
import styles from "./margin.module.css";
import { Methods } from "./methods.tsx";
import { Numbers } from "./numbers.tsx";
import { Weaknesses } from "./weaknesses.tsx";
import { WordsText } from "./words-text.tsx";

/** The notes beside a plate, in the order of an argument; they can be put away. */
export function Margin(): ReactElement {
  const { state, dispatch, open, study } = usePage();
  const { isMarginOpen } = state;
  const label = isMarginOpen ? "Close the margin" : "Open the margin";
  return (
    <aside className={isMarginOpen ? styles.margin : styles.closed} aria-label="Margin">
      <button
        type="button"
        className={styles.turn}
        aria-expanded={isMarginOpen}
        aria-label={label}
        title={`${label} (m)`}
        onClick={() => dispatch({ kind: "margin-turned" })}
      >
        {isMarginOpen ? <PanelRightClose aria-hidden size={16} /> : <PanelRightOpen aria-hidden size={16} />}
      </button>
      {isMarginOpen && open !== undefined && <Notes open={open} />}
      {isMarginOpen && open === undefined && study.readOut && <ReadNotes study={study.readOut.study} />}
    </aside>
  );
}

const Notes = memo(function Notes({ open }: { readonly open: Opened }): ReactElement {
  const finding = findingOf(open.all, open.focus);
  return (
    // oxlint-disable-next-line jsx-a11y/no-noninteractive-tabindex -- the keyboard scrolls it
    <section className={styles.notes} tabIndex={0} aria-label="Notes on the plate">
      {finding === undefined ? (
        <>
          <p className={styles.finding}>This station has nothing to say about what is in focus.</p>
          <TrialBar open={open} />
          <Choices analysis={open.analysis} station={open.focus.station} />
        </>
      ) : (
        <Argument finding={finding} open={open} />
      )}
    </section>
  );
});

function Argument({ finding, open }: { readonly finding: Finding; readonly open: Opened }): ReactElement {
  const was = open.trying?.wasFinding;
  return (
    <>
      <p className={styles.finding} data-testid="finding">
        <WordsText words={finding.sentence} />
      </p>
      {was !== undefined && plain(was.sentence) !== plain(finding.sentence) && (
        <p className={styles.was} data-testid="was">
          Was: <WordsText words={was.sentence} />
        </p>
      )}
      <TrialBar open={open} />
      {finding.station === "ranges" && <TaxonNotes open={open} />}
      <Numbers lines={finding.numbers} before={was?.numbers} />
      {finding.station === "tables" && <Problems />}
      {(finding.station === "tables" || finding.station === "ranges") && <SetAsideList />}
      {finding.station === "tables" && <KeptPart />}
      <Weaknesses weaknesses={finding.weaknesses} />
      <Methods methods={finding.methods} />
      <TrialFields open={open} />
      <Choices analysis={open.analysis} station={finding.station} />
    </>
  );
}
