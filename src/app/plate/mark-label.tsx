import { type CSSProperties, type ReactElement, type RefObject, useLayoutEffect, useState } from "react";
import type { Drawing } from "../../figures/plates/drawing.ts";
import type { Mark } from "./mark.ts";
import styles from "./plate.module.css";

interface MarkLabelProps {
  readonly mark: Mark | undefined;
  readonly sheet: RefObject<HTMLElement | null>;
  readonly drawing: Drawing;
}

/** Names the mark under the pointer or the focus, and frames all that is drawn for it. */
export function MarkLabel({ mark, sheet, drawing }: MarkLabelProps): ReactElement | null {
  const [box, setBox] = useState<MarkBox>();
  useLayoutEffect(() => {
    const element = sheet.current;
    setBox(mark === undefined || element === null ? undefined : boxOf(mark, element));
  }, [mark, sheet, drawing]);
  if (mark === undefined || box === undefined) return null;
  return (
    <div className={styles.mark} style={box.style} aria-hidden="true">
      <span className={box.isRight ? styles.nameLeft : styles.name}>
        {mark.kind === "taxon" ? <i>{mark.name}</i> : mark.name}
        <small>double-click: its rows</small>
      </span>
    </div>
  );
}

interface MarkBox {
  readonly style: CSSProperties;
  readonly isRight: boolean;
}

function boxOf({ kind, name }: Mark, sheet: HTMLElement): MarkBox | undefined {
  const origin = sheet.getBoundingClientRect();
  const parts = [...sheet.querySelectorAll(`[data-${kind}="${CSS.escape(name)}"]`)]
    .map((part) => part.getBoundingClientRect())
    .filter(({ width, height }) => width > 0 || height > 0);
  if (parts.length === 0) return undefined;
  const left = Math.min(...parts.map((part) => part.left)) - origin.left;
  const top = Math.min(...parts.map((part) => part.top)) - origin.top;
  const style = {
    left: left - 2,
    top: top - 2,
    width: Math.max(...parts.map((part) => part.right)) - origin.left - left + 4,
    height: Math.max(...parts.map((part) => part.bottom)) - origin.top - top + 4,
  };
  return { style, isRight: left > origin.width / 2 };
}
