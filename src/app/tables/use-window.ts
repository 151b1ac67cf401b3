import { type RefObject, useEffect, useState } from "react";

const SPARE_ROWS = 12;

/** Which of many rows of one height are in view, with some to spare on both sides. */
export function useWindow(
  frame: RefObject<HTMLElement | null>,
  { rowHeight, count }: { readonly rowHeight: number; readonly count: number },
): { readonly first: number; readonly last: number } {
  const [{ top, height }, setView] = useState({ top: 0, height: 900 });
  useEffect(() => {
    const element = frame.current;
    if (element === null) return undefined;
    const look = () => setView({ top: element.scrollTop, height: element.clientHeight });
    look();
    const observer = new ResizeObserver(look);
    observer.observe(element);
    element.addEventListener("scroll", look, { passive: true });
    return () => {
      observer.disconnect();
      element.removeEventListener("scroll", look);
    };
  }, [frame]);
  const first = Math.max(0, Math.min(Math.floor(top / rowHeight), count) - SPARE_ROWS);
  const last = Math.min(count, Math.ceil((top + height) / rowHeight) + SPARE_ROWS);
  return { first, last: Math.max(first, last) };
}
