import { showValue } from '../figures/display.ts';
import { inputDefinition } from '../study/inputs.ts';
import type { Condition, Study } from '../study/study.ts';

const percent = 100;

/** `condition climb: 1.3 times the stall speed, height 0.000 m, 100 % power` for each condition, at the baseline. */
export function conditionLines(study: Study): string[] {
  return study.conditions.map((condition, index) => {
    const words = conditionWords(study, condition, index + 1);
    return `condition \`${condition.name}\`: ${words.join(', ')}`;
  });
}

function conditionWords({ inputs, propeller, show }: Study, condition: Condition, number: number): string[] {
  const value = (key: string) => inputs.get(`conditions[${number}].${key}`) ?? Number.NaN;
  const text = (key: string) =>
    showValue(value(key), inputDefinition(`conditions[${number}].${key}`).dimension, show);
  const speed = {
    speed: () => `${text('speed')} calibrated`,
    lift_coefficient: () => `lift coefficient ${value('lift_coefficient')}`,
    times_stall: () => `${value('times_stall')} times the stall speed`,
  }[condition.speedAs]();
  const power =
    condition.power === 'idle' ? 'idle' : `${Number((percent * value('power')).toPrecision(4))} % power`;
  return [
    speed,
    `height ${text('height')}`,
    ...(propeller === undefined ? [] : [power]),
    ...(condition.flapsDown ? [`flaps ${text('flaps')}`] : []),
    ...(condition.groundEffect ? [`wing ${text('wing_above_ground')} above the ground`] : []),
  ];
}
