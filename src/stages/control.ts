import { isControlFigure } from '../figures/catalogue.ts';
import type { Study } from '../study/study.ts';

/**
 * Whether a study is one in which trim, control and the free stick are worked out: it gives landing gear,
 * a pitch control, a propeller, flaps or more than one condition, or names a figure of control as a
 * requirement, a preference, a column or the aim of a sizing. A plain study of one condition is not.
 */
export function assessesControl(study: Study): boolean {
  const { landingGear, control, propeller, flaps, conditions } = study;
  if (landingGear ?? control ?? propeller ?? flaps) return true;
  return conditions.length > 1 || figuresNamed(study).some(isControlFigure);
}

/** Names of figures that a study asks for. */
function figuresNamed({ requirements, preferences, columns, size }: Study): string[] {
  return [
    ...requirements.map(({ figure }) => figure),
    ...preferences.map(({ figure }) => figure),
    ...(columns ?? []),
    ...(size === undefined ? [] : [size.figure]),
  ];
}
