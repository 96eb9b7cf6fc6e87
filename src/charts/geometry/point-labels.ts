import { textWidth } from '../text-width.ts';
import { textSize, weight } from '../theme.ts';
import { inside, isClear, textSpots } from './line-labels.ts';
import type { Spot } from './polyline.ts';

/** A point that wants its text beside it. An empty text only keeps others away. */
export interface MarkedPoint extends Spot {
  readonly text: string;
}
export interface PointLabel {
  readonly x: number;
  readonly y: number;
  readonly text: string;
}

/** Directions to try, as parts of the reach: right, left, above, below, then the corners. */
const directions: readonly (readonly [number, number])[] = [
  [1, 0],
  [-1, 0],
  [0, -1],
  [0, 1],
  [0.9, -0.9],
  [0.9, 0.9],
  [-0.9, -0.9],
  [-0.9, 0.9],
];
const gap = 3;

/** Middles of the texts beside their points, clear of points and of one another; a text without room is left out. */
export function placeBeside(
  marked: readonly MarkedPoint[],
  keepClear: readonly Spot[],
  frame: { readonly width: number; readonly height: number },
): { labels: PointLabel[]; spots: Spot[] } {
  const spots: Spot[] = marked.map(({ x, y, radius }) => ({ x, y, radius }));
  const labels: PointLabel[] = [];
  for (const { x, y, radius, text } of marked) {
    if (text === '') continue;
    const width = textWidth(text, textSize.small, weight.strong);
    for (const [right, down] of directions) {
      const at = {
        x: x + right * (radius + gap + width / 2 + 2),
        y: y + down * (radius + gap + textSize.small / 2),
      };
      const room = textSpots(at.x, at.y, 0, width, textSize.small);
      if (!room.every((spot) => inside(spot, frame) && isClear(spot, [...keepClear, ...spots]))) continue;
      spots.push(...room);
      labels.push({ ...at, text });
      break;
    }
  }
  return { labels, spots };
}
