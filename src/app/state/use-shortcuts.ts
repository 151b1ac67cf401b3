import { useEffect, useRef } from "react";
import type { Action } from "./actions.ts";

/** Acts on the keys of the actions, but never while a person writes or chooses from a list. */
export function useShortcuts(actions: readonly Action[], openGoTo: () => void): void {
  const latest = useRef({ actions, openGoTo });
  useEffect(() => {
    latest.current = { actions, openGoTo };
  });
  useEffect(() => {
    const onKey = (event: KeyboardEvent) => {
      if ((event.ctrlKey || event.metaKey) && event.key.toLowerCase() === "k") {
        event.preventDefault();
        latest.current.openGoTo();
        return;
      }
      if (event.altKey || event.defaultPrevented || takesKeys(event.target)) return;
      const key = keyName(event);
      const action = latest.current.actions.find(
        ({ shortcut, otherShortcut, isAvailable }) =>
          (shortcut === key || otherShortcut === key) && isAvailable,
      );
      if (action === undefined) return;
      event.preventDefault();
      action.act();
    };
    addEventListener("keydown", onKey);
    return () => removeEventListener("keydown", onKey);
  }, []);
}

/** The key as actions name it, with Control before it where that is held. */
function keyName({ key, ctrlKey, metaKey, shiftKey }: KeyboardEvent): string {
  if (!ctrlKey && !metaKey) return key === "=" ? "+" : key;
  return `Control+${shiftKey ? "Shift+" : ""}${key.toLowerCase()}`;
}

const takesKeys = (target: EventTarget | null): boolean =>
  target instanceof Element &&
  target.closest(
    "input:not([type=radio]), select, textarea, [contenteditable], [role=menu], [role=dialog]",
  ) !== null;
