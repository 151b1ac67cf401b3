import type { Search, Section, Study } from "../model.ts";
import { occurrenceColumns } from "../occurrence-list.ts";
import { planes } from "../tables/planes.ts";
import { checkSection, checkStudy } from "./checks.ts";
import type { Assembly, SectionFrame } from "./context.ts";
import { readFrames } from "./frames.ts";
import { readMeasurements } from "./measurements.ts";
import { readOccurrences } from "./occurrences.ts";
import { readPublishedRanges, readRecovery } from "./ranges-and-recovery.ts";
import { readHorizons } from "./read-horizons.ts";
import { readSamples } from "./read-samples.ts";
import { readSearches } from "./read-searches.ts";
import { readChoices, readClaims } from "./records.ts";
import { readBeds, readIntervals } from "./rock.ts";
import { rowsOf } from "./rows.ts";
import { type SearchList, searchItems } from "./search-list.ts";
import { readTaxa } from "./taxa.ts";

/** Turns the read tables into sections in metres of height; what cannot be used is left out and told in `assembly.problems`. */
export function assembleStudy(assembly: Assembly): Pick<Study, "sections" | "taxa" | "choices" | "claims"> {
  const frames = readFrames(assembly);
  // Levels within 1e-9 m take the number met first: what a person stated directly comes before middles and legs.
  const horizons = readHorizons(frames, assembly);
  const beds = readBeds(frames, assembly);
  const intervals = readIntervals(frames, assembly);
  const samples = readSamples(frames, assembly);
  const taxa = readTaxa(assembly);
  const occurrences = readOccurrences(frames, { samples, taxa }, assembly);
  const lists = {
    intervals,
    beds,
    searches: readSearches(frames, { samples, taxa, occurrences }, assembly),
    occurrences,
    publishedRanges: readPublishedRanges(frames, assembly),
    measurements: readMeasurements(frames, samples, assembly),
    horizons,
    recovery: readRecovery(frames, assembly),
  };
  rowsOf(planes, assembly);
  const sections = [...frames.usable.values()].map((frame) => {
    const own = {
      intervals: lists.intervals.get(frame.name) ?? [],
      beds: lists.beds.get(frame.name) ?? [],
      samples: [...(samples.bySection.get(frame.name)?.values() ?? [])].toSorted(
        (a, b) => a.heightM - b.heightM,
      ),
      searches: lists.searches.get(frame.name),
      occurrences: lists.occurrences.get(frame.name) ?? [],
      publishedRanges: lists.publishedRanges.get(frame.name) ?? [],
      measurements: lists.measurements.get(frame.name) ?? [],
      horizons: lists.horizons.get(frame.name) ?? [],
      recovery: lists.recovery.get(frame.name) ?? [],
    };
    const section = sectionOf(frame, own);
    checkSection(section, frame.declared, assembly);
    return section;
  });
  checkStudy({ sections, taxa }, lists.searches, assembly);
  return { sections, taxa, choices: readChoices(assembly), claims: readClaims(frames, assembly) };
}

type Contents = Pick<
  Section,
  | "intervals"
  | "beds"
  | "samples"
  | "occurrences"
  | "publishedRanges"
  | "measurements"
  | "horizons"
  | "recovery"
> & { readonly searches: SearchList | undefined };

function sectionOf(frame: SectionFrame, own: Contents): Section {
  const { bottomM, topM, ...declared } = frame.declared;
  const ends = extremes(own);
  let searches: readonly Search[] | undefined;
  return {
    name: frame.name,
    axis: frame.axis,
    unit: frame.unit,
    ...declared,
    bottomM: bottomM ?? Math.min(ends.bottomM, topM ?? ends.bottomM),
    topM: topM ?? Math.max(ends.topM, bottomM ?? ends.topM),
    legs: [...frame.legs.values()],
    ...own,
    // Very many, and checking does not need them one by one.
    get searches() {
      searches ??= searchItems(own.searches);
      return searches;
    },
  };
}

/** The ends of what was searched, measured, logged and found; 0 where there is nothing. */
function extremes(own: Contents): { readonly bottomM: number; readonly topM: number } {
  let bottomM = Infinity;
  let topM = -Infinity;
  const widen = (base: number, top: number) => {
    bottomM = Math.min(bottomM, base);
    topM = Math.max(topM, top);
  };
  for (const { baseM, topM } of [...own.samples, ...own.beds, ...own.measurements]) widen(baseM, topM);
  for (const { heightM } of own.horizons) widen(heightM, heightM);
  for (const heightM of occurrenceColumns(own.occurrences).heightM.values) widen(heightM, heightM);
  for (const { firstM, lastM } of own.publishedRanges) widen(firstM, lastM);
  return bottomM === Infinity ? { bottomM: 0, topM: 0 } : { bottomM, topM };
}
