import { type Dispatch, useEffect, useMemo } from "react";
import type { Analysis } from "../../core/analysis-result.ts";
import type { RangeMethod } from "../../core/ranges/result.ts";
import { changedSettings } from "../../core/study/changed-settings.ts";
import { followSection } from "../../core/trial.ts";
import type { Finding } from "../../report/findings/finding.ts";
import { findings } from "../../report/findings/index.ts";
import { markersFinding } from "../../report/findings/markers.ts";
import { rangesFinding } from "../../report/findings/ranges.ts";
import { timingFinding } from "../../report/findings/timing.ts";
import { type Focus, focusOf } from "../state/focus.ts";
import type { Opened } from "../state/page-context.ts";
import type { PageEvent, PageState } from "../state/page-state.ts";
import { findingOf } from "../state/station-state.ts";
import type { OpenStudy } from "../study/use-study.ts";

/** A hand that moves on is not interrupted by the whole being worked out. */
const REST_MS = 200;

/**
 * The study in view: as it is, or with what is tried. While the hand moves, what has a closed form follows at once; when
 * it rests, the worker works out the whole.
 */
export function useOpened(
  { place, trial, history }: PageState,
  study: OpenStudy,
  dispatch: Dispatch<PageEvent>,
): Opened | undefined {
  const { workedOut, tried, tryOut, stopTrying } = study;
  const base = workedOut?.analysis;
  const { changes, isKept } = trial;
  const isTried = changes.length > 0;
  const whole =
    tried?.changes === changes && (tried.base === workedOut || isKept) ? tried.analysis : undefined;
  const isDone = isKept === true && workedOut?.history === history;

  useEffect(() => {
    if (isDone) dispatch({ kind: "let-go" });
  }, [isDone, dispatch]);

  const changed = useMemo(
    () => (base && isTried ? changedSettings(base.study.settings, changes) : undefined),
    [base, isTried, changes],
  );
  const isDue = changed?.kind === "changed" && isKept !== true && whole === undefined;
  useEffect(() => {
    if (!isDue || workedOut === undefined) return undefined;
    const timer = setTimeout(() => tryOut(workedOut, changes), REST_MS);
    return () => {
      clearTimeout(timer);
      stopTrying();
    };
  }, [isDue, changes, workedOut, tryOut, stopTrying]);

  const own = useMemo(() => base && { analysis: base, all: findings(base) }, [base]);
  const focus = useMemo(() => base && focusOf(place, base), [base, place]);
  const section = focus?.section?.name;
  const follow = useMemo(
    () => (base && section !== undefined && isTried ? followSection(base, section) : undefined),
    [base, section, isTried],
  );
  return useMemo(() => {
    if (own === undefined || focus === undefined) return undefined;
    if (changed === undefined || isDone) return { ...own, focus };
    const wasFinding = findingOf(own.all, focus);
    const shared = { was: own.analysis, wasFinding };
    if (whole !== undefined) {
      const shown = { analysis: whole, all: findings(whole), focus: focusOf(place, whole) };
      return { ...shown, trying: { ...shared, isWhole: true } };
    }
    if (changed.kind === "refused")
      return { ...own, focus, trying: { ...shared, isWhole: false, refused: changed.reason } };
    if (follow === undefined) return { ...own, focus, trying: { ...shared, isWhole: false } };
    const methods = methodsInView(own.analysis, focus);
    const analysis = follow({ settings: changed.settings, set: focus.set?.set, methods });
    const shown = {
      analysis,
      all: followedFindings(own.all, analysis, focus),
      focus: focusOf(place, analysis),
    };
    return { ...shown, trying: { ...shared, isWhole: false } };
  }, [own, focus, place, changed, isDone, whole, follow]);
}

/** Methods whose ends of a section are worked out within a frame. */
const QUICK: readonly RangeMethod[] = ["uniform", "sampled", "window", "two-highest", "top-k"];

/** The method whose ends the range chart draws, where it can follow a hand. */
function methodsInView(
  { ranges }: Analysis,
  { station, section, ranges: place }: Focus,
): readonly RangeMethod[] | undefined {
  if (station !== "ranges") return undefined;
  const leading = ranges.ends.find((end) => end.section === section?.name)?.method;
  const shown = QUICK.filter((method) => method === (place.method ?? leading));
  return shown.length === 0 ? undefined : shown;
}

/** The findings with the one in focus told anew: the others stand until the whole is worked out. */
function followedFindings(all: readonly Finding[], analysis: Analysis, focus: Focus): readonly Finding[] {
  const old = findingOf(all, focus);
  const now = findingAnew(analysis, focus);
  return old === undefined || now === undefined
    ? all
    : all.map((finding) => (finding === old ? now : finding));
}

function findingAnew(analysis: Analysis, { station, section, set }: Focus): Finding | undefined {
  if (section === undefined) return undefined;
  if (station === "markers") return markersFinding(analysis, section);
  if (station === "ranges") return rangesFinding(analysis, section);
  return station === "timing" && set !== undefined ? timingFinding(analysis, section, set.set) : undefined;
}
