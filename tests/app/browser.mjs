import { accessSync, constants } from "node:fs";
import { delimiter, join } from "node:path";

const names = ["chromium", "chromium-browser", "google-chrome", "google-chrome-stable", "chrome"];
const places = [
  "/Applications/Google Chrome.app/Contents/MacOS/Google Chrome",
  "/Applications/Chromium.app/Contents/MacOS/Chromium",
  "C:\\Program Files\\Google\\Chrome\\Application\\chrome.exe",
];

/** What a person without a browser is told. */
export const BROWSER_HINT =
  "No Chromium or Chrome found: the tests in a real browser were skipped. Install one with:\n" +
  "  sudo apt-get install -y chromium   (Debian, Ubuntu), or install Google Chrome";

/**
 * The path of an installed Chromium or Chrome; CHROME_PATH comes first.
 * @returns {string | undefined}
 */
export function findBrowser() {
  const folders = (process.env.PATH ?? "").split(delimiter);
  const candidates = [
    ...(process.env.CHROME_PATH ? [process.env.CHROME_PATH] : []),
    ...folders.flatMap((folder) => names.map((name) => join(folder, name))),
    ...places,
  ];
  return candidates.find(isExecutable);
}

function isExecutable(path) {
  try {
    accessSync(path, constants.X_OK);
    return true;
  } catch {
    return false;
  }
}
