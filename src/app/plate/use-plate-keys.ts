import { type RefObject, useEffect, useRef } from "react";
import { type PageContents, usePage } from "../state/page-context.ts";
import { moveFrame } from "../state/zoom.ts";
import type { Reading } from "./use-reading.ts";

/**
 * The wheel with Ctrl comes nearer about the reading line; alone it moves a frame that shows a part. Up and down move
 * the line.
 */
export function usePlateKeys(frame: RefObject<HTMLElement | null>, reading: Reading): void {
  const page = usePage();
  const latest = useRef({ page, reading });
  useEffect(() => {
    latest.current = { page, reading };
  });
  useEffect(() => {
    const element = frame.current;
    if (element === null) return undefined;
    const onWheel = (event: WheelEvent) => {
      const { page, reading } = latest.current;
      if (turn(event, page, reading)) event.preventDefault();
    };
    const onKeyDown = (event: KeyboardEvent) => latest.current.reading.onKeyDown(event);
    element.addEventListener("wheel", onWheel, { passive: false });
    element.addEventListener("keydown", onKeyDown);
    return () => {
      element.removeEventListener("wheel", onWheel);
      element.removeEventListener("keydown", onKeyDown);
    };
  }, [frame]);
}

function turn(event: WheelEvent, page: PageContents, reading: Reading): boolean {
  const { state, open, dispatch } = page;
  if (open === undefined || event.deltaY === 0) return false;
  const isZoom = event.ctrlKey || event.metaKey;
  if (!isZoom && (state.frame === undefined || event.shiftKey)) return false;
  const now = { focus: open.focus, frame: state.frame, analysis: open.analysis };
  const next = isZoom
    ? moveFrame(now, {
        factor: Math.exp(Math.max(-60, Math.min(60, event.deltaY)) / 250),
        aboutM: inFocus(reading, page),
      })
    : moveFrame(now, { shift: -event.deltaY / 1200 });
  dispatch({ kind: "framed", frame: next });
  return true;
}

/** The height the zoom keeps in place; none where the line is of another section's panel. */
function inFocus({ heightM, panel }: Reading, { open }: PageContents): number | undefined {
  return panel?.section === open?.focus.section?.name ? heightM : undefined;
}
