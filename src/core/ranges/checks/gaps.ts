/** Gaps between a taxon's successive finds, from below upward, in effective metres. */
export function gapsOf(levels: readonly number[]): readonly number[] {
  return levels.slice(1).map((level, i) => level - levels[i]);
}
