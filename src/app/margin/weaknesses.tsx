import type { ReactElement } from "react";
import type { Weakness } from "../../report/findings/finding.ts";
import { plain } from "../../report/wordings/words.ts";
import styles from "./margin.module.css";
import { WordsText } from "./words-text.tsx";

export function Weaknesses({
  weaknesses,
}: {
  readonly weaknesses: readonly Weakness[];
}): ReactElement | null {
  if (weaknesses.length === 0) return null;
  return (
    <section className={styles.part}>
      <h2>What weakens this</h2>
      <ul className={styles.list}>
        {weaknesses.map(({ severity, words }, place) => (
          <li key={`${place} ${plain(words)}`} className={styles[severity]}>
            <span className={styles.sign} aria-hidden="true">
              {severity === "warning" ? "△" : "○"}
            </span>
            <span className={styles.said}>{severity === "warning" ? "Warning: " : "Note: "}</span>
            <WordsText words={words} />
          </li>
        ))}
      </ul>
    </section>
  );
}
