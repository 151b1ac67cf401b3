import { type ReactElement, useDeferredValue, useMemo } from "react";
import { type Opened, usePage } from "../state/page-context.ts";
import type { Beside, PageState } from "../state/page-state.ts";
import { viewOf } from "../state/zoom.ts";
import { drawingOf } from "./drawing-of.ts";
import { PlateView } from "./plate-view.tsx";

/** The plate of the station in view, drawn anew when its focus or frame changes. */
export function PlateStation(): ReactElement | null {
  const { state, open } = usePage();
  const frame = useDeferredValue(state.frame);
  const shown = useDeferredValue(open);
  const { beside } = state;
  const drawing = useMemo(() => shown && draw(shown, frame, beside), [shown, frame, beside]);
  if (open === undefined || drawing === undefined) return null;
  return <PlateView drawing={drawing} open={open} />;
}

/** While something is tried the part shown stays where it is, whatever moves in it, and what was stands behind as a ghost. */
function draw({ analysis, focus, trying }: Opened, frame: PageState["frame"], beside: Beside) {
  const view = viewOf(focus, frame, analysis, trying?.was);
  return drawingOf(focus, analysis, { ...view, beside, ...(trying && { was: trying.was }) });
}
