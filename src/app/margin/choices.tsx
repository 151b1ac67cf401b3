import type { ReactElement } from "react";
import type { Analysis } from "../../core/analysis-result.ts";
import type { Station } from "../../report/findings/finding.ts";
import { choicesFor } from "./choices-for.ts";
import styles from "./margin.module.css";

/** The settings in force that this plate depends on; dark ones were chosen for this study. */
export function Choices({
  analysis,
  station,
}: {
  readonly analysis: Analysis;
  readonly station: Station;
}): ReactElement | null {
  const choices = choicesFor(station, analysis.study.settings);
  if (choices.length === 0) return null;
  return (
    <section className={styles.part}>
      <h2>Choices that matter here</h2>
      <ul className={styles.chips}>
        {choices.map(({ setting, words, isChanged }) => (
          <li key={setting} className={isChanged ? styles.changed : undefined} title={setting}>
            {words}
            {isChanged && <span className={styles.said}>, chosen for this study</span>}
          </li>
        ))}
      </ul>
      {choices.some(({ isChanged }) => isChanged) && (
        <p className={styles.legend}>Dark: chosen for this study in settings.json. Light: the default.</p>
      )}
    </section>
  );
}
