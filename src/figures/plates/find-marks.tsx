import type { ReactElement } from "react";
import { type HeightScale, isInFrame } from "../height-scale.ts";
import { boxPath, markPath } from "../marks/mark-path.ts";
import { round } from "../numbers.ts";
import { COLOURS } from "../theme.ts";
import type { FindMark } from "./charted-taxa.ts";
import type { OpenFind, OpenKind } from "./drawn-taxa.ts";

interface OpenFindsProps {
  readonly x: number;
  readonly y: HeightScale;
  readonly colour: string;
  readonly open: readonly OpenFind[];
}

const SHAPES = { reworked: "diamond", doubtful: "circle" } as const;
const RADIUS = 1.5;

/** Reworked and doubtful finds, each kind with its own open sign. */
export function OpenFinds({ x, y, colour, open }: OpenFindsProps): ReactElement | null {
  const d = open
    .filter(({ kind, heightM }) => kind !== "set-aside" && isInFrame(y, heightM))
    .map(({ kind, heightM }) => openPath(kind, x, y(heightM)))
    .join("");
  return d === "" ? null : <path d={d} fill={COLOURS.paper} stroke={colour} strokeWidth={0.5} />;
}

const BOX_WIDTH = 4.6;

function openPath(kind: OpenKind, x: number, y: number): string {
  return kind === "set-aside"
    ? boxPath(x - BOX_WIDTH / 2, y - 0.8, BOX_WIDTH, 1.6)
    : markPath(SHAPES[kind], x, y, RADIUS);
}

interface FindMarksProps {
  readonly x: number;
  readonly y: HeightScale;
  readonly width: number;
  readonly colour: string;
  readonly marks: readonly FindMark[];
}

/** Every find as a mark of its own, named by its row. */
export function FindMarks({ x, y, width, colour, marks }: FindMarksProps): ReactElement {
  const shown = marks.filter(({ heightM }) => isInFrame(y, heightM));
  return (
    <>
      {shown.map(({ heightM, row, open }) =>
        open === undefined ? (
          <path
            key={row}
            data-row={row}
            d={`M${round(x - width / 2)} ${round(y(heightM))}h${round(width)}`}
            stroke={colour}
            strokeWidth={0.95}
          />
        ) : (
          <path
            key={row}
            data-row={row}
            d={openPath(open, x, y(heightM))}
            fill={COLOURS.paper}
            stroke={colour}
            strokeWidth={0.5}
          />
        ),
      )}
    </>
  );
}
