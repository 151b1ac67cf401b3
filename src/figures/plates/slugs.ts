const LONGEST = 48;

/** A name as a part of a file name or id: lower-case letters, digits and hyphens; empty where it holds none. */
function slug(name: string): string {
  return name
    .slice(0, 4 * LONGEST)
    .normalize("NFKD")
    .replaceAll(/\p{M}/gu, "")
    .toLowerCase()
    .replaceAll(/[^a-z0-9]+/g, "-")
    .slice(0, LONGEST)
    .replaceAll(/^-+|-+$/g, "");
}

/** Each name's own slug, in the order given; names that would share one are numbered. */
export function slugs(names: readonly string[], stem: string): ReadonlyMap<string, string> {
  const given = new Map<string, string>();
  const taken = new Set<string>();
  for (const name of names) {
    if (given.has(name)) continue;
    const first = slug(name) || stem;
    let own = first;
    for (let number = 2; taken.has(own); number++) own = `${first}-${number}`;
    taken.add(own);
    given.set(name, own);
  }
  return given;
}

/** The slug of one of the names. */
export function slugOf(name: string, names: readonly string[], stem: string): string {
  return slugs(names, stem).get(name) ?? stem;
}
