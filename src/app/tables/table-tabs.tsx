import type { ReactElement } from "react";
import { usePage } from "../state/page-context.ts";
import { hashOf } from "../state/place.ts";
import type { ShownTable } from "./shown-table.ts";
import styles from "./tables.module.css";

interface TableTabsProps {
  readonly groups: readonly (readonly [
    title: string,
    tables: readonly Pick<ShownTable, "id" | "problems">[],
  ])[];
  readonly current: string;
}

/** Every table is a place of its own, so its tab is a link. */
export function TableTabs({ groups, current }: TableTabsProps): ReactElement {
  const { state } = usePage();
  return (
    <nav className={styles.tabs} aria-label="Tables">
      {groups.map(([title, tables]) => (
        <div key={title} className={styles.group}>
          <span className={styles.groupTitle} id={`tables-${title}`}>
            {title}
          </span>
          <ul aria-labelledby={`tables-${title}`}>
            {tables.map(({ id, problems }) => (
              <li key={id}>
                <a
                  href={hashOf({ ...state.place, table: id, row: undefined, find: undefined })}
                  aria-current={id === current ? "true" : undefined}
                  ref={id === current ? bringIntoView : undefined}
                >
                  {id.replace(/\.csv$/, "")}
                  {problems.length > 0 && <ProblemCount problems={problems} />}
                </a>
              </li>
            ))}
          </ul>
        </div>
      ))}
    </nav>
  );
}

function bringIntoView(tab: HTMLElement | null): void {
  tab?.scrollIntoView({ block: "nearest", inline: "nearest" });
}

function ProblemCount({ problems }: Pick<ShownTable, "problems">): ReactElement {
  const hasErrors = problems.some(({ severity }) => severity === "error");
  return (
    <span className={hasErrors ? styles.errorCount : styles.cautionCount}>
      <span aria-hidden="true">{hasErrors ? "△" : "○"}</span>
      {problems.length}
      <span className={styles.said}> {problems.length === 1 ? "problem" : "problems"}</span>
    </span>
  );
}
