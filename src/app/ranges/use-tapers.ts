import { useEffect, useState } from "react";
import type { Analysis } from "../../core/analysis-result.ts";
import { type RangeTapers, tapersBy } from "../../core/ranges/asked-ends.ts";
import type { RangeMethod } from "../../core/ranges/result.ts";

export interface TapersAsked {
  readonly section: string;
  readonly method: RangeMethod;
}

const known = new WeakMap<Analysis, Map<string, readonly RangeTapers[]>>();
const keyOf = ({ section, method }: TapersAsked): string => `${method} ${section}`;

/** Tapers that were worked out already. */
export const knownTapers = (analysis: Analysis, asked: TapersAsked): readonly RangeTapers[] | undefined =>
  known.get(analysis)?.get(keyOf(asked));

function keep(analysis: Analysis, asked: TapersAsked, tapers: readonly RangeTapers[]): void {
  const own = known.get(analysis) ?? new Map<string, readonly RangeTapers[]>();
  own.set(keyOf(asked), tapers);
  known.set(analysis, own);
}

/** Longer than this the hand is held up. */
const SLICE_MS = 8;

/** The tapers of a section by a method, worked out taxon by taxon with pauses; undefined until all are there. */
export function useTapers(
  analysis: Analysis | undefined,
  section: string | undefined,
  method: RangeMethod | undefined,
): readonly RangeTapers[] | undefined {
  const [, setDone] = useState<readonly RangeTapers[]>();
  const found =
    analysis === undefined || section === undefined || method === undefined
      ? undefined
      : knownTapers(analysis, { section, method });
  const isKnown = found !== undefined;
  useEffect(() => {
    if (analysis === undefined || section === undefined || method === undefined || isKnown) return undefined;
    const controller = new AbortController();
    void work(analysis, { section, method }, controller.signal).then((tapers) => {
      if (tapers !== undefined) setDone(tapers);
    });
    return () => controller.abort();
  }, [analysis, section, method, isKnown]);
  return found;
}

async function work(
  analysis: Analysis,
  asked: TapersAsked,
  signal: AbortSignal,
): Promise<readonly RangeTapers[] | undefined> {
  const tapers: RangeTapers[] = [];
  await pause();
  let until = performance.now() + SLICE_MS;
  for (const each of tapersBy(analysis, asked)) {
    tapers.push(each);
    if (performance.now() < until) continue;
    await pause();
    if (signal.aborted) return undefined;
    until = performance.now() + SLICE_MS;
  }
  keep(analysis, asked, tapers);
  return tapers;
}

const pause = () => new Promise<void>((resolve) => setTimeout(resolve));
