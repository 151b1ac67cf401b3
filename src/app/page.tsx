import { type ReactElement, useEffect, useMemo, useReducer } from "react";
import { FocusLine } from "./focus/focus-line.tsx";
import { Status } from "./footer/status.tsx";
import { GoTo } from "./go-to/go-to.tsx";
import { Header } from "./header/header.tsx";
import { WorkBar } from "./header/work-bar.tsx";
import { KeepingBar } from "./keeping/keeping-bar.tsx";
import { useKeeping } from "./keeping/use-keeping.ts";
import styles from "./page.module.css";
import { actionsOf } from "./state/actions.ts";
import { type PageContents, PageProvider } from "./state/page-context.ts";
import { type PageState, step } from "./state/page-state.ts";
import { placeOf } from "./state/place.ts";
import { keptTheme, useTheme } from "./state/theme.ts";
import { usePlace } from "./state/use-place.ts";
import { useShortcuts } from "./state/use-shortcuts.ts";
import { Station } from "./station.tsx";
import { bundledStudy } from "./study/bundled-study.ts";
import { DropTarget } from "./study/drop-target.tsx";
import { PasteTable } from "./study/paste-table.tsx";
import { useReworking } from "./study/use-reworking.ts";
import { useStudy } from "./study/use-study.ts";
import { NO_HISTORY } from "./tables/history.ts";
import { NO_TRIAL } from "./trial/trial.ts";
import { useOpened } from "./trial/use-opened.ts";

const opening = (): PageState => ({
  place: placeOf(location.hash),
  isMarginOpen: true,
  isGoToOpen: false,
  isLogOpen: matchMedia("(min-width: 901px)").matches,
  theme: keptTheme(),
  work: { kind: "idle" },
  history: NO_HISTORY,
  trial: NO_TRIAL,
  beside: {},
});

/** The whole page: one line of stations, one focus, a plate with its margin, and what lies under the reading line. */
export function Page(): ReactElement {
  const [state, dispatch] = useReducer(step, undefined, opening);
  const study = useStudy(dispatch);
  const go = usePlace(state.place, dispatch);
  const { readOut, open: openStudy } = study;

  useEffect(() => openStudy("the example", bundledStudy), [openStudy]);
  useTheme(state.theme);
  useReworking(state.history, study);
  const keeping = useKeeping(state.history, study, dispatch);

  const open = useOpened(state, study, dispatch);
  const page = useMemo<PageContents>(
    () => ({ state, dispatch, go, study, keeping, open }),
    [state, go, study, keeping, open],
  );
  const actions = useMemo(() => actionsOf(page), [page]);
  useShortcuts(actions, () => dispatch({ kind: "go-to-turned", isOpen: true }));

  useEffect(() => {
    document.title = readOut === undefined ? "Lastbed" : `${readOut.study.name} · Lastbed`;
  }, [readOut]);

  return (
    <PageProvider value={page}>
      <DropTarget>
        <div className={styles.page}>
          <Header actions={actions} />
          <FocusLine />
          <div>
            <WorkBar />
            <KeepingBar />
          </div>
          <Station />
          <Status />
        </div>
        <GoTo actions={actions} />
        <PasteTable />
      </DropTarget>
    </PageProvider>
  );
}
