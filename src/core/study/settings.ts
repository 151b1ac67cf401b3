import * as v from "valibot";
import { suggestName } from "./nearest.ts";
import { tables } from "./tables/index.ts";

const positiveInteger = v.pipe(v.number(), v.integer(), v.minValue(1));
const share = v.pipe(v.number(), v.gtValue(0), v.ltValue(1));
const names = v.array(v.pipe(v.string(), v.nonEmpty()));
/** Words for a column that is no declared one. */
const columnWords = ["taxon", "unused"];
const columnNames = [...new Set([...columnWords, ...tables.flatMap(({ columns }) => Object.keys(columns))])];
const columnName = v.pipe(
  v.string(),
  v.check(
    (name) => columnNames.includes(name),
    ({ input }) => {
      const nearest = suggestName(input, columnNames);
      return `a declared column, taxon or unused${nearest === undefined ? "" : ` (did you mean ${nearest}?)`}`;
    },
  ),
);
const says = <T extends v.GenericSchema>(schema: T, words: string) => v.pipe(schema, v.description(words));

/** The one declaration of every setting: its type, its default where absent, its words. */
export const settingsSchema = v.strictObject({
  seed: says(
    v.optional(v.pipe(v.number(), v.safeInteger(), v.minValue(0)), 1),
    "seed of every random stream",
  ),
  confidence: says(v.optional(share, 0.95), "level of every interval"),
  replicates: says(v.optional(positiveInteger, 20000), "replicates of every simulation"),
  tables: says(
    v.optional(
      v.record(
        v.string(),
        v.strictObject({
          decimal: v.optional(v.picklist(["point", "comma"])),
          delimiter: v.optional(v.picklist(["comma", "semicolon", "tab", "bar"])),
          encoding: v.optional(v.picklist(["UTF-8", "UTF-16LE", "UTF-16BE", "Windows-1252"])),
          table: v.optional(v.picklist(tables.map(({ name }) => name))),
          shape: v.optional(v.picklist(["long", "samples-down", "taxa-down"])),
          section: v.optional(v.pipe(v.string(), v.nonEmpty())),
          blank: v.optional(v.picklist(["not-found", "not-searched"])),
          codes: v.optional(
            v.record(v.string(), v.picklist(["found", "not-found", "not-searched", "doubtful", "reworked"])),
          ),
          columns: v.optional(
            v.record(
              v.string(),
              v.strictObject({
                is: v.optional(columnName),
                unit: v.optional(v.pipe(v.string(), v.nonEmpty())),
                axis: v.optional(v.picklist(["height", "depth"])),
              }),
            ),
          ),
        }),
      ),
      {},
    ),
    "by file, where it leaves them open: decimal sign, delimiter, encoding, the table it is; its section; what each column is (is, unit, axis); of a wide sheet the shape, what a blank sample says, what its codes mean",
  ),
  sections: v.optional(
    v.strictObject({
      axis: says(
        v.optional(v.picklist(["height", "depth"])),
        "axis of sections whose tables do not state one",
      ),
      unit: says(
        v.optional(v.picklist(["m", "cm", "mm", "ft"])),
        "unit of sections whose tables do not state one",
      ),
    }),
    {},
  ),
  taxa: v.optional(
    v.strictObject({
      minimumHorizons: says(v.optional(positiveInteger, 3), "horizons below which a taxon is too-few"),
      identification: says(
        v.optional(v.picklist(["strict", "inclusive"]), "strict"),
        "treatment of cf. and ?",
      ),
      reworked: says(
        v.optional(v.picklist(["exclude", "exclude-yes", "include"]), "exclude"),
        "exclude leaves out suspected too",
      ),
      doubtful: says(
        v.optional(v.picklist(["exclude", "include"]), "exclude"),
        "treatment of doubtful finds",
      ),
      faultRepeat: says(
        v.optional(v.picklist(["set-aside", "map"]), "set-aside"),
        "finds in a fault-repeated interval: set aside, or mapped to where their rock is passed first",
      ),
      scales: says(
        v.optional(v.record(v.string(), v.record(v.string(), v.number())), {}),
        "abundance legends",
      ),
    }),
    {},
  ),
  boundary: v.optional(
    v.strictObject({
      horizon: says(v.optional(v.pipe(v.string(), v.nonEmpty())), "the main horizon H and datum"),
      same: says(
        v.optional(
          v.array(
            v.strictObject({
              name: v.pipe(v.string(), v.nonEmpty()),
              horizons: v.array(v.tuple([v.string(), v.string()])),
            }),
          ),
          [],
        ),
        "found horizons declared one horizon, as [section, horizon] pairs",
      ),
      weights: says(v.optional(v.record(v.string(), v.number()), {}), "weight of each proxy in the pick"),
      picks: says(
        v.optional(
          v.array(
            v.strictObject({
              section: v.pipe(v.string(), v.nonEmpty()),
              horizon: v.pipe(v.string(), v.nonEmpty()),
              position: v.pipe(v.number(), v.finite()),
              below: v.optional(v.pipe(v.number(), v.finite(), v.minValue(0)), 0),
              above: v.optional(v.pipe(v.number(), v.finite(), v.minValue(0)), 0),
            }),
          ),
          [],
        ),
        "horizons placed by hand, in the section's own axis and unit; below and above: one standard deviation each way",
      ),
    }),
    {},
  ),
  ranges: v.optional(
    v.strictObject({
      base: says(
        v.optional(v.string(), "first"),
        "working base of a range: first find, section-bottom, or a horizon's name",
      ),
      methods: says(
        v.optional(
          v.pipe(
            v.array(
              v.picklist([
                "uniform",
                "recovery",
                "window",
                "sampled",
                "counts",
                "uniform-bayes",
                "window-trend",
                "gap-rank",
                "gap-quantile",
                "weibull-tail",
                "declining",
                "sighting-rate",
                "two-highest",
                "top-k",
              ]),
            ),
            v.nonEmpty(),
            v.check((methods) => new Set(methods).size === methods.length, "each method once"),
          ),
          [
            "sampled",
            "uniform",
            "uniform-bayes",
            "window",
            "window-trend",
            "recovery",
            "counts",
            "declining",
            "two-highest",
            "top-k",
            "weibull-tail",
            "gap-rank",
            "gap-quantile",
            "sighting-rate",
          ],
        ),
        "range-end methods, the leading one first",
      ),
      recovery: says(
        v.optional(v.picklist(["uniform", "effort", "facies", "table", "trend"]), "uniform"),
        "where the shape of recovery comes from: constant, search effort, facies, recovery.csv, or a fitted trend",
      ),
      tail: says(
        v.optional(v.pipe(v.number(), v.gtValue(0)), 1),
        "beta: near the end the density of finds falls as the distance to it to the power beta - 1",
      ),
      topFinds: says(
        v.optional(v.pipe(v.number(), v.integer(), v.minValue(2)), 5),
        "k: highest finds used by top-k",
      ),
    }),
    {},
  ),
  timing: v.optional(
    v.strictObject({
      window: says(
        v.optional(
          v.pipe(
            v.tuple([v.number(), v.number()]),
            v.check(([low, high]) => low < high, "the lower end before the upper one"),
          ),
          [-20, 15],
        ),
        "window of end levels, m from H",
      ),
      longestDuration: says(
        v.optional(v.pipe(v.number(), v.gtValue(0)), 30),
        "longest gradual disappearance thought possible, m",
      ),
      startBelow: says(v.optional(v.number(), 0), "first finds above this level, m from H, are late starts"),
      durationHorizons: says(v.optional(positiveInteger, 10), "least horizons for the duration box"),
      sets: says(v.optional(v.record(v.string(), names), {}), "declared lists of taxa"),
      steps: says(
        v.optional(v.strictObject({ early: v.optional(names, []), late: v.optional(names, []) }), {}),
        "taxa or groups declared beforehand to end in an earlier and a later step",
      ),
      pulses: says(
        v.optional(v.pipe(v.number(), v.integer(), v.minValue(1), v.maxValue(4)), 2),
        "most pulses that the scenarios go up to",
      ),
      priors: says(
        v.optional(v.record(v.string(), v.pipe(v.number(), v.minValue(0))), {}),
        "prior weight by scenario (at-horizon by horizon: `at-horizon:<name>`); equal where not named",
      ),
      horizonWeights: says(
        v.optional(v.record(v.string(), v.pipe(v.number(), v.minValue(0))), {}),
        "prior weight of each candidate horizon in among-horizons; equal where empty",
      ),
      jointScale: says(
        v.optional(v.picklist(["from-horizon", "common", "time"]), "from-horizon"),
        "scale on which sections are answered together: metres from each horizon, the common scale of the lined-up sections, or ka from each horizon by timing.rates",
      ),
      sharedError: says(
        v.optional(v.pipe(v.number(), v.finite(), v.minValue(0)), 0),
        "one standard deviation of an error that the picks of all sections share, in the unit of timing.jointScale",
      ),
      rates: says(
        v.optional(
          v.record(
            v.string(),
            v.strictObject({
              rate: v.pipe(v.number(), v.finite(), v.gtValue(0)),
              spread: v.optional(v.pipe(v.number(), v.finite(), v.minValue(0)), 0),
            }),
          ),
          {},
        ),
        "by section its rate of accumulation, m per ka, and the standard deviation of the rate's logarithm",
      ),
      contamination: says(
        v.optional(v.pipe(v.number(), v.minValue(0), v.ltValue(1)), 0),
        "chance that one find of a taxon is out of place",
      ),
      surfaces: says(
        v.optional(
          v.strictObject({
            horizons: v.optional(names, []),
            below: v.optional(v.pipe(v.number(), v.gtValue(0)), 1),
            zone: v.optional(v.tuple([v.number(), v.number()])),
          }),
          {},
        ),
        "surfaces at which last finds may cluster, the window below each (m), and the zone asked about (m from H)",
      ),
    }),
    {},
  ),
  alignment: v.optional(
    v.strictObject({
      reference: says(
        v.optional(v.string(), "consensus"),
        "consensus, or the section whose thickness is the scale",
      ),
      horizons: says(v.optional(names, []), "shared horizons to align on (empty: the main horizon alone)"),
      beyond: says(v.optional(v.picklist(["rigid", "gain"]), "rigid"), "scale beyond the outermost horizon"),
    }),
    {},
  ),
});

/** Every setting of an analysis, defaults written out. */
export type Settings = v.InferOutput<typeof settingsSchema>;

export const defaultSettings: Settings = v.parse(settingsSchema, {});
