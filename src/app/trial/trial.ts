import type { Analysis } from "../../core/analysis-result.ts";
import type { SettingChange } from "../../core/study/changed-settings.ts";
import { givenToHeight, heightToGiven } from "../../core/study/heights.ts";
import type { Section } from "../../core/study/model.ts";
import type { Settings } from "../../core/study/settings.ts";
import { fromMetres } from "../../core/study/units.ts";

/** What a person tries without having chosen it: settings, and one level asked about. */
export interface Trial {
  /** Each setting once, in the order first tried. */
  readonly changes: readonly SettingChange[];
  readonly level?: AskedLevel;
  /** Kept, but not worked out as the study's own yet. */
  readonly isKept?: boolean;
}

export interface AskedLevel {
  readonly section: string;
  readonly heightM: number;
}

export const NO_TRIAL: Trial = { changes: [] };

const isSame = (a: unknown, b: unknown): boolean => JSON.stringify(a) === JSON.stringify(b);

/** One setting more tried; one that is as it was in the study is not. */
export function withTried(trial: Trial, change: SettingChange, settings: Settings): Trial {
  const others = trial.changes.filter(({ path }) => !isSame(path, change.path));
  const isAsItWas = isSame(settingAt(settings, change.path), change.value);
  const place = trial.changes.findIndex(({ path }) => isSame(path, change.path));
  if (isAsItWas) return { ...trial, changes: others };
  return { ...trial, changes: place < 0 ? [...others, change] : trial.changes.with(place, change) };
}

export function settingAt(settings: unknown, path: readonly string[]): unknown {
  let value = settings;
  for (const name of path) {
    if (typeof value !== "object" || value === null) return undefined;
    value = Reflect.get(value, name);
  }
  return value;
}

export const PICKS: readonly string[] = ["boundary", "picks"];

interface Moved {
  readonly horizon: string;
  readonly heightM: number;
  /** The picks that are tried already; default those of the study. */
  readonly picks?: unknown;
}

/** A horizon of a section moved to a height by hand: as sure of it as before, in the section's own unit. */
export function pickChange(
  { markers, study }: Analysis,
  section: Section,
  { horizon, heightM, picks = study.settings.boundary.picks }: Moved,
): SettingChange {
  const here = markers.horizons.find((h) => h.section === section.name && h.horizon === horizon);
  const spread = rounded(fromMetres(here?.sigmaM ?? 0, section.unit));
  const position = rounded(heightToGiven(heightM, section));
  const pick = { section: section.name, horizon, position, below: spread, above: spread };
  const isOther = (one: unknown) =>
    settingAt(one, ["section"]) !== section.name || settingAt(one, ["horizon"]) !== horizon;
  return { path: PICKS, value: [...(Array.isArray(picks) ? picks.filter(isOther) : []), pick] };
}

/** The height that a position as it is written stands for. */
export const roundedHeight = (heightM: number, section: Section): number =>
  givenToHeight(rounded(heightToGiven(heightM, section)), section);

/** A hand is not surer than a ten thousandth of the unit. */
const rounded = (value: number): number => Number(value.toFixed(4));
