import { useEffect, useRef } from "react";
import type { Action } from "./actions.ts";

/** Acts on the keys of the actions, but never while a person writes, chooses from a list, or holds a modifier. */
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
      if (event.ctrlKey || event.metaKey || event.altKey || event.defaultPrevented || takesKeys(event.target))
        return;
      const key = event.key === "=" ? "+" : event.key;
      const action = latest.current.actions.find(
        ({ shortcut, isAvailable }) => shortcut === key && isAvailable,
      );
      if (action === undefined) return;
      event.preventDefault();
      action.act();
    };
    addEventListener("keydown", onKey);
    return () => removeEventListener("keydown", onKey);
  }, []);
}

const takesKeys = (target: EventTarget | null): boolean =>
  target instanceof Element &&
  target.closest(
    "input:not([type=radio]), select, textarea, [contenteditable], [role=menu], [role=dialog]",
  ) !== null;
