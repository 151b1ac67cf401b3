import { type ReactElement, type ReactNode, useState } from "react";
import { plural } from "../../report/wordings/words.ts";
import styles from "../header/work-bar.module.css";
import { usePage } from "../state/page-context.ts";
import { heldEdits } from "../tables/history.ts";
import { dateWords } from "./date-words.ts";

/** What a person must know of their kept work: that it was opened, that there is some, or that none is kept here. */
export function KeepingBar(): ReactElement | null {
  const { study, keeping, dispatch } = usePage();
  const [read, setRead] = useState<readonly string[]>([]);
  const { readOut } = study;
  if (readOut === undefined) return null;
  const { key, opened } = readOut;
  const { fault, hold, names } = keeping;
  const edits = heldEdits(opened).length;
  const [last] = names;
  const close = (id: string) => setRead([...read, id]);
  const bar = (id: string, isDue: boolean, children: ReactNode) =>
    isDue &&
    !read.includes(id) && (
      <Bar key={id} close={() => close(id)}>
        {children}
      </Bar>
    );
  return (
    <div className={styles.place}>
      <output>
        {bar(
          `fault ${fault}`,
          fault !== undefined,
          `The edits could not be kept in this browser (${fault}). Give them out as files before closing the page.`,
        )}
        {bar(
          `elsewhere ${key}`,
          hold === "elsewhere",
          "This study is open in another tab too. Edits made here are not kept: work there, or close it and reload this page.",
        )}
        {bar(
          `opened ${key}`,
          edits > 0,
          <>
            Opened with {plural(edits, "edit")} kept in this browser.{" "}
            <button
              type="button"
              onClick={() => {
                dispatch({ kind: "all-undone" });
                close(`opened ${key}`);
              }}
            >
              Back to the tables as they were
            </button>
          </>,
        )}
        {last !== undefined &&
          bar(
            "offer",
            last.key !== key,
            <>
              {last.name}, edited {dateWords(last.at)}, is kept in this browser.{" "}
              <button type="button" onClick={() => keeping.open(last)}>
                Open it
              </button>
            </>,
          )}
      </output>
    </div>
  );
}

function Bar({ children, close }: { readonly children: ReactNode; readonly close: () => void }) {
  return (
    <div className={styles.bar}>
      <span>{children}</span>
      <button type="button" onClick={close}>
        Close
      </button>
    </div>
  );
}
