import { panelLeadingEdgeTangent } from '../methods/panel-planform.ts';
import { coupleFigure, coupleFigureCount, panelCouples } from '../methods/zero-lift-moment.ts';
import type { Study } from '../study/study.ts';
import type { Stage } from './stage.ts';
import { panelReads } from './wing-planform.ts';

const unitLiftSlope = 1;
const readsPerPanel = 3;

/**
 * Couple of the wing by its linear washout with sweep, over the lift-curve slope [rad], from the panels'
 * strips. The sections' own couple needs no strips: with one section all along it is the section's moment.
 */
export function wingTwistStage(study: Pick<Study, 'wing'>): Stage {
  const panels = panelReads(study);
  const n = panels.length;
  const ownWidths = panels[0].width !== null;
  const [widths, tapers, tangents] = [new Float64Array(n), new Float64Array(n), new Float64Array(n)];
  const [moments, twists] = [new Float64Array(n + 1), new Float64Array(n + 1)];
  const out = new Float64Array(coupleFigureCount);
  return {
    name: 'couple of the washout',
    reads: [
      'wing_root_chord',
      'wing_span',
      'wing_washout',
      ...panels.flatMap(({ width, taper, sweep }) => [width ?? 'wing_span', taper, sweep]),
    ],
    writes: ['wing_twist_couple'],
    cost: 60 + 40 * n,
    kernel: (count, inputs, [couple]) => {
      const [root, span, washout] = inputs;
      const read = (panel: number, which: number, row: number) =>
        inputs[3 + readsPerPanel * panel + which][row];
      for (let row = 0; row < count; row++) {
        const semiSpan = span[row] / 2;
        let sumOfWidths = 0;
        for (let p = 0; p < n; p++) sumOfWidths += ownWidths ? read(p, 0, row) : 1;
        let chord = root[row];
        let reached = 0;
        for (let p = 0; p < n; p++) {
          widths[p] = ((ownWidths ? read(p, 0, row) : 1) * semiSpan) / sumOfWidths;
          tapers[p] = read(p, 1, row);
          const tangent = Math.tan(read(p, 2, row));
          tangents[p] = panels[p].sweepAtQuarterChord
            ? panelLeadingEdgeTangent(tangent, chord, tapers[p], widths[p])
            : tangent;
          chord *= tapers[p];
          reached += widths[p];
          // Nose-up is positive here, and washout turns the tip's nose down.
          twists[p + 1] = -(washout[row] * reached) / semiSpan;
        }
        panelCouples(n, root[row], widths, tapers, tangents, moments, twists, unitLiftSlope, out);
        couple[row] = out[coupleFigure.twist];
      }
    },
  };
}
