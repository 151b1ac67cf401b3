import { binomialUpperTail } from "../numeric/binomial.ts";

/** A stretch of section, in effective metres. */
export interface Stretch {
  readonly low: number;
  readonly high: number;
}

export interface Clustering {
  /** Last finds inside the windows. */
  readonly count: number;
  /** Last finds inside the zone. */
  readonly taxa: number;
  /** Share of the zone inside the windows. */
  readonly share: number;
  readonly binomialP: number;
  readonly shiftP: number;
}

/**
 * Do last finds cluster just below surfaces? Closed windows are clipped to the declared zone, their overlaps counted once, and last
 * finds outside the zone left out. `binomialP`: P(Binomial(taxa, share) >= count). `shiftP`: all windows slide together on
 * the zone taken as a ring; exact share of the shifts that hold at least as many last finds, which keeps the spacing of
 * the surfaces and the clumping of the last finds.
 *
 * Assumes that the zone was declared before the last finds were seen. Undefined where the zone has no length or no last
 * find. The problem: S. M. Holland 1995, Paleobiology 21:92-109; the tests are ours.
 */
export function surfaceClustering(
  lasts: readonly number[],
  windows: readonly Stretch[],
  zone: Stretch,
): Clustering | undefined {
  const length = zone.high - zone.low;
  const inZone = lasts.filter((last) => zone.low <= last && last <= zone.high);
  if (!(length > 0) || inZone.length === 0) return undefined;
  const united = clippedUnion(windows, zone);
  const count = inZone.filter((last) => united.some(({ low, high }) => low <= last && last <= high)).length;
  const share = united.reduce((sum, { low, high }) => sum + high - low, 0) / length;
  return {
    count,
    taxa: inZone.length,
    share,
    binomialP: binomialUpperTail(count, inZone.length, Math.min(1, share)),
    shiftP: shareOfShifts(inZone, united, { length, count }),
  };
}

function clippedUnion(windows: readonly Stretch[], zone: Stretch): readonly Stretch[] {
  const clipped = windows
    .map(({ low, high }) => ({ low: Math.max(zone.low, low), high: Math.min(zone.high, high) }))
    .filter(({ low, high }) => low <= high)
    .toSorted((a, b) => a.low - b.low);
  const united: { low: number; high: number }[] = [];
  for (const { low, high } of clipped) {
    const before = united[united.length - 1];
    if (before !== undefined && low <= before.high) before.high = Math.max(before.high, high);
    else united.push({ low, high });
  }
  return united;
}

interface Ring {
  readonly length: number;
  readonly count: number;
}

/** Between the shifts at which a last find enters or leaves a window the count stays the same. */
function shareOfShifts(
  lasts: readonly number[],
  windows: readonly Stretch[],
  { length, count }: Ring,
): number {
  if (count === 0) return 1;
  const wrapped = (x: number) => x - length * Math.floor(x / length);
  const breaks = lasts.flatMap((last) =>
    windows.flatMap(({ low, high }) => [wrapped(last - high), wrapped(last - low)]),
  );
  const edges = [0, ...breaks.toSorted((a, b) => a - b), length];
  let held = 0;
  for (let i = 1; i < edges.length; i++) {
    const middle = 0.5 * (edges[i - 1] + edges[i]);
    const inside = lasts.filter((last) =>
      windows.some(({ low, high }) => wrapped(last - middle - low) <= high - low),
    ).length;
    if (inside >= count) held += edges[i] - edges[i - 1];
  }
  return Math.min(1, held / length);
}
