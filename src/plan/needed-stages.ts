import type { Stage } from '../stages/stage.ts';

/**
 * Which stages lead to some figures, directly or through others.
 * @param stages in the order of computation
 * @param wanted names of figures
 * @returns positions of the stages, in order
 */
export function neededStages(stages: readonly Stage[], wanted: Iterable<string>): number[] {
  const needed = new Set(wanted);
  const positions: number[] = [];
  for (let position = stages.length - 1; position >= 0; position--) {
    const { reads, writes } = stages[position];
    if (!writes.some((figure) => figure !== null && needed.has(figure))) continue;
    positions.push(position);
    for (const figure of reads) needed.add(figure);
  }
  return positions.reverse();
}
