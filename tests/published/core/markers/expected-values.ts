interface Row {
  readonly case: string;
  readonly expected: unknown;
}

/** Reads expected values of a table of cases, found by the start of their name and a path inside the value. */
export function expectedValues(rows: readonly Row[]) {
  const valueAt = (start: string, path: readonly string[]): unknown => {
    const row = rows.find((r) => r.case.startsWith(start));
    if (row === undefined) throw new Error(`no case ${start}`);
    return path.reduce(step, row.expected);
  };
  return {
    number: (start: string, ...path: readonly string[]): number => numberOf(valueAt(start, path)),
    numbers: (start: string, ...path: readonly string[]): readonly number[] =>
      numbersOf(valueAt(start, path)),
    table: (start: string, ...path: readonly string[]): readonly (readonly number[])[] =>
      listOf(valueAt(start, path)).map(numbersOf),
  };
}

function step(value: unknown, key: string): unknown {
  if (typeof value !== "object" || value === null) throw new Error(`no ${key}`);
  return new Map<string, unknown>(Object.entries(value)).get(key);
}

function listOf(value: unknown): readonly unknown[] {
  if (!Array.isArray(value)) throw new Error(`expected a list, got ${String(value)}`);
  return value;
}

function numbersOf(value: unknown): readonly number[] {
  return listOf(value).map(numberOf);
}

function numberOf(value: unknown): number {
  if (typeof value !== "number") throw new Error(`expected a number, got ${String(value)}`);
  return value;
}
