import { assessesControl } from '../stages/control.ts';
import type { Study } from '../study/study.ts';

export const shortCaution = 'Preliminary estimate; confirm by test.';

const powerCost = 'a single tractor propeller at full power costs 1–8 % MAC';
const unsourced = '(common practice, no source)';

/** Whether some condition of the study is flown with power. */
export function hasPower({ conditions }: Study): boolean {
  return conditions.some(({ power }) => power === 'fraction');
}

/** Whether margins with free stick are worked out. */
export function hasFreeStick(study: Study): boolean {
  return assessesControl(study) && study.hinge !== 'none';
}

/** What of power the results hold, for the head of the summary. */
export function powerWords(study: Study): string {
  if (study.propeller === undefined) return `Stick fixed, power off only: ${powerCost} ${unsourced}.`;
  if (!hasPower(study))
    return `Stick fixed, propeller at idle in every condition: ${powerCost} ${unsourced}.`;
  return 'Stick fixed, power as each condition says.';
}

/** What every result of a study carries. */
export function cautionsOf(study: Study): string[] {
  const power = hasPower(study)
    ? 'Margins are with the stick fixed, at the power of each condition.'
    : 'Power off, stick fixed. A single tractor propeller at full power costs 1 to 8 % MAC of margin, a free stick 2 to 10 % MAC (common practice, no source).';
  const freeStick =
    hasPower(study) && !hasFreeStick(study) ? ` A free stick costs 2 to 10 % MAC ${unsourced}.` : '';
  return [
    'A preliminary estimate for choosing a configuration, not a proof of stability: confirm by calculation for the built aeroplane and by test.',
    power + freeStick,
    'First flights with the CG well forward; approach the aft limit in small steps.',
    'Local airworthiness rules and licensed practice decide.',
  ];
}

/** Effects that no figure of this study knows of. */
export function notAssessed(study: Study): string {
  const control = assessesControl(study);
  const ground = study.conditions.some(({ groundEffect }) => groundEffect);
  const noseWheel = study.landingGear?.kind === 'nose_wheel' && ground;
  const tailWheel = study.landingGear?.kind === 'tail_wheel';
  const effects: [name: string, assessed: boolean][] = [
    ['power', hasPower(study)],
    ['free stick', hasFreeStick(study)],
    ['manoeuvre margin', control],
    ['control at forward CG', control],
    ['nose-wheel lift-off', !control || noseWheel || tailWheel],
    ['stick forces', !control || (study.control !== undefined && study.hinge !== 'none')],
    ['ground effect', ground],
  ];
  const missing = effects.filter(([, assessed]) => !assessed).map(([name]) => name);
  const never = 'spin, the stall of a T-tail in the wing’s wake, tip-back on the main wheels, aeroelastics';
  return `Not assessed: ${[...missing, never].join(', ')}.`;
}
