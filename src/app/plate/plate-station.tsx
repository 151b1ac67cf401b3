import { type ReactElement, useDeferredValue, useMemo } from "react";
import { type Opened, usePage } from "../state/page-context.ts";
import { viewOf } from "../state/zoom.ts";
import { drawingOf } from "./drawing-of.ts";
import { PlateView } from "./plate-view.tsx";

/** The plate of the station in view, drawn anew when its focus or frame changes. */
export function PlateStation(): ReactElement | null {
  const { state, open } = usePage();
  const frame = useDeferredValue(state.frame);
  const drawing = useMemo(() => open && draw(open, frame), [open, frame]);
  if (open === undefined || drawing === undefined) return null;
  return <PlateView drawing={drawing} open={open} />;
}

function draw({ analysis, focus }: Opened, frame: Parameters<typeof viewOf>[1]) {
  return drawingOf(focus, analysis, viewOf(focus, frame, analysis));
}
