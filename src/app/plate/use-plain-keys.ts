import { useEffect, useRef } from "react";

const takesKeys = (target: EventTarget | null): boolean =>
  target instanceof Element &&
  target.closest("input:not([type=checkbox]), select, textarea, [role=menu], [role=dialog]") !== null;

/** Acts on plain keys, but never while a person writes or chooses from a list. */
export function usePlainKeys(onKey: (key: string) => boolean): void {
  const latest = useRef(onKey);
  useEffect(() => {
    latest.current = onKey;
  });
  useEffect(() => {
    const listen = (event: KeyboardEvent) => {
      if (event.altKey || event.ctrlKey || event.metaKey || event.defaultPrevented) return;
      if (!takesKeys(event.target) && latest.current(event.key)) event.preventDefault();
    };
    addEventListener("keydown", listen);
    return () => removeEventListener("keydown", listen);
  }, []);
}
