import { Moon, Sun } from "lucide-react";
import type { ReactElement } from "react";
import { type Action, isDark } from "../state/actions.ts";
import { usePage } from "../state/page-context.ts";
import styles from "./header.module.css";
import { OpenStudyMenu } from "./open-study-menu.tsx";
import { StationsLine } from "./stations-line.tsx";

export function Header({ actions }: { readonly actions: readonly Action[] }): ReactElement {
  const { state, dispatch, study } = usePage();
  const name = study.readOut?.study.name;
  const theme = actions.find(({ id }) => id === "theme");
  return (
    <header className={styles.header}>
      <h1 className={styles.study} title={name}>
        {name ?? "Lastbed"}
      </h1>
      <StationsLine />
      <div className={styles.tools}>
        <OpenStudyMenu />
        <button
          type="button"
          className={styles.goTo}
          onClick={() => dispatch({ kind: "go-to-turned", isOpen: true })}
        >
          Go to…
        </button>
        {theme && (
          <button
            type="button"
            className={styles.round}
            aria-label={theme.label}
            title={theme.label}
            onClick={theme.act}
          >
            {isDark(state.theme) ? <Sun aria-hidden size={16} /> : <Moon aria-hidden size={16} />}
          </button>
        )}
      </div>
    </header>
  );
}
