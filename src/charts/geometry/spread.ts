/** A label on a line that wants to stand at `at` and takes `size` of it. */
export interface SpreadItem {
  readonly at: number;
  readonly size: number;
}

/**
 * Middle positions of labels along one line, moved apart as little as is needed so that none
 * overlap, within `from`…`to` where they fit. Order along the line is kept.
 */
export function spread(items: readonly SpreadItem[], from: number, to: number, gap = 0): number[] {
  const order = items.map((_, index) => index).sort((a, b) => items[a]!.at - items[b]!.at || a - b);
  const middles = new Array<number>(items.length).fill(0);
  // Groups of touching labels, each standing about the mean of what its members want.
  const groups: { members: number[]; size: number; middle: number }[] = [];
  for (const index of order) {
    groups.push({ members: [index], size: items[index]!.size + gap, middle: 0 });
    settle(groups.at(-1)!);
    while (groups.length > 1 && start(groups.at(-1)!) < end(groups.at(-2)!)) {
      const last = groups.pop()!;
      const before = groups.at(-1)!;
      before.members.push(...last.members);
      before.size += last.size;
      settle(before);
    }
  }
  for (const group of groups) {
    let cursor = start(group);
    for (const index of group.members) {
      const size = items[index]!.size + gap;
      middles[index] = cursor + size / 2;
      cursor += size;
    }
  }
  return middles;

  function settle(group: { members: number[]; size: number; middle: number }): void {
    let offset = 0;
    let sum = 0;
    for (const index of group.members) {
      const size = items[index]!.size + gap;
      sum += items[index]!.at - (offset + size / 2);
      offset += size;
    }
    const wanted = sum / group.members.length;
    group.middle = Math.max(from, Math.min(to - group.size, wanted)) + group.size / 2;
  }
}

function start(group: { size: number; middle: number }): number {
  return group.middle - group.size / 2;
}
function end(group: { size: number; middle: number }): number {
  return group.middle + group.size / 2;
}
