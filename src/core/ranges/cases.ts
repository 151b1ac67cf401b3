import type { MarkerHorizon, Markers } from "../markers/result.ts";
import type { Candidate, LocalTaxon } from "../study/finds-result.ts";
import { groupBy } from "../study/grouping.ts";
import type { Section, Study } from "../study/model.ts";
import type { Settings } from "../study/settings.ts";
import { type Base, sectionBase } from "./base.ts";
import { type Coordinate, recoveryCoordinate } from "./coordinate.ts";
import { inCoordinate } from "./in-coordinate.ts";
import { mirroredCoordinate, mirroredHeight, mirroredHorizons, mirroredTaxon } from "./mirrored.ts";
import type { HorizonAsked, RangeCase } from "./range-case.ts";
import { type RecoveryPlace, type RecoverySource, weighingRecovery } from "./recovery.ts";
import { coordinateOf, squaredPieces } from "./recovery-pieces.ts";
import { rockBreaks } from "./rock-breaks.ts";
import { type SampledHorizon, sampledHorizons, sampledRange } from "./sampled-horizons.ts";
import { isUnequal, searchEffort } from "./search-effort.ts";

export interface RangesInput {
  readonly taxa: readonly LocalTaxon[];
  readonly candidates: readonly Candidate[];
  readonly markers: Markers;
}

/** Both ends of one taxon's range in one section; the base upside down. */
export interface TaxonCases {
  readonly isCandidate: boolean;
  readonly top: RangeCase;
  readonly base: RangeCase;
}

/** A range the way up that it is looked at. */
interface Upright extends GroupFrame, Pick<RangeCase, "section" | "end" | "bottomM" | "topM" | "breaks"> {
  readonly taxon: LocalTaxon;
  readonly base: Base;
  readonly horizon?: HorizonAsked;
  readonly settings: Settings;
}

/** The shapes of recovery of one group that its ranges are looked at under. */
interface Shapes {
  readonly given: Coordinate;
  readonly constant: Coordinate;
  readonly weighing:
    | {
        readonly kind: "known";
        readonly source: RecoverySource;
        readonly weighed: Coordinate;
        readonly squared: Coordinate;
      }
    | { readonly kind: "unavailable"; readonly reason: string };
}

/** What the taxa of one group in one section share. */
interface GroupFrame {
  readonly shapes: Shapes;
  /** Levels at which the group was looked for, from below upward. */
  readonly searched: readonly SampledHorizon[];
}

/** The cases of every taxon found in a section, in the order of the taxa. */
export function sectionCases(
  section: Section,
  study: Study,
  { taxa, candidates, markers }: RangesInput,
): TaxonCases[] {
  const { settings } = study;
  const { base } = sectionBase(section, settings, markers);
  const horizon = markers.main.bySection.get(section.name);
  const ofSection = taxa.filter((t) => t.section === section.name && t.heightsM.length > 0);
  const marks = new Map(candidates.filter((c) => c.section === section.name).map((c) => [c.taxon, c]));
  const frames = new Map(
    [...groupBy(ofSection, (t) => t.group)].map(([group, ofGroup]) => [
      group,
      groupFrame({ section, group, taxa: ofGroup }, settings),
    ]),
  );
  const breaks = rockBreaks(section);
  const { bottomM, topM } = section;
  return ofSection.flatMap((taxon) => {
    const frame = frames.get(taxon.group);
    if (frame === undefined) return [];
    const shared = { section: section.name, end: "top", bottomM, topM, breaks, base, settings } as const;
    return [taxonCases({ ...shared, ...frame, taxon }, horizon, marks.get(taxon.taxon))];
  });
}

function groupFrame(place: RecoveryPlace, settings: Settings): GroupFrame {
  const constant = recoveryCoordinate(place.section);
  const source = settings.ranges.recovery;
  const isWeighed = source !== "uniform" || settings.ranges.methods.includes("recovery");
  const weighing = isWeighed
    ? weighingRecovery(place, source)
    : ({ kind: "unavailable", reason: "not asked for" } as const);
  return {
    searched: withEffort(place, sampledHorizons(place.section, place.group, constant)),
    shapes: {
      constant,
      given:
        source === "uniform" || weighing.kind === "unavailable" ? constant : weighing.recovery.coordinate,
      weighing:
        weighing.kind === "unavailable"
          ? weighing
          : {
              kind: "known",
              source: weighing.recovery.source,
              weighed: weighing.recovery.coordinate,
              squared: coordinateOf(squaredPieces(weighing.recovery.pieces)),
            },
    },
  };
}

/** Efforts where they are known and differ; else every horizon counts alike. */
function withEffort(
  { section, group }: RecoveryPlace,
  horizons: readonly SampledHorizon[],
): readonly SampledHorizon[] {
  const effort = searchEffort(section, group, horizons);
  if (!isUnequal(effort)) return horizons;
  return horizons.map((horizon, i) => ({ ...horizon, effort: effort.efforts[i] }));
}

function taxonCases(
  upright: Upright,
  horizon: MarkerHorizon | undefined,
  candidate: Candidate | undefined,
): TaxonCases {
  const reachesTop = candidate?.reachesTop ?? false;
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
    isCandidate: candidate?.role === "candidate",
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
    shapes: mirroredShapes(upright.shapes),
    searched: mirroredHorizons(upright.searched),
    breaks: upright.breaks
      .map((rockBreak) => ({ ...rockBreak, heightM: mirroredHeight(rockBreak.heightM) }))
      .toReversed(),
    base: { kind: "first" },
    bottomM: mirroredHeight(upright.topM),
    topM: mirroredHeight(upright.bottomM),
  };
}

function mirroredShapes({ given, constant, weighing }: Shapes): Shapes {
  const mirroredConstant = mirroredCoordinate(constant);
  return {
    given: given === constant ? mirroredConstant : mirroredCoordinate(given),
    constant: mirroredConstant,
    weighing:
      weighing.kind === "unavailable"
        ? weighing
        : {
            ...weighing,
            weighed: mirroredCoordinate(weighing.weighed),
            squared: mirroredCoordinate(weighing.squared),
          },
  };
}

function caseOf(upright: Upright): Omit<RangeCase, "reachesTop" | "reachesBottom"> {
  const { taxon, shapes, searched, settings, base, ...given } = upright;
  const under = (coordinate: Coordinate) => inCoordinate(taxon, base, coordinate);
  const constant = under(shapes.constant);
  const asGiven = shapes.given === shapes.constant ? constant : under(shapes.given);
  const sampled = sampledRange(taxon, constant.range, searched);
  const { weighing } = shapes;
  return {
    ...given,
    ...asGiven,
    taxon,
    searched,
    constant,
    weighing:
      weighing.kind === "unavailable"
        ? weighing
        : { ...weighing, weighed: under(weighing.weighed), squared: under(weighing.squared) },
    ...(sampled === undefined ? {} : { sampled }),
    searchedTopM: searched.length === 0 ? given.topM : searched[searched.length - 1].heightM,
    confidence: settings.confidence,
    identification: settings.taxa.identification,
    tail: settings.ranges.tail,
    topFinds: settings.ranges.topFinds,
  };
}

/** True where the lowest find lies in the lowest sample searched for its group. */
function isInFirst(taxon: LocalTaxon, searched: readonly SampledHorizon[]): boolean {
  const [lowest] = searched;
  if (lowest === undefined) return false;
  const sample = taxon.samples[0];
  return (sample !== undefined && lowest.samples.includes(sample)) || taxon.heightsM[0] <= lowest.heightM;
}
