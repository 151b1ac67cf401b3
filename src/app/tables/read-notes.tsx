import type { ReactElement } from "react";
import type { Study } from "../../core/study/model.ts";
import { heldWords } from "../../report/findings/tables.ts";
import { plural } from "../../report/wordings/words.ts";
import { KeptPart } from "../keeping/kept-part.tsx";
import styles from "../margin/margin.module.css";
import { Problems } from "./problems.tsx";
import { SetAsideList } from "./set-aside-list.tsx";

/** The margin of a study that is read and not worked out yet. */
export function ReadNotes({ study }: { readonly study: Study }): ReactElement {
  return (
    // oxlint-disable-next-line jsx-a11y/no-noninteractive-tabindex -- the keyboard scrolls it
    <section className={styles.notes} tabIndex={0} aria-label="Notes on the tables">
      <p className={styles.finding}>{readWords(study)}</p>
      <Problems />
      <SetAsideList />
      <KeptPart />
    </section>
  );
}

function readWords(study: Study): string {
  const errors = study.problems.filter(({ severity }) => severity === "error").length;
  const read = `${plural(study.sections.length, "section")} with ${heldWords(study)} were read.`;
  return errors === 0
    ? `${read} Nothing had to be left out for errors.`
    : `${read} ${plural(errors, "error")} must be mended; what is unusable is left out.`;
}
