import {
  type MouseEvent,
  type PointerEvent,
  type RefObject,
  useLayoutEffect,
  useMemo,
  useState,
} from "react";
import type { Drawing } from "../../figures/plates/drawing.ts";
import { usePage } from "../state/page-context.ts";
import { isSameMark, MARK_SELECTOR, type Mark, type MarkBox, markBox, markOf, placeOfMark } from "./mark.ts";

/** A mark under the pointer or the focus, and where it is drawn. */
export interface Pointed {
  readonly mark: Mark;
  readonly box: MarkBox;
  readonly drawing: Drawing;
}

/** What is done with a key, or `click`, on a mark; tells whether it did anything. */
export type OnMark = (key: string, mark: Mark) => boolean;

export interface Marks {
  /** The marks on the plate that the keyboard walks through, each once, in the order drawn. */
  readonly listed: readonly Mark[];
  readonly pointed: Pointed | undefined;
  readonly point: (mark: Mark | undefined) => void;
  /** Opens the rows a mark stands for, at Tables. */
  readonly open: (mark: Mark) => void;
  readonly onPointer: (event: PointerEvent) => void;
  readonly onLeave: () => void;
  readonly onOpen: (event: MouseEvent) => void;
}

/** Every mark is data: what the pointer or the focus is on, and the way to its rows. */
export function useMarks(sheet: RefObject<HTMLElement | null>, drawing: Drawing): Marks {
  const { go, open: opened } = usePage();
  const [listed, setListed] = useState<readonly Mark[]>([]);
  const [pointed, setPointed] = useState<Pointed>();

  // What a plate shows is known once it is drawn.
  // oxlint-disable react/set-state-in-effect, react/exhaustive-effect-dependencies
  useLayoutEffect(() => setListed(marksOn(sheet.current)), [sheet, drawing]);
  // oxlint-enable react/set-state-in-effect, react/exhaustive-effect-dependencies

  return useMemo(() => {
    const point = (mark: Mark | undefined) =>
      setPointed((before) => {
        if (before?.drawing === drawing && isSameMark(before.mark, mark)) return before;
        const box = mark && sheet.current ? markBox(mark, sheet.current) : undefined;
        return mark && box && { mark, box, drawing };
      });
    const open = (mark: Mark) => {
      if (opened !== undefined) go(placeOfMark(mark, opened.analysis));
    };
    return {
      listed,
      pointed: pointed?.drawing === drawing ? pointed : undefined,
      point,
      open,
      onPointer: (event) => point(markUnder(event.target)),
      onLeave: () => point(undefined),
      onOpen: (event) => {
        const mark = markUnder(event.target);
        if (mark !== undefined) open(mark);
      },
    };
  }, [listed, pointed, drawing, sheet, opened, go]);
}

export const markUnder = (target: EventTarget): Mark | undefined =>
  target instanceof Element ? markOf(target.closest(MARK_SELECTOR)) : undefined;

function marksOn(sheet: HTMLElement | null): readonly Mark[] {
  const found = new Map<string, Mark>();
  for (const element of sheet?.querySelectorAll("[data-taxon], [data-horizon], [data-taxon] [data-row]") ??
    []) {
    const mark = markOf(element);
    if (mark !== undefined) found.set(`${mark.kind} ${mark.name}`, mark);
  }
  return [...found.values()];
}
