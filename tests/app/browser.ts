import { type Browser, chromium } from "playwright-core";
import { findBrowser } from "./find-browser.mjs";

const FLAGS = [
  "--no-sandbox",
  "--disable-gpu",
  "--disable-quic",
  "--no-first-run",
  "--disable-background-networking",
  "--disable-component-update",
  "--disable-sync",
];

/** Starts the browser without a window, with a profile of its own that it leaves behind nowhere. */
export function startBrowser(): Promise<Browser> {
  const executablePath = findBrowser();
  if (executablePath === undefined)
    throw new Error(
      "startBrowser: expected an installed Chromium or Chrome, found none (set LASTBED_BROWSER)",
    );
  return chromium.launch({ executablePath, headless: true, args: FLAGS });
}
