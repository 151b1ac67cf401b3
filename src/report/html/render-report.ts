import { createElement } from "react";
import { renderToStaticMarkup } from "react-dom/server";
import { type ReportContent, ReportPage } from "./report-page.tsx";

/** The report as the text of one HTML file that needs nothing beside itself. */
export function renderReport(content: ReportContent): string {
  return `<!doctype html>\n${renderToStaticMarkup(createElement(ReportPage, content))}\n`;
}
