import { ChevronDown, ChevronUp } from "lucide-react";
import { type ReactElement, type RefObject, useEffect } from "react";
import { usePage } from "../state/page-context.ts";
import type { ShownTable } from "./shown-table.ts";
import styles from "./tables.module.css";
import type { Finding } from "./use-find.ts";

interface FindToolsProps {
  readonly table: ShownTable;
  readonly field: RefObject<HTMLInputElement | null>;
  readonly find: Finding;
  /** Whether rows without the words are shown too. */
  readonly wantsAll: boolean;
  readonly setAll: (wantsAll: boolean) => void;
}

/** Words to look for: rows that hold them, and one cell after another. */
export function FindTools({ table, field, find, wantsAll, setAll }: FindToolsProps): ReactElement {
  const { state, go } = usePage();
  const words = state.place.find ?? "";
  // The address follows the field, not the field the address: a quick hand would lose letters.
  useEffect(() => {
    const input = field.current;
    // oxlint-disable-next-line react/immutability -- a field without state of its own is set where it lies
    if (input !== null && input !== document.activeElement) input.value = words;
  }, [field, words]);
  return (
    <div className={styles.find}>
      <label>
        Find{" "}
        <input
          ref={field}
          type="search"
          defaultValue={words}
          placeholder={`in ${table.title}`}
          onChange={(event) => go({ find: event.currentTarget.value, table: table.id, row: undefined })}
          onKeyDown={(event) => {
            if (event.key === "Enter" || event.key === "F3") find.next(event.shiftKey);
            else return;
            event.preventDefault();
          }}
        />
      </label>
      {words !== "" && (
        <>
          <button
            type="button"
            aria-label="Find the one before"
            title="Shift + F3"
            onClick={() => find.next(true)}
          >
            <ChevronUp aria-hidden size={15} />
          </button>
          <button type="button" aria-label="Find the next" title="F3" onClick={() => find.next(false)}>
            <ChevronDown aria-hidden size={15} />
          </button>
          <label className={styles.check}>
            <input
              type="checkbox"
              checked={wantsAll}
              onChange={(event) => setAll(event.currentTarget.checked)}
            />
            all rows
          </label>
        </>
      )}
    </div>
  );
}
