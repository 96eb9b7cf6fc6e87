/** A loading state: where the CG is, and the mass. */
export interface MassPoint {
  /** CG, measured from any fixed place in any unit. */
  readonly cg: number;
  readonly mass: number;
}

const piecesOfStretch = 12;

/**
 * The CG's way from one loading state to the next while mass is taken off or put on at one place.
 * The moment is linear in the mass, so the CG follows a hyperbola, not a straight line (exact).
 */
export function burnPath(states: readonly MassPoint[]): MassPoint[] {
  const [first] = states;
  if (first === undefined) return [];
  const path = [first];
  for (let i = 1; i < states.length; i++) path.push(...stretch(states[i - 1]!, states[i]!));
  return path;
}

function stretch(a: MassPoint, b: MassPoint): MassPoint[] {
  return Array.from({ length: piecesOfStretch }, (_, k) => {
    const t = (k + 1) / piecesOfStretch;
    if (t === 1) return b;
    const mass = a.mass + t * (b.mass - a.mass);
    const moment = a.mass * a.cg + t * (b.mass * b.cg - a.mass * a.cg);
    // A move at no change of mass is straight.
    return { mass, cg: a.mass === b.mass ? a.cg + t * (b.cg - a.cg) : moment / mass };
  });
}
