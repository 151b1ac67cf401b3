import type { Drawing } from "../../figures/plates/drawing.ts";
import { carriedFaces } from "../faces.ts";
import { handOver } from "../hand-over.ts";
import type { Opened } from "../state/page-context.ts";
import type { PageState } from "../state/page-state.ts";
import { viewOf } from "../state/zoom.ts";
import { drawingOf } from "./drawing-of.ts";

/** Hands over the plate as it is seen, as one SVG file that carries its own faces. */
export async function downloadPlate(
  { analysis, focus, trying }: Opened,
  { frame, beside }: Pick<PageState, "frame" | "beside">,
  again?: (fontFaces: string) => Drawing,
): Promise<void> {
  const [{ renderPlate }, fontFaces] = await Promise.all([
    import("../../figures/render-plate.ts"),
    carriedFaces(),
  ]);
  const drawing =
    again?.(fontFaces) ??
    drawingOf(focus, analysis, {
      ...viewOf(focus, frame, analysis, trying?.was),
      ...(trying && { was: trying.was }),
      beside,
      fontFaces,
    });
  if (drawing === undefined) throw new Error("downloadPlate: expected a plate in view, got none");
  handOver(`${drawing.id}.svg`, renderPlate(drawing.element), "image/svg+xml");
}
