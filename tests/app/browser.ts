import { existsSync } from "node:fs";
import { delimiter, join } from "node:path";
import { type Browser, chromium } from "playwright-core";

const PLACES = [
  "/usr/bin/chromium",
  "/usr/bin/chromium-browser",
  "/usr/bin/google-chrome",
  "/usr/bin/google-chrome-stable",
  "/snap/bin/chromium",
  "/Applications/Google Chrome.app/Contents/MacOS/Google Chrome",
  "/Applications/Chromium.app/Contents/MacOS/Chromium",
  "C:\\Program Files\\Google\\Chrome\\Application\\chrome.exe",
  "C:\\Program Files (x86)\\Google\\Chrome\\Application\\chrome.exe",
];
const NAMES = ["chromium", "chromium-browser", "google-chrome", "google-chrome-stable"];

/** The installed Chromium or Chrome, or the one that LASTBED_BROWSER names; undefined where there is none. */
export function findBrowser(): string | undefined {
  const named = process.env.LASTBED_BROWSER;
  if (named !== undefined && named !== "") return existsSync(named) ? named : undefined;
  const onPath = (process.env.PATH ?? "")
    .split(delimiter)
    .flatMap((folder) => NAMES.map((name) => join(folder, name)));
  return [...PLACES, ...onPath].find((path) => existsSync(path));
}

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
