import { type Dispatch, useCallback, useEffect, useMemo, useState } from "react";
import type { PageEvent } from "../state/page-state.ts";
import type { OpenStudy } from "../study/use-study.ts";
import type { History } from "../tables/history.ts";
import {
  forget,
  type KeptName,
  keep,
  keepSnapshot,
  keptNames,
  keptStudy,
  removeSnapshot,
  type Snapshot,
  snapshotsOf,
} from "./kept-studies.ts";
import { useHold } from "./use-hold.ts";

export interface Keeping {
  /** The open study's key; undefined where nothing can be kept. */
  readonly key: string | undefined;
  readonly hold: "held" | "elsewhere" | undefined;
  /** When the edits were last written. */
  readonly at?: number;
  /** Why the last writing failed. */
  readonly fault?: string;
  readonly names: readonly KeptName[];
  readonly snapshots: readonly Snapshot[];
  readonly open: (kept: KeptName) => void;
  readonly forget: (kept: KeptName) => void;
  readonly takeSnapshot: (name: string) => void;
  readonly goBackTo: (snapshot: Snapshot) => void;
  readonly removeSnapshot: (snapshot: Snapshot) => void;
}

interface KeptLists {
  readonly names: readonly KeptName[];
  readonly snapshots: readonly Snapshot[];
}

const keptLists = async (key: string | undefined): Promise<KeptLists> => ({
  names: await keptNames(),
  snapshots: key === undefined ? [] : await snapshotsOf(key),
});

/** Keeps the edits of the open study in this browser as they are made. */
export function useKeeping(history: History, study: OpenStudy, dispatch: Dispatch<PageEvent>): Keeping {
  const { readOut, open: openStudy } = study;
  const { key, given, opened } = readOut ?? {};
  const hold = useHold(key);
  const [written, setWritten] = useState<{ readonly at?: number; readonly fault?: string }>({});
  const [{ names, snapshots }, setKept] = useState<KeptLists>({ names: [], snapshots: [] });

  const fail = useCallback((error: unknown) => setWritten({ fault: String(error) }), []);
  const look = useCallback(() => keptLists(key).then(setKept, fail), [key, fail]);

  useEffect(() => void look(), [look]);

  useEffect(() => {
    const hasNews = given?.isSettled === true || (history !== opened && history.steps.length > 0);
    if (key === undefined || given === undefined || hold !== "held" || !hasNews) return;
    keep(key, given, history)
      .then((at) => {
        setWritten({ at });
        return look();
      })
      .catch(fail);
  }, [key, given, opened, hold, history, look, fail]);

  const actions = useMemo(() => {
    const then = (work: Promise<unknown>) => void work.then(look).catch(fail);
    const snapshot = (name: string) =>
      key === undefined ? Promise.resolve() : keepSnapshot({ key, name, history });
    return {
      open: (kept: KeptName) => openStudy(kept.name, () => keptStudy(kept.key)),
      forget: (kept: KeptName) => then(forget(kept.key)),
      takeSnapshot: (name: string) => then(snapshot(name)),
      goBackTo: (to: Snapshot) => {
        then(snapshot(`before going back to “${to.name}”`));
        dispatch({ kind: "history-set", history: to.history });
      },
      removeSnapshot: ({ id }: Snapshot) => id !== undefined && then(removeSnapshot(id)),
    };
  }, [key, history, look, fail, openStudy, dispatch]);

  return useMemo(
    () => ({ key, hold, ...written, names, snapshots, ...actions }),
    [key, hold, written, names, snapshots, actions],
  );
}
