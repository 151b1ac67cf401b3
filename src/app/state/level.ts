import type { Analysis } from "../../core/analysis-result.ts";

/** A height that all plates share: metres from the main horizon, or, where a section has none, its own height. */
export type Level =
  | { readonly kind: "from-horizon"; readonly metres: number }
  | { readonly kind: "height"; readonly section: string; readonly metres: number };

export function levelAt(analysis: Analysis, section: string, heightM: number): Level {
  const main = analysis.markers.main.bySection.get(section);
  if (main === undefined) return { kind: "height", section, metres: heightM };
  return { kind: "from-horizon", metres: heightM - main.positionM };
}

/** The level as a height in a section; undefined where the section cannot say where it lies. */
export function heightOf(analysis: Analysis, section: string, level: Level): number | undefined {
  const main = analysis.markers.main.bySection.get(section);
  if (level.kind === "height") return level.section === section ? level.metres : undefined;
  return main === undefined ? undefined : main.positionM + level.metres;
}
