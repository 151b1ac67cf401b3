import { type CSSProperties, type ReactElement, useRef } from "react";
import type { Drawing } from "../../figures/plates/drawing.ts";
import type { Opened } from "../state/page-context.ts";
import { usePage } from "../state/page-context.ts";
import { Handles } from "../trial/handles.tsx";
import { MarkLabel } from "./mark-label.tsx";
import { MarksList } from "./marks-list.tsx";
import styles from "./plate.module.css";
import { PlateTools } from "./plate-tools.tsx";
import { ReadingLine } from "./reading-line.tsx";
import { useMarkPresses } from "./use-mark-presses.ts";
import { type OnMark, useMarks } from "./use-marks.ts";
import { usePlateKeys } from "./use-plate-keys.ts";
import { usePlateScale } from "./use-plate-scale.ts";
import { useReading } from "./use-reading.ts";

interface PlateProps {
  readonly drawing: Drawing;
  readonly open: Opened;
  /** The same drawing with other faces, for a file; default that of the station. */
  readonly again?: (fontFaces: string) => Drawing;
  /** What the station does with a click or a key on a mark; tells whether it did anything. */
  readonly onMark?: OnMark;
  /** Its keys in words. */
  readonly markKeys?: string;
}

/** The plate as it will be exported, with the reading line and the names of marks laid over it. */
export function PlateView({ drawing, open, again, onMark, markKeys }: PlateProps): ReactElement {
  const { state } = usePage();
  const frame = useRef<HTMLDivElement>(null);
  const sheet = useRef<HTMLDivElement>(null);
  const pixelsPerPoint = usePlateScale(frame, drawing);
  const reading = useReading(drawing, open);
  const marks = useMarks(sheet, drawing);
  usePlateKeys(frame, reading);
  useMarkPresses(sheet, marks.pointed?.mark, onMark);
  return (
    <figure className={styles.figure}>
      <PlateTools drawing={drawing} open={open} again={again} />
      <section
        ref={frame}
        className={styles.frame}
        aria-label={`${drawing.title}: arrow keys move the reading line`}
        // oxlint-disable-next-line jsx-a11y/no-noninteractive-tabindex -- it scrolls, and its arrow keys move the line
        tabIndex={0}
      >
        <div
          ref={sheet}
          className={styles.sheet}
          style={sizeOf(drawing, pixelsPerPoint)}
          onPointerMove={(event) => {
            reading.onPointer(event, pixelsPerPoint);
            marks.onPointer(event);
          }}
          onPointerDown={(event) => reading.onPointer(event, pixelsPerPoint)}
          onPointerLeave={marks.onLeave}
          onDoubleClick={marks.onOpen}
        >
          {drawing.element}
          {state.reading && (
            <ReadingLine drawing={drawing} reading={reading} pixelsPerPoint={pixelsPerPoint} />
          )}
          <Handles open={open} panels={drawing.panels} pixelsPerPoint={pixelsPerPoint} />
          <MarkLabel pointed={marks.pointed} keys={markKeys} />
        </div>
      </section>
      <MarksList marks={marks} onMark={onMark} keys={markKeys} />
    </figure>
  );
}

interface SheetSize extends CSSProperties {
  readonly "--sheet-width": string;
  readonly "--sheet-height": string;
}

const sizeOf = ({ width, height }: Drawing, pixelsPerPoint: number): SheetSize => ({
  "--sheet-width": `${width * pixelsPerPoint}px`,
  "--sheet-height": `${height * pixelsPerPoint}px`,
});
