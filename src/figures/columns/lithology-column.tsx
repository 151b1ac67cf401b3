import type { ReactElement } from "react";
import { clippedSpan, type HeightScale, type Span } from "../height-scale.ts";
import { lithologyOf, plainLetters } from "../lithology/lithology.ts";
import type { PatternId } from "../lithology/pattern-tiles.ts";
import { patternFill } from "../lithology/patterns.tsx";
import { boxPath } from "../marks/mark-path.ts";
import { round } from "../numbers.ts";
import { PlateText } from "../plate-text.tsx";
import { capHeight } from "../text.ts";
import { COLOURS, TEXT } from "../theme.ts";
import { type ContactKind, contactPath, contactStroke } from "./contact.ts";

export interface LoggedBed {
  readonly baseM: number;
  readonly topM: number;
  readonly lithology: string;
  readonly baseContact?: ContactKind;
}

/** A stretch without rock to see. */
export interface HiddenRock {
  readonly kind: "covered" | "core-loss" | "not-searched";
  readonly baseM: number;
  readonly topM: number;
}

interface LithologyColumnProps {
  readonly plateId: string;
  readonly x: number;
  /** Width of the bed that stands out furthest. */
  readonly width: number;
  readonly y: HeightScale;
  readonly beds: readonly LoggedBed[];
  readonly hidden?: readonly HiddenRock[];
}

/** The patterns a log needs in its plate's definitions. */
export function lithologyPatterns(
  beds: readonly LoggedBed[],
  hidden: readonly HiddenRock[] = [],
): readonly PatternId[] {
  const rocks = beds.map((bed) => lithologyOf(bed.lithology).pattern);
  return [...rocks.filter((pattern) => pattern !== undefined), ...hidden.map(({ kind }) => kind)];
}

/** The log: beds with the pattern and weathering width of their rock, and each base drawn as its contact. */
export function LithologyColumn(props: LithologyColumnProps): ReactElement {
  const { beds, hidden = [], y, x, width, plateId } = props;
  const letters = plainLetters(beds.map((bed) => bed.lithology));
  return (
    <g>
      {rockAreas(props).map(({ pattern, area }) => (
        <path
          key={pattern ?? "plain"}
          d={area}
          fill={pattern === undefined ? COLOURS.paper : patternFill(plateId, pattern)}
        />
      ))}
      {beds.map((bed) => {
        const span = clippedSpan(y, bed.baseM, bed.topM);
        if (span === undefined) return null;
        const letter = letters.get(bed.lithology);
        return <BedBlock key={`${bed.baseM} ${bed.topM}`} {...{ x, width, bed, span, letter }} />;
      })}
      {hidden.map(({ kind, baseM, topM }) => {
        const span = clippedSpan(y, baseM, topM);
        return span && <HiddenBlock key={`${kind} ${baseM}`} {...{ plateId, kind, x, width, span }} />;
      })}
      <Contacts beds={beds} x={x} width={width} y={y} />
    </g>
  );
}

/** The beds of each rock as one area: a print spells its pattern out once for every area that it fills. */
function rockAreas({ beds, y, x, width }: LithologyColumnProps) {
  const areas = new Map<PatternId | undefined, string>();
  for (const bed of beds) {
    const span = clippedSpan(y, bed.baseM, bed.topM);
    if (span === undefined) continue;
    const { pattern, weathering } = lithologyOf(bed.lithology);
    const box = boxPath(x, span.top, width * weathering, span.bottom - span.top);
    areas.set(pattern, (areas.get(pattern) ?? "") + box);
  }
  return [...areas].map(([pattern, area]) => ({ pattern, area }));
}

interface BedBlockProps {
  readonly x: number;
  readonly width: number;
  readonly bed: LoggedBed;
  readonly span: Span;
  readonly letter: string | undefined;
}

function BedBlock({ x, width, bed, span, letter }: BedBlockProps): ReactElement {
  const bedWidth = width * lithologyOf(bed.lithology).weathering;
  const middle = (span.top + span.bottom) / 2 + capHeight(TEXT.unit) / 2;
  return (
    <>
      {letter !== undefined && span.bottom - span.top >= TEXT.unit.size && (
        <PlateText x={x + bedWidth / 2} y={middle} style={TEXT.unit} anchor="middle">
          {letter}
        </PlateText>
      )}
      <path
        d={`M${round(x)} ${round(span.bottom)}V${round(span.top)}H${round(x + bedWidth)}V${round(span.bottom)}`}
        fill="none"
        stroke={COLOURS.ink}
        strokeWidth={0.45}
      />
    </>
  );
}

interface ContactsProps {
  readonly beds: readonly LoggedBed[];
  readonly x: number;
  readonly width: number;
  readonly y: HeightScale;
}

function Contacts({ beds, x, width, y }: ContactsProps): ReactElement {
  return (
    <>
      {beds.map((bed) => {
        const span = clippedSpan(y, bed.baseM, bed.baseM);
        if (span === undefined) return null;
        const below = beds.find((other) => other.topM === bed.baseM);
        const reach = Math.max(
          ...[bed, ...(below ? [below] : [])].map((b) => lithologyOf(b.lithology).weathering),
        );
        const kind = bed.baseContact ?? "sharp";
        const line = { x, y: span.bottom, width: width * reach };
        return (
          <path
            key={bed.baseM}
            d={contactPath(kind, line)}
            fill="none"
            stroke={kind === "faulted" ? COLOURS.rust : COLOURS.ink}
            {...contactStroke(kind)}
          />
        );
      })}
    </>
  );
}

interface HiddenBlockProps {
  readonly plateId: string;
  readonly kind: HiddenRock["kind"];
  readonly x: number;
  readonly width: number;
  readonly span: Span;
}

const HIDDEN_WIDTH = 0.7;

function HiddenBlock({ plateId, kind, x, width, span }: HiddenBlockProps): ReactElement {
  const [right, height] = [width * HIDDEN_WIDTH, span.bottom - span.top];
  const crossed = `${boxPath(x, span.top, right, height)}M${round(x)} ${round(span.top)}l${round(right)} ${round(height)}m0 ${round(-height)}l${round(-right)} ${round(height)}`;
  return (
    <>
      <path
        d={boxPath(x, span.top, right, height)}
        fill={kind === "covered" ? COLOURS.paper : patternFill(plateId, kind)}
      />
      <path
        d={kind === "covered" ? crossed : boxPath(x, span.top, right, height)}
        fill="none"
        stroke={COLOURS.soft}
        strokeWidth={0.45}
        strokeDasharray={kind === "not-searched" ? "1.5 1.5" : undefined}
      />
    </>
  );
}
