import type { Analysis } from "../../core/analysis-result.ts";
import type { Station } from "../../report/findings/finding.ts";
import type { Focus } from "./focus.ts";

/** What a station lacks before it can show anything, and where it would come from. */
export interface Lack {
  readonly what: string;
  readonly where: string;
}

export function lackOf(station: Station, focus: Focus, analysis: Analysis): Lack | undefined {
  const { study, markers, taxa } = analysis;
  const { section } = focus;
  if (station === "tables")
    return study.sheets.length > 0
      ? undefined
      : lack("No table was read.", "Drop a study folder or CSV files anywhere.");
  if (section === undefined)
    return lack(
      "No section could be used.",
      "Tables lists what stands in the way: sections need an axis and a unit, in sections.csv or a column header.",
    );
  switch (station) {
    case "markers":
      return section.measurements.length > 0 || markers.horizons.some((h) => h.section === section.name)
        ? undefined
        : lack(
            `${section.title} has no marker horizon and no measurement.`,
            "Horizons given by hand belong in horizons.csv; contents, ratios and grain counts in measurements.csv.",
          );
    case "fence":
      return fenceLack(analysis);
    case "ranges":
      return taxa.some((taxon) => taxon.section === section.name)
        ? undefined
        : lack(
            `${section.title} has no find that counts.`,
            "Finds belong in occurrences.csv, published ranges in published-ranges.csv.",
          );
    case "timing":
      return focus.set !== undefined && focus.set.taxa.length > 0
        ? undefined
        : lack(
            `${section.title} has no taxon whose end is in question.`,
            "Ranges shows the role of each taxon; taxa.minimumHorizons in settings.json says how many horizons one needs.",
          );
    default:
      return station satisfies never;
  }
}

const lack = (what: string, where: string): Lack => ({ what, where });

function fenceLack({ alignment, study }: Analysis): Lack | undefined {
  if (study.sections.length < 2)
    return lack(
      "A fence needs two sections or more.",
      "Each section is a row of sections.csv, or a name in the other tables.",
    );
  if (alignment.datum !== undefined && alignment.sections.length > 0) return undefined;
  return lack(
    "No horizon is shared between the sections, so they cannot hang on one datum.",
    "Give the same horizon name in each section in horizons.csv, or declare found horizons one in settings.json (boundary.same).",
  );
}
