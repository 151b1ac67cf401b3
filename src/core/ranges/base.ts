import type { Markers } from "../markers/result.ts";
import type { LocalTaxon } from "../study/finds-result.ts";
import type { Section } from "../study/model.ts";
import { horizonCount } from "../study/roles.ts";
import type { Settings } from "../study/settings.ts";
import type { Coordinate } from "./coordinate.ts";
import type { EffectiveRange } from "./pivot.ts";

/** Working base of the ranges of one section: each taxon's first find, or one known level. */
export type Base = { readonly kind: "first" } | { readonly kind: "level"; readonly heightM: number };

export interface SectionBase {
  readonly base: Base;
  /** False where the horizon that the settings name is not placed in the section: the first find stands in. */
  readonly isPlaced: boolean;
}

/** One taxon's range as its end is estimated from it. */
export interface WorkingRange extends EffectiveRange {
  readonly mode: "first" | "base";
  readonly baseM: number;
  readonly lastM: number;
  readonly horizons: number;
}

export function sectionBase(section: Section, settings: Settings, markers: Markers): SectionBase {
  const name = settings.ranges.base;
  if (name === "first") return { base: { kind: "first" }, isPlaced: true };
  if (name === "section-bottom") return { base: { kind: "level", heightM: section.bottomM }, isPlaced: true };
  const main = markers.main.bySection.get(section.name);
  const horizon =
    main?.horizon === name
      ? main
      : markers.horizons.find((h) => h.section === section.name && (h.horizon === name || h.name === name));
  return horizon === undefined
    ? { base: { kind: "first" }, isPlaced: false }
    : { base: { kind: "level", heightM: horizon.positionM }, isPlaced: true };
}

/**
 * The range from its working base: exponent n - 1 from the first find, n from a known level. A taxon found below that
 * level did not begin there: its own first find is its base.
 */
export function workingRange(taxon: LocalTaxon, base: Base, coordinate: Coordinate): WorkingRange {
  const horizons = horizonCount(taxon);
  const firstM = taxon.heightsM[0];
  const lastM = taxon.heightsM[taxon.heightsM.length - 1];
  const isKnown = base.kind === "level" && base.heightM <= firstM;
  const baseM = isKnown ? base.heightM : firstM;
  return {
    mode: isKnown ? "base" : "first",
    baseM,
    lastM,
    horizons,
    base: coordinate.toEffective(baseM),
    last: coordinate.toEffective(lastM),
    exponent: isKnown ? horizons : horizons - 1,
  };
}
