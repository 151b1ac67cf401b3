import type { Alignment } from "../alignment/result.ts";
import type { MarkerHorizon, Markers } from "../markers/result.ts";
import { sectionBase } from "../ranges/base.ts";
import { recoveryCoordinate } from "../ranges/coordinate.ts";
import type { Ranges } from "../ranges/result.ts";
import type { Candidate, LocalTaxon } from "../study/finds-result.ts";
import type { Section, Study } from "../study/model.ts";
import { comparedSets } from "./compared-sets.ts";
import { candidateRanges } from "./range-data.ts";
import type { PlacedHorizon, SetCase } from "./set-case.ts";
import { recoveryOfSets } from "./set-coordinate.ts";
import { allCandidates, setOf, setsOf } from "./sets.ts";
import { stepSets } from "./steps.ts";
import { type TimingWindow, timingWindow } from "./window.ts";

export interface TimingInput {
  readonly taxa: readonly LocalTaxon[];
  readonly candidates: readonly Candidate[];
  readonly markers: Markers;
  readonly ranges?: Ranges;
  /** The sections lined up; without it they are not answered together on the common scale. */
  readonly alignment?: Alignment;
  /** The taxa before finds below a reworking ceiling were taken out; without them nothing is compared. */
  readonly untrimmed?: readonly LocalTaxon[];
}

/** The sets of one section, each with all that its questions are answered from, and the window of their end levels. */
export function sectionCases(
  section: Section,
  { settings }: Study,
  { taxa, candidates, markers, untrimmed = taxa }: TimingInput,
): { cases: readonly SetCase[]; window: TimingWindow | undefined } {
  const coordinate = recoveryCoordinate(section);
  const { base } = sectionBase(section, settings, markers);
  const isHere = (taxon: LocalTaxon) => taxon.section === section.name;
  const ofSection = taxa.filter(isHere);
  const rangesOf = (some: readonly LocalTaxon[]) => candidateRanges(candidates, some, { base, coordinate });
  const ranges = rangesOf(ofSection);
  const horizons = placedHorizons(section.name, markers);
  const horizon = markers.main.bySection.get(section.name);
  const { durationHorizons, sets, window } = settings.timing;
  const { inRecovery } = recoveryOfSets(section, ofSection, settings);
  const compared = {
    section: section.name,
    ranges: inRecovery(setOf(section.name, allCandidates, ranges)).set.ranges,
    taxa: ofSection,
    untrimmed: untrimmed.filter(isHere),
    confidence: settings.confidence,
    rangesOf,
  };
  const cases = [
    ...setsOf(section.name, ranges, sets),
    ...stepSets(section.name, ranges, settings),
    ...comparedSets(compared),
  ].map((set) => ({
    section,
    ...inRecovery(set),
    horizons,
    confidence: settings.confidence,
    durationHorizons,
    settings,
    originM: horizon?.positionM ?? 0,
  }));
  return {
    cases,
    window: ranges.length === 0 ? undefined : timingWindow(window, ranges, { section, horizon }),
  };
}

/**
 * Every horizon placed in the section. It goes by the name it answers to; where two answer to one name, the main
 * horizon keeps it, or the one picked by hand, and the other goes by its own.
 */
export function placedHorizons(section: string, markers: Markers): readonly PlacedHorizon[] {
  const here = markers.horizons.filter(
    (h) => h.section === section && Number.isFinite(h.lowM) && Number.isFinite(h.highM),
  );
  const main = markers.main.bySection.get(section);
  return here.map((marker) => ({ name: nameAmong(marker, here, main), marker }));
}

function nameAmong(
  marker: MarkerHorizon,
  here: readonly MarkerHorizon[],
  main: MarkerHorizon | undefined,
): string {
  const others = here.filter((other) => other !== marker && other.horizon === marker.horizon);
  if (others.length === 0) return marker.horizon;
  if (others.some(({ source }) => source === "manual"))
    return marker.source === "manual" || marker.name !== marker.horizon
      ? marker.name
      : `${marker.name} (${marker.source})`;
  const isMain = main?.name === marker.name && main.source === marker.source;
  return marker.source === "manual" || isMain ? marker.horizon : marker.name;
}
