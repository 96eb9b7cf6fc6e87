import { conditionFigureName } from '../figures/condition-figures.ts';
import { controlLimitKinds } from '../figures/control-limit-kinds.ts';
import type { Study } from '../study/study.ts';
import { hasNoseWheelLimit, hasStickForceLimit } from './forward-limit.ts';
import type { Stage } from './stage.ts';

const stickForceLimit = 'forward_limit_stick_force';

/** One limit among all: the figure, and which condition and kind it belongs to. */
interface Limit {
  readonly figure: string;
  readonly condition: number;
  readonly kind: number;
  /** Where it is empty it does not bind. */
  readonly mayBeEmpty: boolean;
}

function limitsOf(study: Study): Limit[] {
  const { conditions } = study;
  return conditions.flatMap((condition, index) =>
    controlLimitKinds.flatMap(({ figure: plain }, kind) => {
      if (plain === 'forward_limit_nose_wheel' && !hasNoseWheelLimit(study, condition)) return [];
      if (plain === stickForceLimit && !hasStickForceLimit(study)) return [];
      const figure = conditions.length === 1 ? plain : conditionFigureName(plain, condition);
      return [{ figure, condition: index, kind, mayBeEmpty: plain === stickForceLimit }];
    }),
  );
}

/**
 * The forward limit of control: the aftmost of all limits over all conditions, which it is, and how far
 * the foremost CG lies behind it. Empty when any limit is, but for one that does not bind.
 */
export function controlLimitStages(study: Study): Stage[] {
  const limits = limitsOf(study);
  return [
    {
      name: 'control limit',
      reads: limits.map(({ figure }) => figure),
      writes: ['control_limit_forward', 'control_limit_condition', 'control_limit_kind'],
      cost: 3 * limits.length,
      kernel: (count, inputs, [limit, condition, kind]) => {
        for (let row = 0; row < count; row++) {
          let aftmost = 0;
          // An empty limit is never overtaken: what is not known may be the aftmost.
          for (let k = 1; k < inputs.length && !Number.isNaN(inputs[aftmost][row]); k++) {
            const value = inputs[k][row];
            if (limits[k].mayBeEmpty && Number.isNaN(value)) continue;
            if (!(value <= inputs[aftmost][row])) aftmost = k;
          }
          const value = inputs[aftmost][row];
          const known = !Number.isNaN(value);
          limit[row] = value;
          condition[row] = known ? limits[aftmost].condition : Number.NaN;
          kind[row] = known ? limits[aftmost].kind : Number.NaN;
        }
      },
    },
    {
      name: 'margin of control',
      reads: ['cg_forward', 'control_limit_forward'],
      writes: ['control_margin_forward'],
      cost: 2,
      kernel: (count, [forward, limit], [margin]) => {
        for (let row = 0; row < count; row++) margin[row] = forward[row] - limit[row];
      },
    },
  ];
}
