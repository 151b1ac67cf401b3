import { normalQuantile } from "../numeric/normal.ts";
import { givenToHeight } from "../study/heights.ts";
import type { Section } from "../study/model.ts";
import type { Settings } from "../study/settings.ts";
import { toMetres } from "../study/units.ts";
import type { MarkerHorizon } from "./result.ts";

type Pick = Settings["boundary"]["picks"][number];

/**
 * Horizons that a person placed by hand (`boundary.picks`), each beside the automatic one of its name, whose kind it takes;
 * of two picks of one name the last stands. The interval is the stated standard deviation times the normal quantile of the
 * level on each side; without one the pick is a sharp level.
 *
 * @param automatic the given and found horizons of the same section.
 */
export function pickedHorizons(
  section: Section,
  picks: readonly Pick[],
  { automatic, level }: { readonly automatic: readonly MarkerHorizon[]; readonly level: number },
): readonly MarkerHorizon[] {
  const here = new Map(picks.filter((pick) => pick.section === section.name).map((p) => [p.horizon, p]));
  return [...here.values()].map((pick) => picked(pick, section, { automatic, level }));
}

function picked(
  { horizon, position, below, above }: Pick,
  section: Section,
  { automatic, level }: { readonly automatic: readonly MarkerHorizon[]; readonly level: number },
): MarkerHorizon {
  const beside = automatic.find(({ name, horizon: answersTo }) => name === horizon || answersTo === horizon);
  const positionM = givenToHeight(position, section);
  const z = normalQuantile((1 + level) / 2);
  const [belowM, aboveM] = [below, above].map((sd) => toMetres(sd, section.unit));
  return {
    section: section.name,
    name: horizon,
    horizon,
    kind: beside?.kind ?? "other",
    refersTo: "level",
    source: "manual",
    evidence: beside === undefined ? "placed by hand" : `placed by hand beside the ${beside.source} one`,
    positionM,
    lowM: positionM - z * belowM,
    highM: positionM + z * aboveM,
    level,
    shape: "normal",
    sigmaM: (belowM + aboveM) / 2,
    outcome: "closed",
    note: "",
  };
}
