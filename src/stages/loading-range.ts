import { cgFigureName } from '../figures/input-figures.ts';
import { fractionOfMac, staticMargin, stationOfFraction } from '../methods/neutral-point.ts';
import type { CgKind, Study } from '../study/study.ts';
import type { Stage } from './stage.ts';

/** One end of the loading range as a fraction of the MAC and as a station, from whichever is given. */
function cgStage(end: 'forward' | 'aft', kind: CgKind): Stage {
  const fraction = `cg_${end}`;
  const station = `cg_${end}_station`;
  return {
    name: `${end} CG`,
    reads: [cgFigureName(end, kind), 'mac_leading_edge', 'mac'],
    writes: [kind === 'percent_mac' ? null : fraction, kind === 'station' ? null : station],
    cost: 4,
    kernel: (count, [given, leadingEdge, mac], [asFraction, asStation]) => {
      for (let row = 0; row < count; row++) {
        const x0 = leadingEdge[row];
        const c = mac[row];
        const h =
          kind === 'percent_mac'
            ? given[row]
            : kind === 'station'
              ? fractionOfMac(given[row], x0, c)
              : given[row] / c;
        asFraction[row] = h;
        asStation[row] = kind === 'station' ? given[row] : stationOfFraction(h, x0, c);
      }
    },
  };
}

export function loadingRangeStages({ cg }: Pick<Study, 'cg'>): Stage[] {
  return [cgStage('forward', cg.forward), cgStage('aft', cg.aft)];
}

/** Margins at both ends of the loading range; empty where the ends are reversed. */
export const marginsStage: Stage = {
  name: 'static margins',
  reads: ['neutral_point', 'cg_forward', 'cg_aft'],
  writes: ['static_margin_forward', 'static_margin_aft'],
  cost: 2,
  kernel: (count, [point, forward, aft], [marginForward, marginAft]) => {
    for (let row = 0; row < count; row++) {
      if (forward[row] > aft[row]) {
        marginForward[row] = Number.NaN;
        marginAft[row] = Number.NaN;
        continue;
      }
      marginForward[row] = staticMargin(point[row], forward[row]);
      marginAft[row] = staticMargin(point[row], aft[row]);
    }
  },
};

/**
 * Margins over all conditions: aft that of the least neutral point, forward that of the greatest, each
 * among the conditions in which its edge of the band counts.
 */
export const governingMarginsStage: Stage = {
  ...marginsStage,
  name: 'governing margins',
  reads: ['neutral_point', 'cg_forward', 'cg_aft', 'neutral_point_aftmost'],
  kernel: (count, [least, forward, aft, greatest], [marginForward, marginAft]) => {
    for (let row = 0; row < count; row++) {
      const reversed = forward[row] > aft[row];
      marginForward[row] = reversed ? Number.NaN : staticMargin(greatest[row], forward[row]);
      marginAft[row] = reversed ? Number.NaN : staticMargin(least[row], aft[row]);
    }
  },
};

/**
 * The CG window that band and control allow; an end is empty where the band has no such edge and nothing
 * else limits it.
 * @param control whether the forward limit of control is worked out
 */
export function windowStage(
  { band, conditions }: Pick<Study, 'band' | 'conditions'>,
  control: boolean,
): Stage {
  const { lower = Number.NaN, upper = Number.NaN } = band;
  return {
    name: 'CG window',
    reads: [
      'neutral_point',
      conditions.length === 1 ? 'neutral_point' : 'neutral_point_aftmost',
      ...(control ? ['control_limit_forward'] : []),
    ],
    writes: ['cg_window_forward', 'cg_window_aft'],
    cost: 2,
    kernel: (count, [least, greatest, limit], [forward, aft]) => {
      for (let row = 0; row < count; row++) {
        const byBand = greatest[row] - upper;
        const open = band.upper === undefined ? Number.NEGATIVE_INFINITY : byBand;
        forward[row] = limit === undefined ? byBand : Math.max(open, limit[row]);
        aft[row] = least[row] - lower;
      }
    },
  };
}
