import type { EndGrid } from "./end-grid.ts";

/** Heights at which taxa may have ended. */
export interface EndWindow {
  readonly lowM: number;
  /** Its top; then other tops for which the evidence is wanted too. */
  readonly topsM: readonly number[];
}

/** True where a node lies in a window that ends at this top, an edge of panels. */
export function belowTop(grid: EndGrid, node: number, topM: number): boolean {
  return grid.panels[grid.panelOf[node]].highM <= topM;
}
