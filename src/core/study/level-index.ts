/** Levels nearer than this are one level, metres. */
export const LEVEL_TOLERANCE_M = 1e-9;

/** Things kept by level, so that those at one level are found without looking at all of them. */
export interface LevelIndex<T> {
  readonly add: (heightM: number, thing: T) => void;
  /** What was added within the tolerance of a level, in no order that means anything. */
  readonly at: (heightM: number) => readonly T[];
}

interface Entry<T> {
  readonly heightM: number;
  readonly thing: T;
}

const cellOf = (heightM: number) => Math.floor(heightM / (2 * LEVEL_TOLERANCE_M));

export function levelIndex<T>(): LevelIndex<T> {
  const cells = new Map<number, Entry<T>[]>();
  return {
    add: (heightM, thing) => {
      const cell = cellOf(heightM);
      const entries = cells.get(cell);
      if (entries === undefined) cells.set(cell, [{ heightM, thing }]);
      else entries.push({ heightM, thing });
    },
    at: (heightM) => {
      const cell = cellOf(heightM);
      return [cell - 1, cell, cell + 1].flatMap((near) =>
        (cells.get(near) ?? [])
          .filter((entry) => Math.abs(entry.heightM - heightM) <= LEVEL_TOLERANCE_M)
          .map(({ thing }) => thing),
      );
    },
  };
}
