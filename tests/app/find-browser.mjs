import { existsSync } from "node:fs";
import { delimiter, join } from "node:path";

const names = ["chromium", "chromium-browser", "google-chrome", "google-chrome-stable"];
const places = [
  "/snap/bin/chromium",
  "/Applications/Google Chrome.app/Contents/MacOS/Google Chrome",
  "/Applications/Chromium.app/Contents/MacOS/Chromium",
  "C:\\Program Files\\Google\\Chrome\\Application\\chrome.exe",
  "C:\\Program Files (x86)\\Google\\Chrome\\Application\\chrome.exe",
];

/** What a person without a browser is told. */
export const browserHint =
  "No Chromium or Chrome was found, so the tests in a real browser were skipped. Install one with\n" +
  "  sudo apt-get install -y chromium\n" +
  "or name yours in LASTBED_BROWSER.";

/**
 * The installed Chromium or Chrome, or the one that LASTBED_BROWSER names; undefined where there is none.
 * @returns {string | undefined}
 */
export function findBrowser() {
  const named = process.env.LASTBED_BROWSER;
  if (named !== undefined && named !== "") return existsSync(named) ? named : undefined;
  const folders = (process.env.PATH ?? "").split(delimiter);
  return [...folders.flatMap((folder) => names.map((name) => join(folder, name))), ...places].find((path) =>
    existsSync(path),
  );
}
