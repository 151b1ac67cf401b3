import type { ReactElement } from "react";
import type { Study } from "../../../core/study/model.ts";
import type { Recognition } from "../../../core/study/recognised.ts";
import { plural } from "../../../report/wordings/words.ts";
import { usePage } from "../../state/page-context.ts";
import { pathOf } from "./choices-of-sheet.ts";
import styles from "./confirm.module.css";
import type { Question } from "./questions.ts";
import { UnitChoice } from "./unit-choice.tsx";

interface QuestionListProps {
  readonly questions: readonly Question[];
  readonly read: Study;
}

/** What the files leave open, each with the field that answers it. */
export function QuestionList({ questions, read }: QuestionListProps): ReactElement {
  return (
    <ul className={styles.questions} aria-label="Questions">
      {questions.map((question) => (
        <li key={keyOf(question)}>
          <Asked question={question} read={read} />
        </li>
      ))}
    </ul>
  );
}

const askedWords = (asks: Recognition["asks"]): string =>
  asks === "axis"
    ? "height or depth?"
    : asks === "axis-and-unit"
      ? "height or depth, and in which unit?"
      : "in which unit?";

const keyOf = (question: Question): string =>
  [
    question.kind,
    question.sheet.file,
    "column" in question ? question.column.header : "",
    "code" in question ? question.code : "",
  ].join(" ");

function Asked({ question, read }: { readonly question: Question; readonly read: Study }): ReactElement {
  const { study } = usePage();
  const { sheet } = question;
  const { file } = sheet;
  const path = (...names: readonly string[]) => pathOf(file, read.settings, ...names);
  switch (question.kind) {
    case "unit": {
      const { column } = question;
      return (
        <>
          <span>
            <b>{column.header}</b> in {file}: {askedWords(column.asks)} Its rows are left out until then.
          </span>
          <span className={styles.fields}>
            <UnitChoice sheet={sheet} column={column} settings={read.settings} />
          </span>
        </>
      );
    }
    case "code":
      return (
        <label>
          <span>
            <b>{question.code}</b> in {plural(question.cells, "cell")} of {file}: what does it mean?
          </span>
          <select
            value=""
            onChange={(event) =>
              study.settle({ path: path("codes", question.code), value: event.currentTarget.value })
            }
          >
            <option value="">meaning?</option>
            <option value="found">found</option>
            <option value="not-found">looked for, not found</option>
            <option value="not-searched">not looked for</option>
            <option value="doubtful">found, doubtful</option>
            <option value="reworked">found, reworked</option>
          </select>
        </label>
      );
    case "blank":
      return (
        <label>
          <span>
            A sample of {file} in which all cells of a group are blank: was the group looked for there?
          </span>
          <select
            value=""
            onChange={(event) => study.settle({ path: path("blank"), value: event.currentTarget.value })}
          >
            <option value="">not said: not looked for</option>
            <option value="not-found">looked for, not found</option>
            <option value="not-searched">not looked for</option>
          </select>
        </label>
      );
    case "content":
      return (
        <span>
          <b>{question.column.header || "A column without a header"}</b> in {file} was taken to be{" "}
          <b>{question.column.is}</b> by its content alone. Look at it below; choosing it settles it.
        </span>
      );
    case "section":
      return (
        <form
          className={styles.fields}
          onSubmit={(event) => {
            event.preventDefault();
            const name = new FormData(event.currentTarget).get("section");
            if (typeof name === "string" && name.trim() !== "")
              study.settle({ path: path("section"), value: name.trim() });
          }}
        >
          <label>
            <span>{file} names no section: which one is it?</span>
            <input name="section" defaultValue={question.name} key={question.name} />
          </label>
          <button type="submit">This one</button>
        </form>
      );
    default:
      return question satisfies never;
  }
}
