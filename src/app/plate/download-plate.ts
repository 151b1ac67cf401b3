import { carriedFaces } from "../faces.ts";
import type { Opened } from "../state/page-context.ts";
import type { Frame } from "../state/page-state.ts";
import { viewOf } from "../state/zoom.ts";
import { drawingOf } from "./drawing-of.ts";

/** Hands over the plate as it is seen, as one SVG file that carries its own faces. */
export async function downloadPlate({ analysis, focus }: Opened, frame: Frame | undefined): Promise<void> {
  const [{ renderPlate }, fontFaces] = await Promise.all([
    import("../../figures/render-plate.ts"),
    carriedFaces(),
  ]);
  const drawing = drawingOf(focus, analysis, { ...viewOf(focus, frame, analysis), fontFaces });
  if (drawing === undefined) throw new Error("downloadPlate: expected a plate in view, got none");
  const address = URL.createObjectURL(new Blob([renderPlate(drawing.element)], { type: "image/svg+xml" }));
  const link = document.createElement("a");
  link.href = address;
  link.download = `${drawing.id}.svg`;
  link.click();
  setTimeout(() => URL.revokeObjectURL(address), 10_000);
}
