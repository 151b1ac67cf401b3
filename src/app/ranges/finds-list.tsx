import { type KeyboardEvent, type ReactElement, useState } from "react";
import type { Section } from "../../core/study/model.ts";
import { position } from "../../report/wordings/numbers.ts";
import { plural } from "../../report/wordings/words.ts";
import type { Opened } from "../state/page-context.ts";
import type { ListedFind } from "./listed-finds.ts";
import styles from "./ranges.module.css";
import { useSetAside } from "./use-set-aside.ts";

interface FindsListProps {
  readonly finds: readonly ListedFind[];
  readonly section: Section;
  readonly open: Opened;
}

/** The finds of the taxon in focus from above downward: arrows walk, x or the button sets aside or takes back. */
export function FindsList({ finds, section, open }: FindsListProps): ReactElement | null {
  const setAside = useSetAside(open, section.name);
  const [current, setCurrent] = useState(0);
  if (finds.length === 0) return null;
  const place = Math.min(current, finds.length - 1);
  const used = finds.filter(({ isUsed }) => isUsed).length;
  const walk = (event: KeyboardEvent<HTMLButtonElement>, row: string) => {
    const step = { ArrowDown: 1, ArrowUp: -1 }[event.key];
    if (step !== undefined) {
      event.preventDefault();
      const next = Math.min(Math.max(place + step, 0), finds.length - 1);
      event.currentTarget.closest("ul")?.querySelectorAll("button")[next]?.focus();
    } else if (event.key === "x" && !event.ctrlKey && !event.metaKey && !event.altKey) {
      event.preventDefault();
      setAside({ kind: "row", name: row });
    }
  };
  return (
    <>
      <h2>
        Its finds: {used} of {plural(finds.length, "find")} count
      </h2>
      <ul className={styles.finds} aria-label="Finds, from above downward">
        {finds.map(({ row, heightM, sample, isUsed, isHeld, words }, index) => (
          <li key={row}>
            <span className={isUsed ? styles.find : `${styles.find} ${styles.open}`}>
              {isUsed ? "" : "○ "}
              {position(section, heightM)}
              {sample !== undefined && `, ${sample}`}
              {words !== "" && `, ${words}`}
            </span>
            <button
              type="button"
              tabIndex={index === place ? 0 : -1}
              aria-label={`${isHeld ? "Take back" : "Set aside"} the find at ${position(section, heightM)}, ${row.replace(/:(\d+)$/, " row $1")}`}
              title={isHeld ? "Take back (x)" : "Set aside (x)"}
              onFocus={() => setCurrent(index)}
              onKeyDown={(event) => walk(event, row)}
              onClick={() => setAside({ kind: "row", name: row })}
            >
              {isHeld ? "Take back" : "Set aside"}
            </button>
          </li>
        ))}
      </ul>
    </>
  );
}
