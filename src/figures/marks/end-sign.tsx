import type { ReactElement } from "react";
import type { Outcome } from "../../core/basis.ts";
import { extentOf, type HeightScale, isInFrame } from "../height-scale.ts";
import { round } from "../numbers.ts";
import { COLOURS } from "../theme.ts";
import { markPath } from "./mark-path.ts";

/** What is said of an end that has no plain interval: it is drawn, never left blank. */
export type EndSignKind = "leaves-section" | "open-end" | "in-hiatus" | "no-interval";

const SIGNS: Readonly<Record<Outcome, EndSignKind | undefined>> = {
  closed: undefined,
  "leaves-section": "leaves-section",
  open: "open-end",
  "in-hiatus": "in-hiatus",
  empty: "no-interval",
  undefined: "no-interval",
  "not-applicable": "no-interval",
};

export function endSignOf(outcome: Outcome): EndSignKind | undefined {
  return SIGNS[outcome];
}

interface EndSignProps {
  readonly x: number;
  readonly width: number;
  readonly y: HeightScale;
  readonly end: "top" | "base";
  readonly outcome: Outcome;
  /** The outermost find. */
  readonly findM: number;
  readonly boundM?: number;
  readonly colour: string;
}

/** Inside the frame at its top, since the signs of roles stand above it; beneath it at its base, where finds crowd. */
const EDGE = 2.6;
const BELOW_FRAME = 4.2;
const CHEVRON_STEP = 2.4;
const BEYOND_FIND = 5;

/** The sign of one end; nothing for a plain interval or an end outside the frame. */
export function EndSign(props: EndSignProps): ReactElement | null {
  const { x, y, end, outcome, findM, boundM, width, colour } = props;
  const kind = endSignOf(outcome);
  if (kind === undefined || !isInFrame(y, findM)) return null;
  const outward = end === "top" ? -1 : 1;
  if (kind === "in-hiatus") {
    if (boundM === undefined || !isInFrame(y, boundM)) return null;
    return <path d={hiatusPath(x, y(boundM) - outward * 1.9, width)} stroke={colour} strokeWidth={0.9} />;
  }
  if (kind === "no-interval") {
    const d = markPath("square", x, y(findM) + outward * BEYOND_FIND, 1.6);
    return <path d={d} fill={COLOURS.paper} stroke={colour} strokeWidth={0.6} />;
  }
  const edge = end === "top" ? y(extentOf(y)[1]) + EDGE : y(extentOf(y)[0]) + BELOW_FRAME;
  return (
    <path
      d={chevrons(x, edge, outward, kind === "open-end" ? 2 : 1)}
      fill="none"
      stroke={colour}
      strokeWidth={0.7}
    />
  );
}

/** A second tick inside the first: the bound lies in rock that is missing. */
function hiatusPath(x: number, y: number, width: number): string {
  return `M${round(x - width / 2)} ${round(y)}h${round(width)}`;
}

/** Points outward: `count` open angles, the first at y. */
export function chevrons(x: number, y: number, outward: 1 | -1, count: number): string {
  return Array.from({ length: count }, (_, i) => {
    const tip = y + outward * 0.9 - outward * i * CHEVRON_STEP;
    return `M${round(x - 1.9)} ${round(tip - outward * 1.8)}L${round(x)} ${round(tip)}L${round(x + 1.9)} ${round(tip - outward * 1.8)}`;
  }).join("");
}
