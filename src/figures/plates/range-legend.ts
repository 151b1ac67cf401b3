import type { Role } from "../../core/study/finds-result.ts";
import { type HeightScale, isInFrame } from "../height-scale.ts";
import type { LegendEntry } from "../legend.tsx";
import type { LegendSign } from "../legend-swatch.tsx";
import { type EndSignKind, endSignOf } from "../marks/end-sign.tsx";
import { COLOURS } from "../theme.ts";
import type { ChartedTaxon } from "./charted-taxa.ts";
import type { OpenKind } from "./drawn-taxa.ts";
import { BARS, isInQuestion } from "./taxon-range.tsx";

const colour = COLOURS.soft;

const END_WORDS: Readonly<Record<EndSignKind, string>> = {
  "leaves-section": "interval goes beyond the section",
  "open-end": "nothing bounds this end",
  "in-hiatus": "interval ends in missing rock",
  "no-interval": "no interval by this method",
};

const END_KINDS = ["leaves-section", "open-end", "in-hiatus", "no-interval"] as const;

const OPEN_WORDS: Readonly<Record<OpenKind, readonly [LegendSign, string]>> = {
  "set-aside": [{ kind: "open-find", colour }, "find set aside"],
  reworked: [{ kind: "reworked", colour }, "reworked"],
  doubtful: [{ kind: "doubtful", colour }, "doubtful"],
};

const entry = (sign: LegendSign, label: string, isUsed: boolean): readonly LegendEntry[] =>
  isUsed ? [{ sign, label }] : [];

/** What the signs of these taxa mean, each only where it is used. */
export function rangeLegend(taxa: readonly ChartedTaxon[], y: HeightScale): readonly LegendEntry[] {
  const has = (test: (taxon: ChartedTaxon) => boolean) => taxa.some(test);
  const bar = (role: Role, label: string) =>
    entry(
      { kind: "bar", colour, bar: BARS[role] },
      label,
      has((taxon) => taxon.role === role),
    );
  const isTapered = has((taxon) => isInQuestion(taxon) && (taxon.taper ?? taxon.baseTaper) !== undefined);
  return [
    ...entry(
      { kind: "find", colour },
      "find",
      has(({ findsM }) => findsM.length > 0),
    ),
    ...(["set-aside", "reworked", "doubtful"] as const).flatMap((kind) =>
      entry(
        ...OPEN_WORDS[kind],
        has(({ open }) => open.some((find) => find.kind === kind)),
      ),
    ),
    ...entry(
      { kind: "inclusive", colour },
      "to the highest find under inclusive names",
      has(({ inclusiveM }) => inclusiveM !== undefined),
    ),
    ...entry({ kind: "taper", colour }, "taper: chance that the taxon was still here", isTapered),
    ...entry(
      { kind: "interval-end", colour },
      "end of the interval",
      has((taxon) => boundsOf(taxon).some((heightM) => isInFrame(y, heightM))),
    ),
    ...END_KINDS.flatMap((kind) =>
      entry(
        { kind, colour },
        END_WORDS[kind],
        has((taxon) => signsOf(taxon).includes(kind)),
      ),
    ),
    ...entry(
      { kind: "leaning", colour },
      "how far the upper end leans on the shape of recovery: nearest to furthest bound",
      has((taxon) => isInQuestion(taxon) && taxon.leaning !== undefined),
    ),
    ...entry(
      { kind: "survivor", colour },
      "survivor",
      has(({ role }) => role === "survivor"),
    ),
    ...entry(
      { kind: "cut-off", colour },
      "found in the highest sample searched",
      has(({ role, reachesTop }) => role !== "survivor" && reachesTop),
    ),
    ...bar("aftermath", "first found after the horizon"),
    ...bar("late-start", "starts late"),
    ...bar("too-few", "too few horizons"),
  ];
}

function boundsOf(taxon: ChartedTaxon): readonly number[] {
  if (!isInQuestion(taxon)) return [];
  const { top, base, taper } = taxon;
  if (top === undefined && base === undefined) return taper?.endM === undefined ? [] : [taper.endM];
  return [top, base].flatMap((end) =>
    end?.boundM === undefined || end.outcome === "leaves-section" ? [] : [end.boundM],
  );
}

function signsOf(taxon: ChartedTaxon): readonly (EndSignKind | undefined)[] {
  if (!isInQuestion(taxon)) return [];
  return [taxon.top, taxon.base].flatMap((end) => (end === undefined ? [] : [endSignOf(end.outcome)]));
}
