import type { LocalTaxon } from "../study/finds-result.ts";
import { type Base, type WorkingRange, workingRange } from "./base.ts";
import type { Coordinate } from "./coordinate.ts";

/** A taxon's range under one shape of recovery. */
export interface InCoordinate {
  readonly coordinate: Coordinate;
  readonly range: WorkingRange;
  /** Finds in effective metres, from below upward; empty where a range was published without its finds. */
  readonly levels: readonly number[];
  /** Finds inside rock of recovery 0: they contradict it, and it gives no bound. */
  readonly contradicted: number;
}

export function inCoordinate(taxon: LocalTaxon, base: Base, coordinate: Coordinate): InCoordinate {
  const { heightsM, publishedHorizons } = taxon;
  return {
    coordinate,
    range: workingRange(taxon, base, coordinate),
    levels: publishedHorizons === undefined ? heightsM.map(coordinate.toEffective) : [],
    contradicted: heightsM.filter((heightM) =>
      coordinate.gaps.some((gap) => heightM > gap.baseM && heightM < gap.topM),
    ).length,
  };
}
