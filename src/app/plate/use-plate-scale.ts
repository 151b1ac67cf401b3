import { type RefObject, useLayoutEffect, useState } from "react";
import type { Drawing } from "../../figures/plates/drawing.ts";

/** Below this a plate's smallest letters (7 pt) cannot be read: it keeps its physical size and scrolls instead. */
const LEAST = 1.08;
const PHYSICAL = 4 / 3;
const MOST = 1.5;

/** Pixels of the page for a point of the plate: the plate fills the width it has, as far as it stays readable. */
export function usePlateScale(frame: RefObject<HTMLElement | null>, { width }: Drawing): number {
  const [room, setRoom] = useState(0);
  useLayoutEffect(() => {
    const element = frame.current;
    if (element === null) return undefined;
    const measure = () => setRoom(element.clientWidth);
    measure();
    const observer = new ResizeObserver(measure);
    observer.observe(element);
    return () => observer.disconnect();
  }, [frame]);
  const fitting = room / width;
  return fitting < LEAST ? PHYSICAL : Math.min(MOST, fitting);
}
