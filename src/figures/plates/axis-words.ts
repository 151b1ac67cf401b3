import { formatGiven } from "../../core/study/heights.ts";
import type { SectionFrame } from "./section-frame.ts";

const LONGEST = 120;

/** What the axes of a plate read, in a line. */
export function axisWords({ section, vertical, main, second }: SectionFrame): string {
  const own = `${section.axis} in ${section.unit}${section.datum === "" ? "" : ` from ${section.datum.slice(0, LONGEST)}`}`;
  const horizon = main?.horizon.slice(0, LONGEST) ?? "";
  if (vertical === "common")
    return `Metres on the common scale, 0 at ${horizon || "the datum"}; small figures: ${own}.`;
  if (vertical === "from-horizon" && main !== undefined)
    return `Metres from ${horizon}, placed at ${formatGiven(main.positionM, section)}; small figures: ${own}.`;
  const capital = own.slice(0, 1).toUpperCase() + own.slice(1);
  return second && main
    ? `${capital}; small figures: metres from ${horizon}.`
    : `${capital}; no main horizon is placed here.`;
}
