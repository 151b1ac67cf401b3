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
import { MARK_SELECTOR, type Mark, markOf, placeOfMark } from "./mark.ts";

export interface Marks {
  /** The marks on the plate that the keyboard walks through, each once, in the order drawn. */
  readonly listed: readonly Mark[];
  readonly pointed: Mark | undefined;
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
  const [pointed, point] = useState<Mark>();

  useLayoutEffect(() => {
    const found = new Map<string, Mark>();
    for (const element of sheet.current?.querySelectorAll("[data-taxon], [data-horizon]") ?? []) {
      const mark = markOf(element);
      if (mark !== undefined && !found.has(`${mark.kind} ${mark.name}`))
        found.set(`${mark.kind} ${mark.name}`, mark);
    }
    setListed([...found.values()]);
    point(undefined);
  }, [sheet, drawing]);

  return useMemo(() => {
    const open = (mark: Mark) => {
      if (opened !== undefined) go(placeOfMark(mark, opened.analysis));
    };
    const under = (target: EventTarget) =>
      target instanceof Element ? markOf(target.closest(MARK_SELECTOR)) : undefined;
    return {
      listed,
      pointed,
      point,
      open,
      onPointer: (event) => {
        const mark = under(event.target);
        point((before) => (before?.kind === mark?.kind && before?.name === mark?.name ? before : mark));
      },
      onLeave: () => point(undefined),
      onOpen: (event) => {
        const mark = under(event.target);
        if (mark !== undefined) open(mark);
      },
    };
  }, [listed, pointed, opened, go]);
}
