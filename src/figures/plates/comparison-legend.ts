import type { HeightScale } from "../height-scale.ts";
import type { LegendEntry } from "../legend.tsx";
import type { RangeSign } from "../legend-range-swatch.tsx";
import { COLOURS } from "../theme.ts";
import type { ComparedMethod, ComparedTaxon } from "./compared-ends.ts";
import { rangeLegend } from "./range-legend.ts";

const colour = COLOURS.soft;

const STANCES: Readonly<Record<ComparedMethod["stance"], readonly [RangeSign["kind"], string]>> = {
  "holds-under-decline": ["point-proof", "estimate, method holds where finds thin out"],
  "fits-recovery": ["point-fitted", "estimate, method fits or weighs recovery"],
  "even-recovery": ["point-even", "estimate, method takes recovery as even"],
};

/** What the signs of a comparison mean, each only where it is used. */
export function comparisonLegend(compared: readonly ComparedTaxon[], y: HeightScale): readonly LegendEntry[] {
  const methods = compared.flatMap((each) => each.methods);
  const ends = methods.flatMap(({ top, base }) => [top, base].flatMap((end) => end ?? []));
  const stances = (["holds-under-decline", "fits-recovery", "even-recovery"] as const).filter((stance) =>
    methods.some((one) => one.stance === stance && (one.top?.pointM ?? one.base?.pointM) !== undefined),
  );
  const asTaxa = compared.flatMap(({ taxon, methods: own }) =>
    own.map(({ top, base }) => ({ ...taxon, top, base, taper: undefined, baseTaper: undefined })),
  );
  return [
    ...stances.map((stance) => ({
      sign: { kind: STANCES[stance][0], colour },
      label: STANCES[stance][1],
    })),
    ...(ends.some(({ boundM }) => boundM !== undefined)
      ? [{ sign: { kind: "bound" as const, colour }, label: "bound of the interval" }]
      : []),
    ...(methods.some(({ isTooShort }) => isTooShort)
      ? [
          {
            sign: { kind: "too-short" as const, colour },
            label: "too short: recovery declines, which the method does not allow for",
          },
        ]
      : []),
    ...rangeLegend([...compared.map(({ taxon }) => taxon), ...asTaxa], y),
  ];
}
