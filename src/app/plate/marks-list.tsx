import { type KeyboardEvent, type ReactElement, useState } from "react";
import styles from "./plate.module.css";
import type { Marks, OnMark } from "./use-marks.ts";

interface MarksListProps {
  readonly marks: Marks;
  readonly onMark?: OnMark;
  /** The keys that a station has for marks, in words. */
  readonly keys?: string;
}

/** The marks of the plate for the keyboard: arrows walk through them, Enter opens their rows. */
export function MarksList({ marks, onMark, keys }: MarksListProps): ReactElement | null {
  const [current, setCurrent] = useState(0);
  if (marks.listed.length === 0) return null;
  const place = Math.min(current, marks.listed.length - 1);
  const walk = (event: KeyboardEvent<HTMLElement>) => {
    const mark = marks.listed[place];
    const isPlain = !event.altKey && !event.ctrlKey && !event.metaKey;
    if (isPlain && mark !== undefined && onMark?.(event.key, mark) === true) return event.preventDefault();
    const next = walked(event.key, place, marks.listed.length);
    if (next === undefined) return;
    event.preventDefault();
    setCurrent(next);
    event.currentTarget.closest("ul")?.querySelectorAll("button")[next]?.focus();
  };
  return (
    <div className={styles.marks}>
      <h2 id="marks-title">On this plate</h2>
      <ul aria-labelledby="marks-title" title={keys}>
        {marks.listed.map((mark, index) => (
          <li key={`${mark.kind} ${mark.name}`}>
            <button
              type="button"
              tabIndex={index === place ? 0 : -1}
              onKeyDown={walk}
              onFocus={() => {
                setCurrent(index);
                marks.point(mark);
              }}
              onBlur={() => marks.point(undefined)}
              onPointerEnter={() => marks.point(mark)}
              onPointerLeave={() => marks.point(undefined)}
              onClick={() => marks.open(mark)}
            >
              {mark.kind === "taxon" ? <i>{mark.name}</i> : mark.name}
              <span className={styles.said}>, open its rows</span>
            </button>
          </li>
        ))}
      </ul>
    </div>
  );
}

function walked(key: string, place: number, count: number): number | undefined {
  switch (key) {
    case "ArrowRight":
    case "ArrowDown":
      return Math.min(place + 1, count - 1);
    case "ArrowLeft":
    case "ArrowUp":
      return Math.max(place - 1, 0);
    case "Home":
      return 0;
    case "End":
      return count - 1;
    default:
      return undefined;
  }
}
