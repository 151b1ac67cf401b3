import type { ReactElement } from "react";
import { chevrons, type EndSignKind } from "./marks/end-sign.tsx";
import { boxPath, markPath } from "./marks/mark-path.ts";
import { COLOURS } from "./theme.ts";

/** Signs of ranges and of what methods say of their ends. */
export interface RangeSign {
  readonly kind:
    | EndSignKind
    | "reworked"
    | "doubtful"
    | "inclusive"
    | "leaning"
    | "folded"
    | "point-proof"
    | "point-fitted"
    | "point-even"
    | "too-short"
    | "bound";
  readonly colour: string;
}

const X = 8;
const Y = 4;

export function rangeSwatch({ kind, colour }: RangeSign): ReactElement {
  const thin = { fill: "none", stroke: colour, strokeWidth: 0.7 };
  const hollow = { fill: COLOURS.paper, stroke: colour, strokeWidth: 0.6 };
  switch (kind) {
    case "leaves-section":
      return <path d={chevrons(X, Y - 0.8, -1, 1)} {...thin} />;
    case "open-end":
      return <path d={chevrons(X, Y - 2, -1, 2)} {...thin} />;
    case "in-hiatus":
      return <path d={`M${X - 3} ${Y - 1}h6m-6 2h6`} {...thin} strokeWidth={0.9} />;
    case "no-interval":
      return <path d={markPath("square", X, Y, 1.7)} {...hollow} />;
    case "reworked":
      return <path d={markPath("diamond", X, Y, 1.5)} {...hollow} strokeWidth={0.5} />;
    case "doubtful":
      return <path d={markPath("circle", X, Y, 1.5)} {...hollow} strokeWidth={0.5} />;
    case "inclusive":
      return <path d={`M${X} 0V8`} {...thin} strokeDasharray="0.7 1.1" />;
    case "leaning":
      return <path d={`M${X - 1} 0.4h2M${X} 0.4V7.6M${X - 1} 7.6h2`} {...thin} strokeWidth={0.5} />;
    case "folded":
      return (
        <>
          <path d={boxPath(X - 5, 0, 10, 8)} fill={COLOURS.column} />
          <path d={`M${X - 4} 2h8m-8 2.6h8m-8 1.6h8`} {...thin} />
        </>
      );
    case "point-proof":
      return <path d={markPath("diamond", X, Y, 1.9)} fill={colour} />;
    case "point-fitted":
      return <path d={markPath("triangle", X, Y, 2)} fill={colour} />;
    case "point-even":
      return <path d={markPath("circle", X, Y, 1.7)} fill={colour} />;
    case "too-short":
      return <path d={`M${X} 0V8`} {...thin} strokeWidth={1} strokeDasharray="2 1.2" />;
    case "bound":
      return <path d={`M${X - 3} ${Y}h6`} {...thin} strokeWidth={0.9} />;
    default:
      return kind satisfies never;
  }
}
