import { type Dispatch, useEffect, useMemo, useRef, useState } from "react";
import type { Analysis } from "../../core/analysis-result.ts";
import type { SettingChange } from "../../core/study/changed-settings.ts";
import type { Sheet, Study } from "../../core/study/model.ts";
import type { Problem } from "../../core/study/problem.ts";
import { pageRunner } from "../../run/page.ts";
import { receivedSheets } from "../../run/received-study.ts";
import { keptFiles, keptHistory, studyKey } from "../keeping/kept-studies.ts";
import type { PageEvent } from "../state/page-state.ts";
import { settingEdit } from "../tables/edits.ts";
import { type GivenTable, givenTable, leavingSheets, unreadFiles } from "../tables/given-table.ts";
import { type History, heldEdits, NO_HISTORY, withStep } from "../tables/history.ts";
import { withSetting } from "./chosen-settings.ts";
import { desk } from "./desk.ts";
import { type GivenStudy, NotAStudy } from "./given-study.ts";
import { inSlices } from "./in-slices.ts";

const startWorker = () =>
  new Worker(new URL("../../run/page-worker.ts", import.meta.url), { type: "module" });

/** A study that is worked out: as it was given, its tables before any edit, and what its last analysis rests on. */
export interface WorkedOut {
  readonly given: GivenStudy;
  /** Under which its edits are kept; undefined where this browser keeps nothing. */
  readonly key: string | undefined;
  /** The edits that were kept when it was opened. */
  readonly opened: History;
  readonly sheets: readonly Sheet[];
  /** The same with what their reading left out. */
  readonly tables: readonly GivenTable[];
  readonly history: History;
  readonly analysis: Analysis;
}

/** Settings tried on a study that is worked out, and what they come to. */
export interface TriedOut {
  readonly changes: readonly SettingChange[];
  readonly base: WorkedOut;
  readonly analysis: Analysis;
}

export interface OpenStudy {
  /** The last study that was worked out; it stays until the next one is. */
  readonly workedOut: WorkedOut | undefined;
  /** Loads a study and works it out; the latest request wins. */
  readonly open: (name: string, load: (signal: AbortSignal) => Promise<GivenStudy>) => void;
  /** Works the open study out again with the edits that its history holds; never stands before a study being opened. */
  readonly rework: (history: History) => void;
  /** What the last settings tried came to. */
  readonly tried: TriedOut | undefined;
  /** Works the study out with settings that are only tried; it stays as it is. */
  readonly tryOut: (base: WorkedOut, changes: readonly SettingChange[]) => void;
  /** Gives up working out what is tried. */
  readonly stopTrying: () => void;
  /** Puts a table that the study lacks among its files; the next working out reads it. */
  readonly addFile: (name: string, text: string) => void;
  /** Changes the study's settings, keeps them with it and reads it again at once; edits stay. */
  readonly settle: (change: SettingChange) => void;
  readonly cancel: () => void;
}

export function useStudy(dispatch: Dispatch<PageEvent>): OpenStudy {
  const [workedOut, setWorkedOut] = useState<WorkedOut>();
  const latest = useRef<WorkedOut>(undefined);
  const runner = useMemo(() => pageRunner(startWorker), []);
  const current = useRef<AbortController>(undefined);
  const isOpening = useRef(false);
  const busyWith = useRef<"study" | "trial">(undefined);
  const [tried, setTried] = useState<TriedOut>();
  /** The study with settings that are not worked out yet. */
  const settled = useRef<GivenStudy>(undefined);

  useEffect(
    () => () => {
      current.current?.abort();
      void runner.close();
    },
    [runner],
  );

  const actions = useMemo(() => {
    const start = <T>(
      { name, isTrial = false }: { readonly name: string; readonly isTrial?: boolean },
      work: (signal: AbortSignal) => Promise<T>,
      take: (result: T) => void,
    ) => {
      current.current?.abort();
      const controller = new AbortController();
      current.current = controller;
      busyWith.current = isTrial ? "trial" : "study";
      dispatch({ kind: "work-began", name, isTrial });
      return work(controller.signal).then(
        (result) => {
          if (controller.signal.aborted) return;
          busyWith.current = undefined;
          take(result);
          dispatch({ kind: "work-ended" });
        },
        (error: unknown) => {
          if (controller.signal.aborted) return;
          isOpening.current = false;
          busyWith.current = undefined;
          settled.current = undefined;
          dispatch({ kind: "work-failed", message: error instanceof Error ? error.message : String(error) });
        },
      );
    };
    const begin = (name: string, work: (signal: AbortSignal) => Promise<WorkedOut>) =>
      start({ name }, work, (result) => {
        latest.current = result;
        settled.current = undefined;
        setWorkedOut(result);
        if (isOpening.current) dispatch({ kind: "study-opened", history: result.history });
        isOpening.current = false;
      });
    const analyse = async (given: GivenStudy, signal: AbortSignal) => {
      const onProgress = sparingly((step, share) => {
        if (!signal.aborted) dispatch({ kind: "work-went-on", step, share });
      });
      const result = await runner.analyse({ name: given.name, files: given.files }, { signal, onProgress });
      if (result.study.sheets.length === 0)
        throw new NotAStudy(nothingRead(given.name, result.study.problems));
      return result;
    };
    const workOut = async (given: GivenStudy, history: History, signal: AbortSignal) => {
      if (heldEdits(history).length === 0) {
        const analysis = await analyse(given, signal);
        const { sheets } = analysis.study;
        return { given, sheets, tables: await givenTables(given, analysis.study), history, analysis };
      }
      const { problems, ...read } = await desk().read(given.files);
      const sheets = receivedSheets(read.sheets);
      const tables = await givenTables(given, { sheets, problems });
      const files = await editedFiles(given, tables, history);
      const analysis = await analyse({ name: given.name, files }, signal);
      return { given, sheets, tables, history, analysis };
    };
    const open: OpenStudy["open"] = (name, load) => {
      isOpening.current = true;
      settled.current = undefined;
      void begin(name, async (signal) => {
        const { given, key, history } = await keptWork(await load(signal));
        return { key, opened: history, ...(await workOut(given, history, signal)) };
      });
    };
    const rework: OpenStudy["rework"] = (history) => {
      const now = latest.current;
      if (now === undefined || isOpening.current) return;
      const given = settled.current;
      void begin(now.analysis.study.name, async (signal) => {
        if (given !== undefined) return { ...now, ...(await workOut(given, history, signal)) };
        const files = await editedFiles(now.given, now.tables, history);
        const analysis = await analyse({ name: now.given.name, files }, signal);
        return { ...now, history, analysis };
      });
    };
    const settle: OpenStudy["settle"] = (change) => {
      const now = latest.current;
      if (now === undefined || isOpening.current) return;
      settled.current = withSetting(settled.current ?? now.given, change);
      rework(now.history);
    };
    const tryOut: OpenStudy["tryOut"] = (base, changes) => {
      if (busyWith.current === "study") return;
      const step = { label: "trying", edits: changes.map(settingEdit) };
      const { given, tables, history } = base;
      const work = async (signal: AbortSignal) => {
        const files = await editedFiles(given, tables, withStep(history, step));
        return analyse({ name: given.name, files }, signal);
      };
      const { name } = base.analysis.study;
      void start({ name, isTrial: true }, work, (analysis) => setTried({ changes, base, analysis }));
    };
    const stopTrying = () => {
      if (busyWith.current !== "trial") return;
      busyWith.current = undefined;
      current.current?.abort();
      dispatch({ kind: "work-ended" });
    };
    const addFile: OpenStudy["addFile"] = (name, text) => {
      const now = settled.current ?? latest.current?.given;
      if (now === undefined) return;
      const files = new Map([...now.files, [name, new TextEncoder().encode(text)]]);
      settled.current = { ...now, files, isSettled: true };
    };
    const cancel = () => {
      current.current?.abort();
      isOpening.current = false;
      busyWith.current = undefined;
      dispatch({ kind: "work-cancelled" });
    };
    return { open, rework, settle, cancel, tryOut, stopTrying, addFile };
  }, [dispatch, runner]);
  return useMemo(() => ({ workedOut, tried, ...actions }), [workedOut, tried, actions]);
}

/** A study with what this browser kept of it; a browser that keeps nothing is no hindrance. */
async function keptWork(given: GivenStudy): Promise<Pick<WorkedOut, "given" | "key" | "history">> {
  try {
    const key = given.key ?? (await studyKey(given));
    const history = (key && (await keptHistory(key))) || NO_HISTORY;
    const kept = key === undefined ? undefined : await keptFiles(key);
    return { given: kept === undefined ? given : { ...given, files: kept }, key, history };
  } catch {
    return { given, key: undefined, history: NO_HISTORY };
  }
}

/** The tables with what their reading left out: rows that could not be parted, and whole tables. */
async function givenTables(
  { files }: GivenStudy,
  { sheets, problems }: Pick<Study, "sheets" | "problems">,
): Promise<readonly GivenTable[]> {
  const leaving = leavingSheets(sheets, problems);
  const unread = unreadFiles(sheets, problems);
  const isWhole = leaving.length === 0 && unread.length === 0;
  const left = isWhole ? undefined : await desk().leftOut(files, leaving, unread);
  const tables: GivenTable[] = [];
  for (const sheet of sheets)
    tables.push(givenTable(sheet, await inSlices(sheet.rows), left?.rows.get(sheet.file)));
  return [...tables, ...(left?.tables ?? [])];
}

/** The files to work out: the edits made, each row counted as the page counts it. */
function editedFiles({ files }: GivenStudy, tables: readonly GivenTable[], history: History) {
  const edits = heldEdits(history);
  if (edits.length === 0) return files;
  const forms = tables.map(({ file, headers, dialect }) => ({ file, headers, dialect }));
  return desk().edited(files, edits, { forms, keepsRowNumbers: true });
}

/** Lets through a new step, or one more hundredth of the same. */
function sparingly(tell: (step: string, share: number) => void): typeof tell {
  let last = { step: "", hundredth: -1 };
  return (step, share) => {
    const hundredth = Math.floor(100 * share);
    if (step === last.step && hundredth === last.hundredth) return;
    last = { step, hundredth };
    tell(step, share);
  };
}

function nothingRead(name: string, problems: readonly Problem[]): string {
  const [first] = problems;
  const reason = first === undefined ? "" : ` ${first.file}: expected ${first.expected}. ${first.mend}`;
  return `${name} is not a study: none of its files could be read as a table.${reason}`;
}
