import { type RefObject, useEffect, useRef } from "react";
import type { Mark } from "./mark.ts";
import { markUnder, type OnMark } from "./use-marks.ts";
import { usePlainKeys } from "./use-plain-keys.ts";

/** Hands on clicks on the marks of a sheet, and plain keys while a mark is pointed at. */
export function useMarkPresses(
  sheet: RefObject<HTMLElement | null>,
  pointed: Mark | undefined,
  onMark: OnMark | undefined,
): void {
  usePlainKeys((key) => pointed !== undefined && onMark?.(key, pointed) === true);
  const latest = useRef(onMark);
  useEffect(() => {
    latest.current = onMark;
  });
  useEffect(() => {
    const element = sheet.current;
    if (element === null) return undefined;
    const onClick = (event: MouseEvent) => {
      const mark = event.target === null ? undefined : markUnder(event.target);
      if (mark !== undefined) latest.current?.("click", mark);
    };
    element.addEventListener("click", onClick);
    return () => element.removeEventListener("click", onClick);
  }, [sheet]);
}
