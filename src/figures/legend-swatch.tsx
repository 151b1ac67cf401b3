import type { ReactElement } from "react";
import { type ContactKind, contactPath, contactStroke } from "./columns/contact.ts";
import { levelSetPaint } from "./columns/level-column.tsx";
import { filledTick, openTick } from "./columns/search-rail.tsx";
import { type RangeSign, rangeSwatch } from "./legend-range-swatch.tsx";
import { type TimingSign, timingSwatch } from "./legend-timing-swatch.tsx";
import type { PatternId } from "./lithology/pattern-tiles.ts";
import { patternFill } from "./lithology/patterns.tsx";
import { arrowPath, boxPath, markPath } from "./marks/mark-path.ts";
import { barPaint, type RangeBar } from "./marks/taper.tsx";
import { round } from "./numbers.ts";
import { PlateText } from "./plate-text.tsx";
import { COLOURS, TEXT } from "./theme.ts";

/** What a legend entry shows. A rock outside the table of terms has the letter that stands in its beds. */
export type LegendSign =
  | { readonly kind: "rock"; readonly pattern: PatternId }
  | { readonly kind: "plain-rock"; readonly letter: string }
  | { readonly kind: "contact"; readonly contact: ContactKind }
  | {
      readonly kind: "found" | "barren" | "find" | "open-find" | "taper" | "reaches-top";
      readonly colour: string;
    }
  | { readonly kind: "group"; readonly colour: string; readonly letter: string }
  | { readonly kind: "bar"; readonly colour: string; readonly bar: RangeBar }
  | RangeSign
  | TimingSign
  | { readonly kind: "survivor" | "cut-off" | "interval-end"; readonly colour: string }
  | {
      readonly kind:
        | "set-if-one"
        | "set-joint"
        | "duration"
        | "main-horizon"
        | "other-horizon"
        | "value"
        | "anomaly"
        | "limit"
        | "background"
        | "curve"
        | "density"
        | "level-limit"
        | "normal"
        | "reversed"
        | "unknown-polarity";
    };

export const SWATCH_WIDTH = 16;
export const SWATCH_HEIGHT = 8;

interface LegendSwatchProps {
  readonly plateId: string;
  readonly x: number;
  readonly y: number;
  readonly sign: LegendSign;
}

const POLARITY_FILLS = { normal: COLOURS.ink, reversed: COLOURS.paper, "unknown-polarity": COLOURS.band };
const box = boxPath(0, 0, SWATCH_WIDTH, SWATCH_HEIGHT);
const middleX = SWATCH_WIDTH / 2;
const middleY = SWATCH_HEIGHT / 2;
const across = `M0 ${middleY}h${SWATCH_WIDTH}`;
const taper = `M0 ${middleY - 3}H6C9 ${middleY - 1} 12 ${middleY - 0.4} 16 ${middleY}C12 ${middleY + 0.4} 9 ${middleY + 1} 6 ${middleY + 3}H0z`;

export function LegendSwatch({ plateId, x, y, sign }: LegendSwatchProps): ReactElement {
  return <g transform={`translate(${round(x)} ${round(y)})`}>{swatch(plateId, sign)}</g>;
}

function swatch(plateId: string, sign: LegendSign): ReactElement {
  switch (sign.kind) {
    case "rock":
      return <Rock plateId={plateId} pattern={sign.pattern} />;
    case "plain-rock":
      return <PlainRock letter={sign.letter} />;
    case "contact":
      return (
        <path
          d={contactPath(sign.contact, { x: 0, y: middleY, width: SWATCH_WIDTH })}
          fill="none"
          stroke={sign.contact === "faulted" ? COLOURS.rust : COLOURS.ink}
          {...contactStroke(sign.contact)}
        />
      );
    case "level-limit":
      return (
        <path
          d={`M${middleX} 0V${SWATCH_HEIGHT}`}
          stroke={COLOURS.soft}
          strokeWidth={0.5}
          strokeDasharray="2 1.5"
        />
      );
    case "normal":
    case "reversed":
    case "unknown-polarity":
      return <path d={box} fill={POLARITY_FILLS[sign.kind]} stroke={COLOURS.ink} strokeWidth={0.45} />;
    case "found":
      return <path d={filledTick(middleX - 3.5, middleY)} fill={sign.colour} />;
    case "barren":
      return (
        <path
          d={openTick(middleX - 3.5, middleY)}
          fill={COLOURS.paper}
          stroke={sign.colour}
          strokeWidth={0.35}
        />
      );
    case "find":
      return <path d={`M${middleX - 3} ${middleY}h6`} stroke={sign.colour} strokeWidth={0.75} />;
    case "open-find":
      return (
        <path
          d={boxPath(middleX - 3, middleY - 0.8, 6, 1.6)}
          fill={COLOURS.paper}
          stroke={sign.colour}
          strokeWidth={0.4}
        />
      );
    case "taper":
      return <path d={taper} fill={sign.colour} fillOpacity={0.3} />;
    case "reaches-top":
    case "survivor":
      return <path d={markPath("triangle", middleX, middleY, 2.2)} fill={sign.colour} />;
    case "cut-off":
      return (
        <path
          d={markPath("triangle", middleX, middleY, 2.2)}
          fill={COLOURS.paper}
          stroke={sign.colour}
          strokeWidth={0.6}
        />
      );
    case "interval-end":
      return <path d={`M${middleX - 4} ${middleY}h8`} stroke={sign.colour} strokeWidth={0.9} />;
    case "bar":
      return <path d={boxPath(0, middleY - 2.3, SWATCH_WIDTH, 4.6)} {...barPaint(sign.bar, sign.colour)} />;
    case "group":
      return (
        <PlateText
          x={middleX}
          y={middleY + 2.5}
          style={TEXT.labelStrong}
          anchor="middle"
          colour={sign.colour}
        >
          {sign.letter}
        </PlateText>
      );
    case "set-if-one":
      return <path d={boxPath(middleX - 4, 0, 8, SWATCH_HEIGHT)} {...levelSetPaint("if-one")} />;
    case "set-joint":
      return <path d={boxPath(middleX - 4, 0, 8, SWATCH_HEIGHT)} {...levelSetPaint("joint")} />;
    case "duration":
      return (
        <path
          d={`M${middleX - 3} 0h6m-3 0v${SWATCH_HEIGHT}m-3 0h6`}
          fill="none"
          stroke={COLOURS.ink}
          strokeWidth={0.7}
        />
      );
    case "main-horizon":
      return (
        <>
          <path d={boxPath(0, middleY - 2.5, SWATCH_WIDTH, 5)} fill={COLOURS.rust} opacity={0.13} />
          <path d={across} stroke={COLOURS.rust} strokeWidth={0.9} />
        </>
      );
    case "other-horizon":
      return <path d={across} stroke={COLOURS.ink} strokeWidth={0.6} strokeDasharray="0.8 2" />;
    case "value":
      return <path d={markPath("circle", middleX, middleY, 1.25)} fill={COLOURS.ink} />;
    case "anomaly":
      return <path d={markPath("circle", middleX, middleY, 1.25)} fill={COLOURS.rust} />;
    case "limit":
      return (
        <path d={arrowPath(middleX + 3, middleY, -6)} fill="none" stroke={COLOURS.soft} strokeWidth={0.5} />
      );
    case "background":
      return <path d={box} fill={COLOURS.band} />;
    case "curve":
      return (
        <>
          <path d={boxPath(0, middleY - 2, SWATCH_WIDTH, 4)} fill={COLOURS.rust} opacity={0.16} />
          <path d={across} stroke={COLOURS.rust} strokeWidth={0.9} />
        </>
      );
    case "density":
      return <path d={box} fill={COLOURS.blue} fillOpacity={0.28} stroke={COLOURS.blue} strokeWidth={0.7} />;
    case "posterior":
    case "observed-lasts":
    case "expected-lasts":
    case "band-each":
    case "band-all":
    case "influential":
    case "was":
      return timingSwatch(sign);
    default:
      return rangeSwatch(sign);
  }
}

function Rock({ plateId, pattern }: { readonly plateId: string; readonly pattern: PatternId }): ReactElement {
  const stroke = { stroke: COLOURS.ink, strokeWidth: 0.45 };
  if (pattern !== "covered") return <path d={box} fill={patternFill(plateId, pattern)} {...stroke} />;
  const cross = `M0 0L${SWATCH_WIDTH} ${SWATCH_HEIGHT}M${SWATCH_WIDTH} 0L0 ${SWATCH_HEIGHT}`;
  return <path d={box + cross} fill="none" {...stroke} />;
}

function PlainRock({ letter }: { readonly letter: string }): ReactElement {
  return (
    <>
      <path d={box} fill={COLOURS.paper} stroke={COLOURS.ink} strokeWidth={0.45} />
      <PlateText x={middleX} y={middleY + 2.5} style={TEXT.unit} anchor="middle">
        {letter}
      </PlateText>
    </>
  );
}
