interface Block {
  readonly members: number[];
  sum: number;
}

/**
 * Moves labels as little as possible (least squares) so that neighbours stand at least `gap` apart and, where there is room, within
 * `bounds`. Positions come back in the order given. Pool adjacent violators on the positions less their minimum spacing.
 */
export function spaceOut(
  positions: readonly number[],
  gap: number,
  bounds: readonly [number, number] = [-Infinity, Infinity],
): readonly number[] {
  const order = positions
    .map((_, i) => i)
    .toSorted((a, b) => (positions[a] ?? 0) - (positions[b] ?? 0) || a - b);
  const blocks: Block[] = [];
  order.forEach((index, rank) => {
    blocks.push({ members: [index], sum: (positions[index] ?? 0) - rank * gap });
    pool(blocks);
  });
  const [low, high] = bounds;
  const highest = Math.max(low, high - (positions.length - 1) * gap);
  const placed = positions.map(() => 0);
  let rank = 0;
  for (const { members, sum } of blocks) {
    const level = Math.min(Math.max(sum / members.length, low), highest);
    for (const index of members) placed[index] = level + gap * rank++;
  }
  return placed;
}

function pool(blocks: Block[]): void {
  for (;;) {
    const [before, last] = [blocks.at(-2), blocks.at(-1)];
    if (before === undefined || last === undefined) return;
    if (before.sum / before.members.length <= last.sum / last.members.length) return;
    blocks.pop();
    before.members.push(...last.members);
    before.sum += last.sum;
  }
}
