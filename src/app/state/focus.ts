import type { Analysis } from "../../core/analysis-result.ts";
import type { Section } from "../../core/study/model.ts";
import type { TaxonSet } from "../../core/timing/result.ts";
import type { VerticalScale } from "../../figures/plates/drawing.ts";
import type { Station } from "../../report/findings/finding.ts";
import type { RangesPlace } from "../ranges/ranges-place.ts";
import type { Place } from "./place.ts";

/** What every plate is about: the place, made good against the study that is open. */
export interface Focus {
  readonly station: Station;
  readonly section?: Section;
  readonly set?: TaxonSet;
  readonly sets: readonly TaxonSet[];
  readonly scale: VerticalScale;
  readonly ranges: RangesPlace;
}

export function focusOf(place: Place, analysis: Analysis): Focus {
  const { sections } = analysis.study;
  const section = sections.find(({ name }) => name === place.section) ?? sections[0];
  const sets = analysis.timing.sets.filter((set) => set.section === section?.name);
  const set = sets.find((set) => set.set === place.set) ?? sets[0];
  return { station: place.station, section, set, sets, scale: place.scale, ranges: place.ranges };
}
