import { type ReactElement, useEffect, useMemo, useRef } from "react";
import { plural } from "../../../report/wordings/words.ts";
import { usePage } from "../../state/page-context.ts";
import { ColumnTable } from "./column-table.tsx";
import styles from "./confirm.module.css";
import { QuestionList } from "./question-list.tsx";
import { questionsOf } from "./questions.ts";
import { useTurned } from "./use-turned.ts";

/** What every column was taken to be: questions first, then the columns, each to be changed; open where something is asked. */
export function Confirm(): ReactElement | null {
  const { study } = usePage();
  const read = study.readOut?.study;
  const questions = useMemo(() => (read === undefined ? [] : questionsOf(read)), [read]);
  const [turned, turn] = useTurned(`${study.readOut?.key} ${read?.name}`);
  const isOpen = turned ?? questions.length > 0;
  const summary = useRef<HTMLElement>(null);
  const hadFocus = useRef(false);
  useEffect(() => {
    // The last answer closes the fields: who answered goes on from here.
    if (!isOpen && hadFocus.current && document.activeElement === document.body) summary.current?.focus();
    if (!isOpen) hadFocus.current = false;
  }, [isOpen]);
  if (read === undefined) return null;
  return (
    // oxlint-disable-next-line jsx-a11y/no-noninteractive-element-interactions -- only listens to where the keys are
    <details
      className={styles.confirm}
      open={isOpen}
      onFocus={() => {
        hadFocus.current = true;
      }}
    >
      <summary
        ref={summary}
        onClick={(event) => {
          event.preventDefault();
          turn(!isOpen);
        }}
      >
        What each column was taken to be
        {questions.length > 0 && <b> · {plural(questions.length, "question")} to answer</b>}
      </summary>
      {isOpen && (
        // oxlint-disable-next-line jsx-a11y/no-noninteractive-tabindex -- the keyboard scrolls it
        <section className={styles.body} tabIndex={0} aria-label="Columns and questions">
          {questions.length > 0 && <QuestionList questions={questions} read={read} />}
          {read.sheets.map((sheet) => (
            <ColumnTable key={sheet.file} sheet={sheet} read={read} />
          ))}
        </section>
      )}
    </details>
  );
}
