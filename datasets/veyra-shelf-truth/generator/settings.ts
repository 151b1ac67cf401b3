import { csv } from "./csv.ts";
import type { Truth } from "./truth.ts";

/** The lists are made from a trait that was known beforehand, never from where the last finds lie. */
function guilds(truth: Truth): Record<string, string[]> {
  const names = [...new Set(truth.taxa.map(({ guild }) => guild))].toSorted();
  return Object.fromEntries(
    names.map((name) => [name, truth.taxa.filter(({ guild }) => guild === name).map((taxon) => taxon.name)]),
  );
}

export function settingsJson(truth: Truth): string {
  const horizons = truth.sections.map(({ section }) => [section, "iridium-1"]);
  const settings = {
    seed: 20260,
    boundary: { horizon: truth.horizon, same: [{ name: truth.horizon, horizons }] },
    timing: { sets: guilds(truth) },
  };
  return `${JSON.stringify(settings, undefined, 2)}\n`;
}

/** What the field party decided by hand before any result was seen. */
export const choicesTable = (truth: Truth): string =>
  csv("order choice old new reason by after_results".split(" "), [
    {
      order: 1,
      choice: "boundary.horizon",
      old: "",
      new: truth.horizon,
      reason: "the clay with spherules is the only layer seen in all four sections",
      by: "I. Verrold",
      after_results: "no",
    },
    {
      order: 2,
      choice: "timing.sets",
      old: "",
      new: "shallow-water, open-shelf",
      reason: "guilds assigned from shape and host rock before the ranges were drawn",
      by: "S. Quandry",
      after_results: "no",
    },
  ]);
