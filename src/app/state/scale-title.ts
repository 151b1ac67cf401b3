import type { Section } from "../../core/study/model.ts";
import type { VerticalScale } from "../../figures/plates/drawing.ts";

export function scaleTitle(scale: VerticalScale, section: Section | undefined): string {
  switch (scale) {
    case "own":
      return section === undefined ? "Own height" : `Own ${section.axis}, ${section.unit}`;
    case "from-horizon":
      return "From the main horizon, m";
    case "common":
      return "Common scale, m";
    default:
      return scale satisfies never;
  }
}
