import type { LocalTaxon } from "../study/finds-result.ts";
import type { Section } from "../study/model.ts";
import type { Settings } from "../study/settings.ts";
import {
  type Coordinate,
  type RecoveryPiece,
  recoveryCoordinate,
  rockWithoutRecovery,
} from "./coordinate.ts";
import { interiorFinds } from "./interior-finds.ts";
import { effortPieces } from "./recovery-effort.ts";
import { faciesPieces, faciesRecovery, faciesStretches } from "./recovery-facies.ts";
import { coordinateOf, wholeRecovery } from "./recovery-pieces.ts";
import { tablePieces } from "./recovery-table.ts";
import { recoveryTrend, trendPieces } from "./recovery-trend.ts";
import { sampledHorizons } from "./sampled-horizons.ts";
import { searchEffort } from "./search-effort.ts";

export type RecoverySource = Settings["ranges"]["recovery"];

/** A group in a section: recovery is a property of both. */
export interface RecoveryPlace {
  readonly section: Section;
  readonly group: string;
  /** The group's taxa in the section, of which some sources make an estimate. */
  readonly taxa: readonly LocalTaxon[];
}

/** Relative recovery r(h) of a group over a section, mean 1 over searchable rock, with its coordinate. */
export interface Recovery {
  readonly source: RecoverySource;
  /** Empty for `uniform`. */
  readonly pieces: readonly RecoveryPiece[];
  readonly coordinate: Coordinate;
}

export type RecoveryResult =
  | { readonly kind: "known"; readonly recovery: Recovery }
  | { readonly kind: "unavailable"; readonly reason: string };

/** Sources in the order in which they are preferred where the settings leave it open. */
const declaredSources = ["table", "effort", "facies"] as const;

/** Recovery from one source, or why it cannot be had from it. */
export function recoveryOf(place: RecoveryPlace, source: RecoverySource): RecoveryResult {
  const { section } = place;
  if (source === "uniform")
    return { kind: "known", recovery: { source, pieces: [], coordinate: recoveryCoordinate(section) } };
  const found = sourcePieces[source](place);
  if (typeof found === "string") return { kind: "unavailable", reason: found };
  const { bottomM, topM } = section;
  const pieces = wholeRecovery(found, { gaps: rockWithoutRecovery(section), bottomM, topM });
  if (pieces === undefined) return { kind: "unavailable", reason: "recovery is 0 throughout" };
  return { kind: "known", recovery: { source, pieces, coordinate: coordinateOf(pieces) } };
}

/**
 * The coordinate that a group's ranges are compared in: recovery from the source that the settings name, constant
 * outside rock that could not be searched where that source says nothing here.
 */
export function coordinateFor(place: RecoveryPlace, source: RecoverySource): Coordinate {
  const result = recoveryOf(place, source);
  return result.kind === "known" ? result.recovery.coordinate : recoveryCoordinate(place.section);
}

/** What method `recovery` weighs by: the source that the settings name, else the first that there is. */
export function weighingRecovery(place: RecoveryPlace, source: RecoverySource): RecoveryResult {
  if (source !== "uniform") return recoveryOf(place, source);
  const reasons: string[] = [];
  for (const declared of declaredSources) {
    const result = recoveryOf(place, declared);
    if (result.kind === "known") return result;
    reasons.push(`${declared}: ${result.reason}`);
  }
  return { kind: "unavailable", reason: reasons.join(", ") };
}

type Pieces = readonly RecoveryPiece[];

/** Pieces of recovery from each source, or the reason why there are none. */
const sourcePieces: Readonly<
  Record<Exclude<RecoverySource, "uniform">, (place: RecoveryPlace) => Pieces | string>
> = {
  table: ({ section, group }) =>
    tablePieces(section.recovery.filter((point) => point.group === group)) ?? "no rows in recovery.csv",
  effort: ({ section, group }) => {
    const horizons = sampledHorizons(section, group, recoveryCoordinate(section));
    const effort = searchEffort(section, group, horizons);
    if (effort.kind === "unknown") return effort.reason;
    return (
      effortPieces(horizons, effort.efforts, rockWithoutRecovery(section)) ?? "fewer than two sampled levels"
    );
  },
  facies: ({ section, taxa }) => {
    const stretches = faciesStretches(section.beds, [section.bottomM, section.topM]);
    const interior = interiorOf(section, taxa);
    if (section.beds.length === 0 || stretches.length === 0) return "no beds";
    if (interior.length === 0) return "no finds between first and last ones";
    return faciesPieces(stretches, faciesRecovery(interior, stretches));
  },
  trend: ({ section, taxa }) => {
    const beta = recoveryTrend(interiorOf(section, taxa), section.topM - section.bottomM);
    if (beta === undefined) return "too few finds between first and last ones";
    return trendPieces(beta, [section.bottomM, section.topM]);
  },
};

function interiorOf(section: Section, taxa: readonly LocalTaxon[]) {
  const gaps = rockWithoutRecovery(section);
  return taxa.map((taxon) => interiorFinds(taxon, gaps)).filter((finds) => finds !== undefined);
}
