import { markPath } from "../marks/mark-path.ts";

/**
 * One tile of each rock pattern, drawn for Lastbed from the descriptions of FGDC-STD-013-2006, section 37 (U.S. Geological Survey
 * Techniques and Methods 11-A2). Lengths are points. `strokes` are drawn thin, `solids` filled with ink.
 */
export interface PatternTile {
  /** Number in the standard; absent where the sign is our own. */
  readonly fgdc?: number;
  readonly name: string;
  readonly width: number;
  readonly height: number;
  readonly strokes?: string;
  readonly solids?: string;
  readonly ground?: "ink";
}

const dot = (x: number, y: number, r = 0.36) => markPath("circle", x, y, r);
const dots = (places: readonly (readonly [number, number])[], r?: number) =>
  places.map(([x, y]) => dot(x, y, r)).join("");

const BRICKS = "M0 .25h11M0 3.45h11M0 6.05h11M2.8 .25v3.2M8.3 3.45v2.6M2.8 6.05v3.15M0 9.2h11M8.3 9.2v2.25";
const BRICK_SIZE = { width: 11, height: 11.2 };
const DASH_ROWS = "M.6 1.2h4M5.4 3.6h4";
const STAGGERED = { width: 9.6, height: 4.8 };
const SCATTER: readonly (readonly [number, number])[] = [
  [1.1, 1.3],
  [4.3, 0.7],
  [7.4, 2.1],
  [2.6, 3.4],
  [5.6, 3.9],
  [8.5, 4.8],
  [0.9, 5.6],
  [3.9, 6.3],
  [6.8, 6.7],
  [2.1, 8.2],
  [5.2, 8.4],
  [8.2, 8.3],
];

export const PATTERN_TILES = {
  conglomerate: {
    fgdc: 601,
    name: "conglomerate",
    width: 13,
    height: 11,
    strokes:
      "M1.2 3.1a1.7 1.6 0 1 0 3.4 0a1.7 1.6 0 1 0 -3.4 0M7.1 6.6a2 1.8 0 1 0 4 0a2 1.8 0 1 0 -4 0M2.5 8.6a1.1 1 0 1 0 2.2 0a1.1 1 0 1 0 -2.2 0M8.3 1.9a1 .9 0 1 0 2 0a1 .9 0 1 0 -2 0",
    solids: dots([
      [6.1, 1.2],
      [5.9, 4.2],
      [11.9, 3.4],
      [0.9, 6.2],
      [5.7, 9.9],
      [12.1, 9.6],
      [9.2, 10.1],
    ]),
  },
  breccia: {
    fgdc: 605,
    name: "breccia",
    width: 13,
    height: 11,
    strokes:
      "M1 4.2L2.6 1.2L4.9 2.9L3.6 4.7zM7 7.9L8.2 4.9L11.4 5.7L10.6 8.6zM2.2 9.6L3.4 7.4L5.2 9.1zM8.3 2.7L9.6 1L10.9 2.4z",
    solids: dots([
      [6.3, 1.1],
      [6.1, 4.1],
      [12.2, 3.5],
      [0.9, 6.4],
      [5.9, 6.6],
      [7.2, 10.1],
      [12.1, 9.9],
    ]),
  },
  sandstone: { fgdc: 607, name: "sandstone", width: 9.6, height: 9.4, solids: dots(SCATTER) },
  "bedded-sandstone": {
    fgdc: 608,
    name: "bedded sandstone",
    width: 9.6,
    height: 9.4,
    solids:
      dots(SCATTER.slice(3)) +
      dots([
        [0.8, 0.5],
        [2.4, 0.5],
        [4, 0.5],
        [5.6, 0.5],
        [7.2, 0.5],
        [8.8, 0.5],
      ]),
  },
  siltstone: {
    fgdc: 616,
    name: "siltstone",
    width: 10,
    height: 5,
    strokes: "M.4 1.25h3.8M5.4 3.75h3.8",
    solids: dots(
      [
        [5.6, 1.25],
        [7.1, 1.25],
        [8.6, 1.25],
        [0.6, 3.75],
        [2.1, 3.75],
        [3.6, 3.75],
      ],
      0.33,
    ),
  },
  clay: { fgdc: 620, name: "clay or shale", ...STAGGERED, strokes: DASH_ROWS },
  marl: {
    fgdc: 623,
    name: "marl",
    width: 10,
    height: 6.4,
    strokes: "M.6 1.8h4.2M5.6 5h4.2M2.7 1.8v1.6M7.7 5v-1.6",
  },
  "black-shale": { fgdc: 624, name: "black shale", width: 8, height: 1.6, strokes: "M0 .8h8" },
  chalk: {
    fgdc: 626,
    name: "chalk",
    width: 16,
    height: 10.4,
    strokes:
      "M.5 1h6.2M9.5 2.3h5M3.4 4.8h7.2M12.6 6.2h3.4M0 6.2h1.6M4.6 8.8h6.4M13 9.4h2.2M4.2 1v1.7M7.2 4.8v2.1M12.2 2.3v1.5M8.6 8.8v1.5",
  },
  limestone: { fgdc: 627, name: "limestone", ...BRICK_SIZE, strokes: BRICKS },
  "sandy-limestone": {
    fgdc: 636,
    name: "sandy limestone",
    ...BRICK_SIZE,
    strokes: BRICKS,
    solids: dots(
      [
        [1.2, 1.9],
        [5.4, 1.3],
        [7.4, 2.4],
        [4.2, 4.8],
        [10, 4.7],
        [1, 7.9],
        [6, 7.3],
        [9.2, 8],
        [4.4, 10.3],
      ],
      0.33,
    ),
  },
  "marly-limestone": {
    fgdc: 638,
    name: "marly limestone",
    ...BRICK_SIZE,
    strokes: `${BRICKS}M5.2 1.85h3.2M3.2 4.75h2.8M5.4 7.65h3.2M3.2 10.35h2.8`,
  },
  "cherty-limestone": {
    fgdc: 639,
    name: "cherty limestone",
    ...BRICK_SIZE,
    strokes: BRICKS,
    solids: "M5 1.9a1.7 .7 0 1 0 3.4 0a1.7 .7 0 1 0 -3.4 0zM3.2 7.7a1.6 .7 0 1 0 3.2 0a1.6 .7 0 1 0 -3.2 0z",
  },
  dolomite: {
    fgdc: 642,
    name: "dolomite",
    ...BRICK_SIZE,
    strokes:
      "M0 .25h11M0 3.45h11M0 6.05h11M2.2 3.45l1.2 -3.2M7.8 6.05l1 -2.6M2.2 9.2l1.2 -3.15M0 9.2h11M7.9 11.45l.9 -2.25",
  },
  chert: {
    fgdc: 649,
    name: "chert",
    width: 10,
    height: 5.2,
    strokes:
      "M0 1.3a2.5 1 0 1 0 5 0a2.5 1 0 1 0 -5 0M5 1.3a2.5 1 0 1 0 5 0a2.5 1 0 1 0 -5 0M2.5 3.9a2.5 1 0 1 0 5 0a2.5 1 0 1 0 -5 0M0 2.9a2.5 1 0 0 1 0 2M10 2.9a2.5 1 0 0 0 0 2",
  },
  coal: { fgdc: 658, name: "coal", width: 8, height: 8, ground: "ink" },
  bentonite: {
    fgdc: 662,
    name: "bentonite",
    width: 11,
    height: 8.4,
    strokes: "M1 2h2.6l1.4 -1M3.6 2l1.4 1M6 6.2h2.6l1.4 -1M8.6 6.2l1.4 1",
  },
  tuff: {
    fgdc: 711,
    name: "tuff",
    width: 9,
    height: 9,
    strokes: "M2.2 3.6v-1.7l-1.2 -1.1M2.2 1.9l1.2 -1.1M6.7 5.3v1.7l-1.2 1.1M6.7 7l1.2 1.1",
  },
  "crystal-tuff": {
    fgdc: 712,
    name: "crystal tuff",
    width: 8,
    height: 7.2,
    strokes: "M1.2 1l1.6 1.6M1.2 2.6l1.6 -1.6M5.2 4.6l1.6 1.6M5.2 6.2l1.6 -1.6",
  },
  covered: { name: "covered", width: 12, height: 12, strokes: "M0 0l12 12M12 0l-12 12" },
  "core-loss": { name: "core loss", width: 4, height: 4, strokes: "M-1 1l2 -2M0 4l4 -4M3 5l2 -2" },
  "not-searched": {
    name: "not searched",
    width: 5,
    height: 5,
    solids: dots(
      [
        [1.25, 1.25],
        [3.75, 3.75],
      ],
      0.28,
    ),
  },
} as const satisfies Record<string, PatternTile>;

export type PatternId = keyof typeof PATTERN_TILES;
