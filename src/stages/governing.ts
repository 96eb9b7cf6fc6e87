import { conditionFigureName } from '../figures/condition-figures.ts';
import type { Condition, Study } from '../study/study.ts';
import { governingMarginsStage } from './loading-range.ts';
import type { Stage } from './stage.ts';

type GovernedStudy = Pick<Study, 'conditions' | 'band'>;

/** Figures that get their plain name from more than one condition. */
const notCopied = new Set(['outside_fitted_range', 'static_margin_forward', 'static_margin_aft']);

/**
 * Figures whose plain name stands for the least (−1) or the greatest (1) over the conditions, because a
 * limit on them is meant in all: the condition with the least neutral point need not have the least
 * manoeuvre margin.
 */
const worst: Readonly<Record<string, 1 | -1>> = {
  neutral_point_free_stick: -1,
  static_margin_free_stick_forward: 1,
  static_margin_free_stick_aft: -1,
  manoeuvre_point: -1,
  manoeuvre_margin_aft: -1,
  manoeuvre_point_free_stick: -1,
  manoeuvre_margin_free_stick_aft: -1,
  stick_force_per_g_forward: 1,
  stick_force_per_g_aft: -1,
  stick_force_at_stall_forward: 1,
};

/**
 * With several conditions: which one governs each end of the loading range, and every condition
 * figure under its plain name as it is in the one that governs the aft margin. The lower edge of the
 * band holds in `lowerIn`, the upper in `upperIn`; the least neutral point of the first governs aft,
 * the greatest of the others forward.
 * @param common figures that every condition has, under their plain names
 */
export function governingStages(study: GovernedStudy, common: readonly string[]): Stage[] {
  const { conditions, band } = study;
  if (conditions.length === 1) return [];
  const positions = (names: readonly string[] | undefined) => {
    const wanted = names ?? conditions.map(({ name }) => name);
    return conditions.flatMap(({ name }, k) => (wanted.includes(name) ? [k] : []));
  };
  return [
    extremeStage('aft', conditions, positions(band.lowerIn), -1),
    extremeStage('forward', conditions, positions(band.upperIn), 1),
    ...common
      .filter((name) => !notCopied.has(name))
      .map((name) => {
        const sign = worst[name];
        return sign === undefined ? copyStage(name, conditions) : worstStage(name, conditions, sign);
      }),
    governingMarginsStage,
    unionStage(conditions),
  ];
}

/** Finds the condition with the least (sign −1) or greatest (sign 1) neutral point among some. */
function extremeStage(
  end: 'aft' | 'forward',
  conditions: readonly Condition[],
  among: readonly number[],
  sign: 1 | -1,
): Stage {
  const writes =
    end === 'aft' ? ['governing_condition_aft'] : ['governing_condition_forward', 'neutral_point_aftmost'];
  return {
    name: `condition that governs ${end}`,
    reads: among.map((k) => conditionFigureName('neutral_point', conditions[k])),
    writes,
    cost: 3 * among.length,
    kernel: (count, inputs, [governing, point]) => {
      for (let row = 0; row < count; row++) {
        let found = 0;
        // An empty neutral point in any condition leaves nothing to govern: NaN is never overtaken.
        for (let k = 1; k < inputs.length && !Number.isNaN(inputs[found][row]); k++) {
          if (!(sign * inputs[k][row] <= sign * inputs[found][row])) found = k;
        }
        const value = inputs[found][row];
        governing[row] = Number.isNaN(value) ? Number.NaN : among[found];
        if (point !== undefined) point[row] = value;
      }
    },
  };
}

/** Gives a figure its plain name from the condition that governs aft. */
function copyStage(name: string, conditions: readonly Condition[]): Stage {
  return {
    name: `${name} of the governing condition`,
    reads: [
      'governing_condition_aft',
      ...conditions.map((condition) => conditionFigureName(name, condition)),
    ],
    writes: [name],
    cost: 2,
    kernel: (count, inputs, [plain]) => {
      const governing = inputs[0];
      for (let row = 0; row < count; row++) {
        const condition = governing[row];
        plain[row] = Number.isNaN(condition) ? Number.NaN : inputs[1 + condition][row];
      }
    },
  };
}

/** Gives a figure's plain name to its least (sign −1) or greatest (sign 1) value over the conditions; empty when any is. */
function worstStage(name: string, conditions: readonly Condition[], sign: 1 | -1): Stage {
  return {
    name: `${name}, ${sign === 1 ? 'greatest' : 'least'} of all conditions`,
    reads: conditions.map((condition) => conditionFigureName(name, condition)),
    writes: [name],
    cost: 2 * conditions.length,
    kernel: (count, inputs, [plain]) => {
      plain.set(inputs[0].subarray(0, count));
      for (let k = 1; k < inputs.length; k++) {
        const values = inputs[k];
        for (let row = 0; row < count; row++) {
          plain[row] = sign === 1 ? Math.max(plain[row], values[row]) : Math.min(plain[row], values[row]);
        }
      }
    },
  };
}

/** Flags of all conditions together. */
function unionStage(conditions: readonly Condition[]): Stage {
  return {
    name: 'ranges of all conditions',
    reads: conditions.map((condition) => conditionFigureName('outside_fitted_range', condition)),
    writes: ['outside_fitted_range'],
    cost: 2 * conditions.length,
    kernel: (count, inputs, [flags]) => {
      for (let row = 0; row < count; row++) {
        let union = 0;
        for (let k = 0; k < inputs.length; k++) union |= inputs[k][row];
        flags[row] = union;
      }
    },
  };
}
