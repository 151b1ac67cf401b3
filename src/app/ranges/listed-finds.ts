import type { Analysis } from "../../core/analysis-result.ts";
import type { FindReason } from "../../core/study/finds-result.ts";
import type { HeldAside } from "./set-aside.ts";

/** A find of the taxon in focus, whether it counts or not. */
export interface ListedFind {
  /** `file:row`. */
  readonly row: string;
  readonly heightM: number;
  readonly sample?: string;
  readonly isUsed: boolean;
  /** Set aside by a person, and so to be taken back. */
  readonly isHeld: boolean;
  /** Why it does not count; blank where it does. */
  readonly words: string;
}

const REASONS: Readonly<Record<FindReason, string>> = {
  used: "",
  "same-horizon": "one horizon with another find",
  "zero-count": "looked for and not found",
  qualifier: "qualified name",
  "genus-doubtful": "genus in doubt",
  affinity: "affinity alone",
  "not-to-species": "not named to species",
  reworked: "reworked",
  "reworking-suspected": "reworking suspected",
  doubtful: "doubtful",
  "fault-repeat": "in rock repeated by a fault",
  "fault-repeat-mapped": "mapped out of repeated rock",
  "no-recovery": "in rock without recovery",
  "below-reworking-ceiling": "above the horizon, within reach of mixing",
};

interface Asked {
  readonly section: string;
  readonly taxon: string;
  readonly held: readonly HeldAside[];
}

/** All finds of a taxon from above downward, those set aside by hand among them. */
export function listedFinds({ finds }: Analysis, { section, taxon, held }: Asked): readonly ListedFind[] {
  const own = finds
    .filter((find) => find.section === section && find.accepted === taxon && find.reason !== "zero-count")
    .map(
      ({ origin, heightM, sample, used, reason }): ListedFind => ({
        row: `${origin.file}:${origin.row}`,
        heightM,
        ...(sample === undefined ? {} : { sample }),
        isUsed: used !== "no",
        isHeld: false,
        words: used === "no" ? REASONS[reason] : "",
      }),
    );
  const rows = new Set(held.filter((find) => find.taxon === taxon).map(({ row }) => row));
  const aside = held
    .filter((find) => find.taxon === taxon)
    .map(
      ({ row, heightM, sample, reason }): ListedFind => ({
        row,
        heightM,
        ...(sample === undefined ? {} : { sample }),
        isUsed: false,
        isHeld: true,
        words: reason,
      }),
    );
  return [...own.filter(({ row }) => !rows.has(row)), ...aside].toSorted((a, b) => b.heightM - a.heightM);
}
