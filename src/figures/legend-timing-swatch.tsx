import type { ReactElement } from "react";
import { boxPath, markPath } from "./marks/mark-path.ts";
import { COLOURS } from "./theme.ts";

/** Signs of what is inferred about an assemblage. */
export interface TimingSign {
  readonly kind:
    | "posterior"
    | "observed-lasts"
    | "expected-lasts"
    | "band-each"
    | "band-all"
    | "influential"
    | "was";
}

const [WIDTH, HEIGHT] = [16, 8];
const across = `M0 ${HEIGHT / 2}h${WIDTH}`;

export const POSTERIOR_PAINT = {
  fill: COLOURS.ink,
  fillOpacity: 0.16,
  stroke: COLOURS.ink,
  strokeWidth: 0.8,
} as const;
export const OBSERVED_PAINT = { fill: "none", stroke: COLOURS.ink, strokeWidth: 1.1 } as const;
export const EXPECTED_PAINT = { fill: "none", stroke: COLOURS.blue, strokeWidth: 0.9 } as const;
export const BAND_EACH_PAINT = { fill: COLOURS.blue, fillOpacity: 0.3, stroke: "none" } as const;
export const BAND_ALL_PAINT = { fill: COLOURS.blue, fillOpacity: 0.13, stroke: "none" } as const;
export const INFLUENTIAL_PAINT = { fill: "none", stroke: COLOURS.rust, strokeWidth: 1 } as const;
export const WAS_PAINT = {
  fill: "none",
  stroke: COLOURS.soft,
  strokeWidth: 0.6,
  strokeDasharray: "3 2",
} as const;

const box = boxPath(0, 0, WIDTH, HEIGHT);

export function timingSwatch({ kind }: TimingSign): ReactElement {
  switch (kind) {
    case "posterior":
      return <path d={box} {...POSTERIOR_PAINT} />;
    case "observed-lasts":
      return <path d={`M0 ${HEIGHT - 1}h6v-3h5v-3h5`} {...OBSERVED_PAINT} />;
    case "expected-lasts":
      return <path d={across} {...EXPECTED_PAINT} />;
    case "band-each":
      return <path d={box} {...BAND_EACH_PAINT} />;
    case "band-all":
      return <path d={box} {...BAND_ALL_PAINT} />;
    case "influential":
      return <path d={markPath("circle", WIDTH / 2, HEIGHT / 2, 3.2)} {...INFLUENTIAL_PAINT} />;
    case "was":
      return <path d={across} {...WAS_PAINT} />;
    default:
      return kind satisfies never;
  }
}
