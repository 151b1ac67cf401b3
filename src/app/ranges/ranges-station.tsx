import {
  type ReactElement,
  type RefObject,
  useCallback,
  useDeferredValue,
  useEffect,
  useMemo,
  useRef,
  useState,
} from "react";
import type { Mark } from "../plate/mark.ts";
import { PlateView } from "../plate/plate-view.tsx";
import { usePlainKeys } from "../plate/use-plain-keys.ts";
import { type Opened, usePage } from "../state/page-context.ts";
import { viewOf } from "../state/zoom.ts";
import styles from "./ranges.module.css";
import { changedRanges } from "./ranges-actions.ts";
import { type RangesAsked, rangesPage } from "./ranges-drawing.ts";
import { RangesTools } from "./ranges-tools.tsx";
import { heldAside } from "./set-aside.ts";
import { useSetAside } from "./use-set-aside.ts";
import { useTapers } from "./use-tapers.ts";

/** The range chart with its tools, or its ends by every method. */
export function RangesStation(): ReactElement | null {
  const { open } = usePage();
  return open?.focus.section === undefined ? null : <Shown open={open} name={open.focus.section.name} />;
}

function Shown({ open, name }: { readonly open: Opened; readonly name: string }): ReactElement {
  const page = usePage();
  const { state } = page;
  const [frame, shown] = [useDeferredValue(state.frame), useDeferredValue(open)];
  const box = useRef<HTMLDivElement>(null);
  const pageWidth = usePageWidth(box);
  const place = shown.focus.ranges;
  const tapers = useTapers(shown.analysis, name, place.isCompared ? undefined : place.method);
  const aside = useMemo(() => heldAside(state.history, name), [state.history, name]);
  const asked = useMemo((): RangesAsked => {
    const { analysis, focus, trying } = shown;
    const view = viewOf(focus, frame, analysis, trying?.was);
    return {
      section: name,
      place,
      view: { ...view, ...(trying && { was: trying.was }) },
      aside,
      pageWidth,
      ...(tapers === undefined ? {} : { tapers }),
    };
  }, [shown, frame, name, place, aside, pageWidth, tapers]);
  const made = useMemo(() => rangesPage(shown.analysis, asked), [shown, asked]);
  const again = useCallback(
    (fontFaces: string) =>
      rangesPage(shown.analysis, { ...asked, view: { ...asked.view, fontFaces } }).drawing,
    [shown, asked],
  );
  const setAside = useSetAside(open, name);
  const onMark = (key: string, mark: Mark) => {
    if (key === "x") return setAside(mark);
    if ((key !== "t" && key !== "click") || mark.kind !== "taxon") return false;
    const isTurnedOff = key === "t" && place.taxon === mark.name;
    changedRanges(page, { taxon: isTurnedOff ? undefined : mark.name });
    return true;
  };
  usePlainKeys((key) => {
    const next = key === "]" ? made.page + 1 : key === "[" ? made.page - 1 : 0;
    if (next < 1 || next > made.pages) return false;
    changedRanges(page, { page: next });
    return true;
  });
  const isWorking = place.method !== undefined && !place.isCompared && tapers === undefined;
  return (
    <div ref={box} className={styles.station}>
      <RangesTools open={open} shown={made} isWorking={isWorking} />
      <div className={styles.plate}>
        <PlateView drawing={made.drawing} open={open} again={again} onMark={onMark} markKeys={MARK_KEYS} />
      </div>
    </div>
  );
}

const MARK_KEYS = "t: in focus, x: set aside or take back";

/** A plate smaller than this cannot be read: what is wider goes on another page. */
const LEAST_SCALE = 1.08;
const NARROWEST_PAGE = 640;

/** Points that a page may take in the room there is. */
function usePageWidth(box: RefObject<HTMLElement | null>): number {
  const [width, setWidth] = useState(NARROWEST_PAGE);
  useEffect(() => {
    const element = box.current;
    if (element === null) return undefined;
    const measure = () =>
      setWidth(Math.max(NARROWEST_PAGE, Math.floor(element.clientWidth / LEAST_SCALE) - 12));
    const observer = new ResizeObserver(measure);
    observer.observe(element);
    return () => observer.disconnect();
  }, [box]);
  return width;
}
