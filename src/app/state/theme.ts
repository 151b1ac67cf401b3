import { useEffect } from "react";
import type { Theme } from "./page-state.ts";

const KEY = "lastbed-theme";

/** The theme a person chose before; where the browser keeps nothing, that of the system. */
export function keptTheme(): Theme {
  try {
    const kept = localStorage.getItem(KEY);
    return kept === "light" || kept === "dark" ? kept : "system";
  } catch {
    return "system";
  }
}

export function useTheme(theme: Theme): void {
  useEffect(() => {
    if (theme === "system") delete document.documentElement.dataset.theme;
    else document.documentElement.dataset.theme = theme;
    try {
      if (theme === "system") localStorage.removeItem(KEY);
      else localStorage.setItem(KEY, theme);
    } catch {
      // A browser that keeps nothing still shows the theme.
    }
  }, [theme]);
}
