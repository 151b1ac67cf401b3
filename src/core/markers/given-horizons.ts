import { normalQuantile } from "../numeric/normal.ts";
import type { GivenHorizon, Section } from "../study/model.ts";
import type { MarkerHorizon } from "./result.ts";

/** Half of the central 68.27 % of a uniform law, in half-widths. */
const uniformSigma = 0.6827;

/**
 * The horizons that a person placed, with intervals: `normal`, the stated standard deviations times the normal
 * quantile of the level on each side; `uniform`, the whole half-widths.
 */
export function givenHorizons(section: Section, level: number): readonly MarkerHorizon[] {
  return section.horizons.map((horizon) => {
    const z = horizon.shape === "normal" ? normalQuantile((1 + level) / 2) : 1;
    return {
      section: section.name,
      name: horizon.name,
      horizon: horizon.name,
      kind: horizon.kind,
      refersTo: "level",
      source: "given",
      evidence: evidenceOf(horizon),
      positionM: horizon.heightM,
      lowM: horizon.heightM - z * horizon.belowM,
      highM: horizon.heightM + z * horizon.aboveM,
      level: horizon.shape === "normal" ? level : 1,
      shape: horizon.shape,
      sigmaM: ((horizon.belowM + horizon.aboveM) / 2) * (horizon.shape === "normal" ? 1 : uniformSigma),
      outcome: "closed",
      note: horizon.notes,
    };
  });
}

function evidenceOf({ kind, zone, datingMethod, laboratory }: GivenHorizon): string {
  return [`given ${kind} horizon`, zone, datingMethod, laboratory].filter((part) => part).join(", ");
}
