import { PATTERN_TILES, type PatternId } from "./pattern-tiles.ts";

export interface Lithology {
  /** The word as the bed has it. */
  readonly term: string;
  /** Absent for a word outside the table: the bed is drawn plain and named. */
  readonly pattern?: PatternId;
  readonly fgdc?: number;
  /** How far the bed stands out of a weathered face, 0 to 1. */
  readonly weathering: number;
}

interface Entry {
  readonly pattern: PatternId;
  readonly weathering: number;
  readonly words: readonly string[];
}

/** Field words by pattern. Of several that fit a description the longest decides, so "marly limestone" is not "limestone". */
const ENTRIES: readonly Entry[] = [
  { pattern: "conglomerate", weathering: 0.9, words: ["conglomerate", "gravel", "gravelstone"] },
  { pattern: "breccia", weathering: 0.9, words: ["breccia", "coarse ejecta"] },
  { pattern: "sandstone", weathering: 0.8, words: ["sand", "sandstone", "massive sandstone"] },
  { pattern: "bedded-sandstone", weathering: 0.8, words: ["bedded sandstone", "laminated sandstone"] },
  { pattern: "siltstone", weathering: 0.6, words: ["silt", "siltstone", "mudstone", "silty shale"] },
  { pattern: "clay", weathering: 0.42, words: ["clay", "claystone", "shale", "boundary clay", "clay shale"] },
  { pattern: "marl", weathering: 0.66, words: ["marl", "marlstone", "calcareous shale", "calcareous clay"] },
  { pattern: "black-shale", weathering: 0.46, words: ["black shale", "carbonaceous shale", "oil shale"] },
  { pattern: "chalk", weathering: 0.8, words: ["chalk"] },
  {
    pattern: "limestone",
    weathering: 1,
    words: ["limestone", "micrite", "packstone", "wackestone", "grainstone"],
  },
  { pattern: "sandy-limestone", weathering: 0.96, words: ["sandy limestone"] },
  {
    pattern: "marly-limestone",
    weathering: 0.86,
    words: ["marly limestone", "argillaceous limestone", "shaly limestone"],
  },
  { pattern: "cherty-limestone", weathering: 1, words: ["cherty limestone"] },
  { pattern: "dolomite", weathering: 1, words: ["dolomite", "dolostone"] },
  { pattern: "chert", weathering: 1, words: ["chert", "bedded chert", "radiolarite"] },
  { pattern: "coal", weathering: 0.36, words: ["coal", "lignite"] },
  { pattern: "bentonite", weathering: 0.4, words: ["bentonite", "altered ash"] },
  { pattern: "tuff", weathering: 0.56, words: ["tuff", "ash", "volcanic ash", "tuffite"] },
  { pattern: "crystal-tuff", weathering: 0.6, words: ["crystal tuff"] },
];

const PLAIN_WEATHERING = 0.7;
const BY_WORD = new Map(ENTRIES.flatMap((entry) => entry.words.map((word) => [word, entry] as const)));
const WORDS_LONGEST_FIRST = Array.from(BY_WORD.keys()).toSorted((a, b) => b.length - a.length);

/** What a bed's lithology word is drawn as. */
export function lithologyOf(term: string): Lithology {
  const plain = ` ${term
    .toLowerCase()
    .replaceAll(/[^a-z]+/g, " ")
    .trim()} `;
  const word = WORDS_LONGEST_FIRST.find((candidate) => plain.includes(` ${candidate} `));
  const entry = word === undefined ? undefined : BY_WORD.get(word);
  if (entry === undefined) return { term, weathering: PLAIN_WEATHERING };
  const { fgdc } = { fgdc: undefined, ...PATTERN_TILES[entry.pattern] };
  return {
    term,
    pattern: entry.pattern,
    weathering: entry.weathering,
    ...(fgdc === undefined ? {} : { fgdc }),
  };
}

/** Letters that stand in the beds whose words the table does not know: term by term, in order of first use. */
export function plainLetters(terms: readonly string[]): ReadonlyMap<string, string> {
  const unknown = [...new Set(terms)].filter((term) => lithologyOf(term).pattern === undefined);
  return new Map(unknown.map((term, i) => [term, String.fromCharCode(97 + (i % 26))]));
}
