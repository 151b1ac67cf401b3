import { type ReactElement, useMemo } from "react";
import { plural } from "../../../report/wordings/words.ts";
import { usePage } from "../../state/page-context.ts";
import { ColumnTable } from "./column-table.tsx";
import styles from "./confirm.module.css";
import { QuestionList } from "./question-list.tsx";
import { questionsOf } from "./questions.ts";

/** What every column was taken to be: questions first, then the columns, each to be changed; open where something is asked. */
export function Confirm(): ReactElement | null {
  const { study } = usePage();
  const read = study.readOut?.study;
  const questions = useMemo(() => (read === undefined ? [] : questionsOf(read)), [read]);
  if (read === undefined) return null;
  const isOwnPackage = read.files.some(({ name }) => /(?:^|[/\\])datapackage\.json$/.test(name));
  const isDue = questions.length > 0 || !isOwnPackage;
  return (
    // A study that is opened anew begins with its own state.
    <details key={`${study.readOut?.key} ${read.name}`} className={styles.confirm} open={isDue}>
      <summary>
        What each column was taken to be
        {questions.length > 0 && <b> · {plural(questions.length, "question")}</b>}
      </summary>
      <div className={styles.body}>
        {questions.length > 0 && <QuestionList questions={questions} read={read} />}
        {read.sheets.map((sheet) => (
          <ColumnTable key={sheet.file} sheet={sheet} read={read} />
        ))}
      </div>
    </details>
  );
}
