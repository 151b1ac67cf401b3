import type { MarkerHorizon, Markers } from "../markers/result.ts";
import type { Candidate, LocalTaxon } from "../study/finds-result.ts";
import { groupBy } from "../study/grouping.ts";
import type { Section, Study } from "../study/model.ts";
import { type Base, sectionBase, workingRange } from "./base.ts";
import { type Coordinate, recoveryCoordinate } from "./coordinate.ts";
import { mirroredCoordinate, mirroredHeight, mirroredHorizons, mirroredTaxon } from "./mirrored.ts";
import type { HorizonAsked, RangeCase } from "./range-case.ts";
import { type SampledHorizon, sampledHorizons, sampledRange } from "./sampled-horizons.ts";

export interface RangesInput {
  readonly taxa: readonly LocalTaxon[];
  readonly candidates: readonly Candidate[];
  readonly markers: Markers;
}

/** Both ends of one taxon's range in one section; the base upside down. */
export interface TaxonCases {
  readonly top: RangeCase;
  readonly base: RangeCase;
}

/** A range the way up that it is looked at. */
interface Upright extends Pick<RangeCase, "section" | "end" | "bottomM" | "topM"> {
  readonly taxon: LocalTaxon;
  readonly coordinate: Coordinate;
  readonly base: Base;
  /** Levels searched for its group, from below upward. */
  readonly searched: readonly SampledHorizon[];
  readonly horizon?: HorizonAsked;
  readonly settings: Study["settings"];
}

/** The cases of every taxon found in a section, in the order of the taxa. */
export function sectionCases(
  section: Section,
  study: Study,
  { taxa, candidates, markers }: RangesInput,
): TaxonCases[] {
  const coordinate = recoveryCoordinate(section);
  const { base } = sectionBase(section, study.settings, markers);
  const horizon = markers.main.bySection.get(section.name);
  const ofSection = taxa.filter((t) => t.section === section.name && t.heightsM.length > 0);
  const marked = new Map(candidates.filter((c) => c.section === section.name).map((c) => [c.taxon, c]));
  const searched = new Map(
    [...groupBy(ofSection, (t) => t.group).keys()].map((group) => [
      group,
      sampledHorizons(section, group, coordinate),
    ]),
  );
  return ofSection.map((taxon) =>
    taxonCases(
      {
        section: section.name,
        end: "top",
        taxon,
        coordinate,
        base,
        searched: searched.get(taxon.group) ?? [],
        bottomM: section.bottomM,
        topM: section.topM,
        settings: study.settings,
      },
      horizon,
      marked.get(taxon.taxon)?.reachesTop ?? false,
    ),
  );
}

function taxonCases(upright: Upright, horizon: MarkerHorizon | undefined, reachesTop: boolean): TaxonCases {
  const { taxon, searched } = upright;
  const reachesBottom = isInFirst(taxon, searched);
  const asked =
    horizon === undefined ? undefined : { horizon: horizon.horizon, positionM: horizon.positionM };
  const isBelow = asked !== undefined && asked.positionM < taxon.heightsM[0];
  const base: Upright = {
    ...mirrored(upright),
    ...(isBelow ? { horizon: { ...asked, positionM: mirroredHeight(asked.positionM) } } : {}),
  };
  return {
    top: {
      ...caseOf({ ...upright, ...(asked === undefined ? {} : { horizon: asked }) }),
      reachesTop,
      reachesBottom,
    },
    base: { ...caseOf(base), reachesTop: reachesBottom, reachesBottom: reachesTop },
  };
}

/** The base is looked for from the last find: a known level beneath says nothing about it. */
function mirrored(upright: Upright): Upright {
  return {
    ...upright,
    end: "base",
    taxon: mirroredTaxon(upright.taxon),
    coordinate: mirroredCoordinate(upright.coordinate),
    searched: mirroredHorizons(upright.searched),
    base: { kind: "first" },
    bottomM: mirroredHeight(upright.topM),
    topM: mirroredHeight(upright.bottomM),
  };
}

function caseOf(upright: Upright): Omit<RangeCase, "reachesTop" | "reachesBottom"> {
  const { taxon, coordinate, searched, settings, base: known, ...given } = upright;
  const range = workingRange(taxon, known, coordinate);
  const sampled = sampledRange(taxon, range, searched);
  const hasFinds = taxon.publishedHorizons === undefined;
  return {
    ...given,
    taxon,
    coordinate,
    range,
    levels: hasFinds ? taxon.heightsM.map(coordinate.toEffective) : [],
    ...(sampled === undefined ? {} : { sampled }),
    searchedTopM: searched.length === 0 ? given.topM : searched[searched.length - 1].heightM,
    confidence: settings.confidence,
    identification: settings.taxa.identification,
  };
}

/** True where the lowest find lies in the lowest sample searched for its group. */
function isInFirst(taxon: LocalTaxon, searched: readonly SampledHorizon[]): boolean {
  const [lowest] = searched;
  if (lowest === undefined) return false;
  const sample = taxon.samples[0];
  return (sample !== undefined && lowest.samples.includes(sample)) || taxon.heightsM[0] <= lowest.heightM;
}
