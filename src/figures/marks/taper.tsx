import type { ReactElement } from "react";
import { extentOf, type HeightScale, isInFrame } from "../height-scale.ts";
import { round } from "../numbers.ts";
import { COLOURS } from "../theme.ts";
import { boxPath, markPath } from "./mark-path.ts";

/** How sure it is that the taxon's end lies between its last (first) find and this height. */
export interface TaperStep {
  readonly heightM: number;
  /** 0 at the find itself, toward 1 further out. */
  readonly confidence: number;
}

interface TaperProps {
  /** Middle of the bar. */
  readonly x: number;
  readonly width: number;
  readonly y: HeightScale;
  readonly colour: string;
  readonly firstM: number;
  readonly lastM: number;
  /** Outward from the last find, and from the first. */
  readonly above?: readonly TaperStep[];
  readonly below?: readonly TaperStep[];
  /** Where the interval at the study's confidence ends. */
  readonly topEndM?: number;
  readonly baseEndM?: number;
  /** The highest find is in the highest sample searched: nothing says where the range ends. */
  readonly reachesTop?: boolean;
  readonly occurrencesM: readonly number[];
  /** Finds not counted: doubtful, reworked, set aside. Drawn open. */
  readonly openOccurrencesM?: readonly number[];
  /** How the bar is drawn; default filled. The others stand for ranges that are not in question. */
  readonly bar?: RangeBar;
}

export type RangeBar = "filled" | "outlined" | "dashed" | "dotted";

const OUTLINES: Readonly<Record<Exclude<RangeBar, "filled">, string | undefined>> = {
  outlined: undefined,
  dashed: "3 1.6",
  dotted: "0.6 1.4",
};

/** How a bar of ranges is painted. */
export function barPaint(bar: RangeBar, colour: string) {
  if (bar === "filled") return { fill: colour, fillOpacity: 0.3 };
  return { fill: "none", stroke: colour, strokeWidth: 0.5, strokeDasharray: OUTLINES[bar] };
}

const HALF_OVERHANG = 0.6;

/**
 * A true range: the bar of finds, narrowing beyond the last (first) find in proportion to 1 minus the confidence that the end has been
 * passed, with a tick where the interval ends. One path for the bar, one for the finds.
 */
export function Taper(props: TaperProps): ReactElement {
  const { x, width, y, colour, occurrencesM, openOccurrencesM = [], bar = "filled" } = props;
  const finds = occurrencesM.filter((heightM) => isInFrame(y, heightM));
  const open = openOccurrencesM.filter((heightM) => isInFrame(y, heightM));
  return (
    <g>
      <path d={taperPath(props)} {...barPaint(bar, colour)} />
      <IntervalEnds {...props} />
      {finds.length > 0 && (
        <path
          d={finds.map((heightM) => tick(x, y(heightM), width)).join("")}
          stroke={colour}
          strokeWidth={0.75}
        />
      )}
      {open.length > 0 && (
        <path
          d={open.map((heightM) => boxPath(x - width / 2, y(heightM) - 0.8, width, 1.6)).join("")}
          fill={COLOURS.paper}
          stroke={colour}
          strokeWidth={0.4}
        />
      )}
      {props.reachesTop === true && (
        <path d={markPath("triangle", x, y(extentOf(y)[1]) + 3, 2.2)} fill={colour} />
      )}
    </g>
  );
}

function tick(x: number, y: number, width: number): string {
  return `M${round(x - width / 2)} ${round(y)}h${round(width)}`;
}

function IntervalEnds({ x, width, y, colour, topEndM, baseEndM }: TaperProps): ReactElement | null {
  const ends = [topEndM, baseEndM].filter((heightM) => heightM !== undefined && isInFrame(y, heightM));
  if (ends.length === 0) return null;
  const path = ends.map((heightM) => tick(x, y(heightM ?? 0), width + 2 * HALF_OVERHANG)).join("");
  return <path d={path} stroke={colour} strokeWidth={0.9} />;
}

interface Edge {
  readonly heightM: number;
  readonly half: number;
}

/** The outline of bar and tapers, cut off at the frame. */
export function taperPath({ x, width, y, firstM, lastM, above = [], below = [] }: TaperProps): string {
  const half = width / 2;
  const edges: readonly Edge[] = [
    ...below.map(({ heightM, confidence }) => ({ heightM, half: half * (1 - confidence) })).toReversed(),
    { heightM: firstM, half },
    { heightM: lastM, half },
    ...above.map(({ heightM, confidence }) => ({ heightM, half: half * (1 - confidence) })),
  ];
  const shown = clippedEdges(bentAt(y.domain(), edges), extentOf(y));
  if (shown.length < 2) return "";
  const right = shown.map((edge) => `${round(x + edge.half)} ${round(y(edge.heightM))}`);
  const left = shown.toReversed().map((edge) => `${round(x - edge.half)} ${round(y(edge.heightM))}`);
  return `M${[...right, ...left].join("L")}z`;
}

/** Where a lens begins and ends the scale bends, and so must a slanting outline. */
function bentAt(knots: readonly number[], edges: readonly Edge[]): readonly Edge[] {
  const isNew = (heightM: number) => edges.every((edge) => edge.heightM !== heightM);
  const bends = knots
    .slice(1, -1)
    .filter(isNew)
    .flatMap((heightM) => edgeAt(edges, heightM));
  return bends.length === 0 ? edges : [...edges, ...bends].toSorted((a, b) => a.heightM - b.heightM);
}

function clippedEdges(edges: readonly Edge[], [bottomM, topM]: readonly [number, number]): readonly Edge[] {
  const cuts = [bottomM, topM].flatMap((heightM) => edgeAt(edges, heightM));
  const inside = edges.filter((edge) => edge.heightM > bottomM && edge.heightM < topM);
  const [low, high] = [
    cuts.filter((cut) => cut.heightM === bottomM),
    cuts.filter((cut) => cut.heightM === topM),
  ];
  return [...low, ...inside, ...high];
}

function edgeAt(edges: readonly Edge[], heightM: number): readonly Edge[] {
  for (let i = 1; i < edges.length; i++) {
    const [a, b] = [edges[i - 1], edges[i]];
    if (a === undefined || b === undefined || heightM < a.heightM || heightM > b.heightM) continue;
    const part = b.heightM === a.heightM ? 0 : (heightM - a.heightM) / (b.heightM - a.heightM);
    return [{ heightM, half: a.half + part * (b.half - a.half) }];
  }
  return [];
}
