import { defaultSettings, type Settings } from "../../core/study/settings.ts";
import type { Station } from "../../report/findings/finding.ts";
import { percent } from "../../report/wordings/numbers.ts";
import { plural } from "../../report/wordings/words.ts";

export interface ChoiceInForce {
  /** Its path in settings.json. */
  readonly setting: string;
  readonly words: string;
  readonly isChanged: boolean;
}

interface Wording {
  readonly stations: readonly Station[];
  readonly words: (settings: Settings) => string;
}

const minus = (value: number) => String(value).replace("-", "−");

/** The one table of how settings read beside a plate. */
const wordings: Readonly<Record<string, Wording>> = {
  confidence: {
    stations: ["markers", "fence", "ranges", "timing"],
    words: (s) => `${percent(s.confidence)} intervals`,
  },
  "taxa.reworked": {
    stations: ["tables", "ranges", "timing"],
    words: ({ taxa }) =>
      ({
        exclude: "Reworked and suspected out",
        "exclude-yes": "Reworked out, suspected in",
        include: "Reworked in",
      })[taxa.reworked],
  },
  "taxa.identification": {
    stations: ["tables", "ranges", "timing"],
    words: ({ taxa }) => (taxa.identification === "strict" ? "Strict names" : "Inclusive names"),
  },
  "taxa.doubtful": {
    stations: ["tables", "ranges", "timing"],
    words: ({ taxa }) => (taxa.doubtful === "exclude" ? "Doubtful finds out" : "Doubtful finds in"),
  },
  "taxa.minimumHorizons": {
    stations: ["ranges", "timing"],
    words: ({ taxa }) => `n ≥ ${taxa.minimumHorizons}`,
  },
  "boundary.horizon": {
    stations: ["markers", "fence", "timing"],
    words: ({ boundary }) => `Main horizon: ${boundary.horizon ?? "as placed"}`,
  },
  "boundary.same": {
    stations: ["markers", "fence"],
    words: ({ boundary }) =>
      boundary.same.length === 0
        ? "No found horizons joined"
        : boundary.same
            .map(({ name, horizons }) => `${name} = ${plural(horizons.length, "horizon")}`)
            .join("; "),
  },
  "ranges.methods": {
    stations: ["ranges", "timing"],
    words: ({ ranges }) => `Leading method: ${ranges.methods[0] ?? "none"}`,
  },
  "ranges.base": {
    stations: ["ranges", "timing"],
    words: ({ ranges }) => `Base: ${ranges.base === "first" ? "first find" : ranges.base}`,
  },
  "ranges.recovery": {
    stations: ["ranges", "timing"],
    words: ({ ranges }) =>
      ({
        uniform: "Recovery even where searched",
        effort: "Recovery from search effort",
        facies: "Recovery from facies",
        table: "Recovery from recovery.csv",
        trend: "Recovery from a fitted trend",
      })[ranges.recovery],
  },
  "timing.window": {
    stations: ["timing"],
    words: ({ timing: { window } }) => `Window ${minus(window[0])} to ${minus(window[1])} m`,
  },
  "timing.startBelow": {
    stations: ["ranges", "timing"],
    words: ({ timing }) => `Starts below ${minus(timing.startBelow)} m`,
  },
  "timing.durationHorizons": {
    stations: ["timing"],
    words: ({ timing }) => `Duration from taxa with n ≥ ${timing.durationHorizons}`,
  },
  "alignment.horizons": {
    stations: ["fence"],
    words: ({ alignment }) =>
      alignment.horizons.length === 0
        ? "Hung on the main horizon alone"
        : `Hung on ${alignment.horizons.join(", ")}`,
  },
  "alignment.reference": { stations: ["fence"], words: ({ alignment }) => `Scale: ${alignment.reference}` },
  "alignment.beyond": {
    stations: ["fence"],
    words: ({ alignment }) => `Beyond the horizons: ${alignment.beyond}`,
  },
};

export function choicesFor(station: Station, settings: Settings): readonly ChoiceInForce[] {
  return Object.entries(wordings)
    .filter(([, { stations }]) => stations.includes(station))
    .map(([setting, { words }]) => ({
      setting,
      words: words(settings),
      isChanged: JSON.stringify(at(settings, setting)) !== JSON.stringify(at(defaultSettings, setting)),
    }));
}

function at(settings: unknown, path: string): unknown {
  let value = settings;
  for (const key of path.split(".")) {
    if (typeof value !== "object" || value === null) return undefined;
    value = Reflect.get(value, key);
  }
  return value;
}
