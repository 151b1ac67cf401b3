import type { Recognition } from "../../../core/study/recognised.ts";

const ways = {
  name: "its name",
  synonym: "a usual name",
  "darwin-core": "a Darwin Core term",
  "other-language": "its name",
  content: "its content: look",
  chosen: "chosen",
} as const;

/** How it was told what a column is, in words. */
export function wayOf({ by, language, is }: Recognition): string {
  if (by === undefined) return is === "trait" ? "a further column" : "not known";
  return by === "other-language" && language !== undefined ? `its name in ${language}` : ways[by];
}

/** What a unit was told by, in words; blank where the header itself shows it. */
export const unitWayOf = ({ unitBy }: Recognition): string =>
  unitBy === "section" ? "as its section" : unitBy === "chosen" ? "chosen" : "";
