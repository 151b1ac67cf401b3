import type { ReactElement } from "react";
import type { Problem } from "../../core/study/problem.ts";
import styles from "./tables.module.css";

/** Marks a cell that has problems, and says them. */
export function ProblemSign({
  problems,
}: {
  readonly problems: readonly Problem[] | undefined;
}): ReactElement | null {
  if (problems === undefined || problems.length === 0) return null;
  const words = problems.map(({ expected, mend }) => `expected ${expected}. ${mend}`).join(" ");
  return (
    <span className={styles.sign} title={words}>
      <span aria-hidden="true">{worst(problems) === "error" ? "△ " : "○ "}</span>
      <span className={styles.said}>
        {worst(problems)}: {words}{" "}
      </span>
    </span>
  );
}

export const worst = (problems: readonly Problem[]): Problem["severity"] =>
  problems.some(({ severity }) => severity === "error") ? "error" : "caution";
