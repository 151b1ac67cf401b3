import type { ReactElement } from "react";
import { renderToStaticMarkup } from "react-dom/server";

/** The plate as the text of a standalone SVG file; the same in Node and in the page. */
export function renderPlate(plate: ReactElement): string {
  return `<?xml version="1.0" encoding="UTF-8"?>\n${renderToStaticMarkup(plate)}\n`;
}
