import type { Analysis } from "../../core/analysis-result.ts";
import type { Section } from "../../core/study/model.ts";
import { askLevel } from "../../core/trial.ts";
import { offset, position, pValue } from "../../report/wordings/numbers.ts";

/** What can be said of one level at which all taxa of a set might have ended: its p, and where it lies against H. */
export function askedWords(
  analysis: Analysis,
  section: Section,
  { set, heightM }: { readonly set: string; readonly heightM: number },
): string {
  const facts = askLevel(analysis, { section: section.name, set, heightM });
  const main = analysis.markers.main.bySection.get(section.name);
  const from = main === undefined ? "" : `, ${offset(heightM - main.positionM)}\u00a0m from ${main.horizon}`;
  const place = `${position(section, heightM)}${from}`;
  if (facts === undefined) return place;
  if (facts.above > 0) return `${place}: ${facts.above} of ${facts.taxa} last finds lie above`;
  return facts.p === undefined ? place : `${place}: all at this level, ${pValue(facts.p)}`;
}
