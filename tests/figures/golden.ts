import { existsSync, readFileSync, writeFileSync } from "node:fs";
import { fileURLToPath } from "node:url";

const isUpdating = process.env["UPDATE_GOLDEN"] === "1";

/** The committed text of a figure; with UPDATE_GOLDEN=1 the figure as it is now is written first. */
export function goldenText(name: string, now: string): string {
  const path = fileURLToPath(new URL(`golden/${name}.svg`, import.meta.url));
  if (isUpdating) writeFileSync(path, now);
  if (!existsSync(path))
    throw new Error(`golden: expected ${path}; make it with UPDATE_GOLDEN=1 and look at it`);
  return readFileSync(path, "utf8");
}

/** One element a line, so that a change shows as the lines it touches. */
export function inLines(svg: string): string {
  return svg.replaceAll("><", ">\n<");
}
