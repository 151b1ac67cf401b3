import { X } from "lucide-react";
import { type KeyboardEvent, type ReactElement, useLayoutEffect, useMemo, useRef, useState } from "react";
import { isInFrame } from "../../figures/height-scale.ts";
import { markableLog } from "../../figures/plates/section-log.tsx";
import { position } from "../../report/wordings/numbers.ts";
import plateStyles from "../plate/plate.module.css";
import { useReading } from "../plate/use-reading.ts";
import type { Opened } from "../state/page-context.ts";
import type { RowInHand } from "./row-in-hand.ts";
import styles from "./section-log.module.css";

const PIXELS_PER_POINT = 4 / 3;
/** What stands above and below the section on its sheet, about; a legend of many rocks takes more. */
const AROUND = 190;
const LEAST_BODY = 180;

interface SectionLogProps {
  readonly open: Opened;
  readonly hand: RowInHand;
  /** Goes to the row nearest to a height. */
  readonly goTo: (heightM: number) => void;
  readonly close: () => void;
}

/** The log of the section that the row in hand belongs to, with its place marked; a level chosen in it chooses the row. */
export function SectionLog({ open, hand, goTo, close }: SectionLogProps): ReactElement {
  const frame = useRef<HTMLElement>(null);
  const room = useRoom(frame);
  const { analysis } = open;
  const { section, marked } = hand;
  const draw = useMemo(
    () => markableLog(analysis, { section, bodyHeight: Math.max(LEAST_BODY, room - AROUND) }),
    [analysis, section, room],
  );
  const drawing = useMemo(() => draw(marked), [draw, marked]);
  const reading = useReading(drawing, open);
  const { heightM, panel } = reading;
  const onKeyDown = (event: KeyboardEvent) => {
    if (event.key === "Enter" && heightM !== undefined) goTo(heightM);
    else reading.onKeyDown(event.nativeEvent);
  };
  return (
    <div className={styles.log}>
      <div className={styles.bar}>
        <span>
          {marked?.label ?? hand.words}
          {heightM !== undefined && reading.section && ` · line at ${position(reading.section, heightM)}`}
        </span>
        <button
          type="button"
          aria-label="Close the section log"
          title="Close the section log"
          onClick={close}
        >
          <X aria-hidden size={15} />
        </button>
      </div>
      {/* oxlint-disable-next-line jsx-a11y/no-noninteractive-element-interactions -- its keys choose a level */}
      <section
        ref={frame}
        className={styles.frame}
        aria-label={`Log of ${drawing.title}: arrow keys move the reading line, Enter goes to the nearest row`}
        // oxlint-disable-next-line jsx-a11y/no-noninteractive-tabindex -- it scrolls, and its keys choose a level
        tabIndex={0}
        onKeyDown={onKeyDown}
      >
        {/* oxlint-disable-next-line jsx-a11y/click-events-have-key-events, jsx-a11y/no-static-element-interactions -- the frame has the keys */}
        <div
          className={plateStyles.sheet}
          style={{ width: drawing.width * PIXELS_PER_POINT, height: drawing.height * PIXELS_PER_POINT }}
          onPointerMove={(event) => reading.onPointer(event, PIXELS_PER_POINT)}
          onClick={(event) => {
            const y = (event.clientY - event.currentTarget.getBoundingClientRect().top) / PIXELS_PER_POINT;
            if (panel !== undefined && y >= panel.top && y <= panel.bottom) goTo(panel.scale.invert(y));
          }}
        >
          {drawing.element}
          {panel !== undefined && heightM !== undefined && isInFrame(panel.scale, heightM) && (
            <div className={plateStyles.line} style={{ top: panel.scale(heightM) * PIXELS_PER_POINT }} />
          )}
        </div>
      </section>
    </div>
  );
}

/** Height of the frame, in points of the sheet. */
function useRoom(frame: React.RefObject<HTMLElement | null>): number {
  const [room, setRoom] = useState(600);
  useLayoutEffect(() => {
    const element = frame.current;
    if (element === null) return undefined;
    const measure = () => setRoom(Math.round(element.clientHeight / PIXELS_PER_POINT));
    measure();
    const observer = new ResizeObserver(measure);
    observer.observe(element);
    return () => observer.disconnect();
  }, [frame]);
  return room;
}
