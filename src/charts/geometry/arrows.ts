import { arcLengths, type Point, type Polyline, pointAlong } from './polyline.ts';

const halfAngle = Math.PI / 8;
const mostApart = 110;

/**
 * Arrowheads along a line in the direction it runs: one in the middle of a short line, more on a
 * long one, none on a line too short to carry one. Each is a closed triangle with its point on the line.
 * @param length of an arrowhead [px]
 */
export function arrowheads(line: Polyline, length: number): Point[][] {
  if (line.length < 2) return [];
  const lengths = arcLengths(line);
  const total = lengths.at(-1)!;
  if (total < 2 * length) return [];
  const count = Math.max(1, Math.round(total / mostApart));
  return Array.from({ length: count }, (_, k) => {
    const tip = ((k + 0.5) / count) * total + length / 2;
    const { x, y, ux, uy } = pointAlong(line, lengths, tip);
    const half = length * Math.tan(halfAngle);
    const [footX, footY] = [x - length * ux, y - length * uy];
    return [
      { x, y },
      { x: footX - half * uy, y: footY + half * ux },
      { x: footX + half * uy, y: footY - half * ux },
      { x, y },
    ];
  });
}
