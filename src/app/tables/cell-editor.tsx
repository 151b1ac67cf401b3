import { type KeyboardEvent, type ReactElement, useEffect, useRef } from "react";
import styles from "./tables.module.css";

/** Which cell is left for after its text is taken. */
export type Leaving = "down" | "up" | "right" | "left" | "stay";

export interface CellEditorProps {
  readonly label: string;
  readonly start: string;
  readonly take: (text: string, leaving: Leaving) => void;
  readonly giveUp: () => void;
}

/** The field of the one cell that is being written in. Alt+Enter breaks the line. */
export function CellEditor({ label, start, take, giveUp }: CellEditorProps): ReactElement {
  const field = useRef<HTMLTextAreaElement>(null);
  const isDone = useRef(false);
  useEffect(() => {
    const element = field.current;
    isDone.current = false;
    element?.focus({ preventScroll: true });
    element?.setSelectionRange(element.value.length, element.value.length);
  }, []);
  const finish = (leaving: Leaving) => {
    if (isDone.current) return;
    isDone.current = true;
    take(field.current?.value ?? "", leaving);
  };
  const onKeyDown = (event: KeyboardEvent) => {
    event.stopPropagation();
    const leaving = leavingBy(event);
    if (event.key === "Escape") {
      isDone.current = true;
      giveUp();
    } else if (event.key === "Enter" && event.altKey) breakLine(field.current);
    else if (leaving !== undefined) finish(leaving);
    else return;
    event.preventDefault();
  };
  return (
    <textarea
      ref={field}
      className={styles.editor}
      rows={1}
      wrap="off"
      aria-label={label}
      defaultValue={start}
      spellCheck={false}
      onKeyDown={onKeyDown}
      onBlur={() => finish("stay")}
      onCopy={(event) => event.stopPropagation()}
      onCut={(event) => event.stopPropagation()}
      onPaste={(event) => event.stopPropagation()}
    />
  );
}

function breakLine(field: HTMLTextAreaElement | null): void {
  field?.setRangeText("\n", field.selectionStart, field.selectionEnd, "end");
}

function leavingBy({ key, shiftKey }: KeyboardEvent): Leaving | undefined {
  if (key === "Enter") return shiftKey ? "up" : "down";
  if (key === "Tab") return shiftKey ? "left" : "right";
  return undefined;
}
