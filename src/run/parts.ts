/**
 * A value taken apart, so that it goes to the page in many small messages instead of one that holds the hand up: long
 * lists are sent before it, in parts, and stand in it as their number.
 */
export interface Parted {
  readonly rest: unknown;
  /** True where lists of their own stand in it. */
  readonly isParted: boolean;
}

/** Some of a list's items, to be put behind those sent before. */
export interface Part extends Parted {
  readonly list: number;
}

/** Values in one part: some milliseconds to take in. */
const MOST_VALUES = 4000;

/** A list, or a map's entries, sent in parts. */
class SentList {
  readonly sentList: number;
  readonly isMap: boolean;

  constructor(sentList: number, isMap: boolean) {
    this.sentList = sentList;
    this.isMap = isMap;
  }
}

interface Weighed {
  readonly value: unknown;
  readonly weight: number;
}

/**
 * Takes values of plain data, arrays and maps apart; parts are sent in an order in which each can be put together at
 * once. What one value shares with an earlier one is sent once.
 */
export function takeApart(send: (part: Part) => void): (value: unknown) => Parted {
  const known = new Map<unknown, Weighed>();
  let lists = 0;
  const apart = (one: unknown): Weighed => {
    if (typeof one !== "object" || one === null || ArrayBuffer.isView(one)) return { value: one, weight: 1 };
    const earlier = known.get(one);
    if (earlier !== undefined) return earlier;
    const weighed =
      one instanceof Map
        ? listApart([...one], true, one)
        : Array.isArray(one)
          ? listApart(one, false, one)
          : recordApart(one);
    known.set(one, weighed);
    return weighed;
  };
  const recordApart = (record: object): Weighed => {
    const entries = Object.entries(record).map(([name, own]) => [name, own, apart(own)] as const);
    const weight = entries.reduce((sum, [, , part]) => sum + part.weight, 1);
    const isWhole = entries.every(([, own, part]) => own === part.value);
    return {
      weight,
      value: isWhole ? record : Object.fromEntries(entries.map(([name, , part]) => [name, part.value])),
    };
  };
  const listApart = (items: readonly unknown[], isMap: boolean, whole: object): Weighed => {
    const parts = items.map(apart);
    const weight = parts.reduce((sum, part) => sum + part.weight, 1);
    const isWhole = parts.every((part, at) => part.value === items[at]);
    if (weight <= MOST_VALUES && (isWhole || !isMap))
      return { weight, value: isWhole ? whole : parts.map((part) => part.value) };
    const list = lists++;
    for (const group of groupsOf(parts)) send({ list, ...partedOf(group.map((part) => part.value)) });
    return { weight: 1, value: new SentList(list, isMap) };
  };
  return (value) => partedOf(apart(value).value);
}

const partedOf = (rest: unknown): Parted => ({ rest, isParted: holdsSent(rest) });

function holdsSent(value: unknown): boolean {
  if (typeof value !== "object" || value === null || ArrayBuffer.isView(value)) return false;
  if (value instanceof SentList) return true;
  return (value instanceof Map ? [...value.values()] : Object.values(value)).some(holdsSent);
}

function* groupsOf(parts: readonly Weighed[]): Generator<readonly Weighed[]> {
  let group: Weighed[] = [];
  let weight = 0;
  for (const part of parts) {
    group.push(part);
    weight += part.weight;
    if (weight < MOST_VALUES) continue;
    yield group;
    [group, weight] = [[], 0];
  }
  yield group;
}

/** Puts together what `takeApart` took apart: parts as they come, then the rest. */
export function putTogether(): {
  readonly take: (part: Part) => void;
  readonly whole: (rest: Parted) => unknown;
} {
  const lists = new Map<number, unknown[]>();
  const maps = new Map<number, ReadonlyMap<unknown, unknown>>();
  const restored = (value: unknown): unknown => {
    if (typeof value !== "object" || value === null || ArrayBuffer.isView(value)) return value;
    if ("sentList" in value && typeof value.sentList === "number" && "isMap" in value)
      return value.isMap === true ? mapOf(value.sentList) : lists.get(value.sentList);
    if (value instanceof Map) return new Map(Array.from(value, ([key, own]) => [key, restored(own)]));
    if (Array.isArray(value)) return value.map(restored);
    return Object.fromEntries(Object.entries(value).map(([name, own]) => [name, restored(own)]));
  };
  const mapOf = (list: number) => {
    const map =
      maps.get(list) ?? new Map((lists.get(list) ?? []).flatMap((entry) => (isEntry(entry) ? [entry] : [])));
    maps.set(list, map);
    return map;
  };
  const whole = ({ rest, isParted }: Parted) => (isParted ? restored(rest) : rest);
  return {
    take: (part) => {
      const items = whole(part);
      const list = lists.get(part.list) ?? [];
      lists.set(part.list, list);
      if (Array.isArray(items)) for (const item of items) list.push(item);
    },
    whole,
  };
}

const isEntry = (entry: unknown): entry is readonly [unknown, unknown] =>
  Array.isArray(entry) && entry.length === 2;
