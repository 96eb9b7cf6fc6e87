import type { ElevatorToTrimData, TrimCurve, TrimPanel } from '../../charts/index.ts';
import { evaluateSlice } from '../../engine/slice.ts';
import { conditionFigureName } from '../../figures/condition-figures.ts';
import { displayUnit } from '../../figures/display.ts';
import { figureOfInput } from '../../figures/study-figures.ts';
import { calibratedSpeedFromMach } from '../../methods/atmosphere.ts';
import { elevatorToTrim } from '../../methods/trim.ts';
import { buildStages } from '../../stages/build-stages.ts';
import type { Condition, Study } from '../../study/study.ts';
import type { RunView } from '../run-view.ts';
import { chartHeading } from '../run-view.ts';
import type { Pick } from './pick-data.ts';

/** Speeds along a curve. */
const points = 61;
const percent = 100;
const angleDigits = 6;
const degree = Math.PI / 180;
/** Curves end beyond the fastest condition of their flaps by this factor, and not before that many stall speeds. */
const beyond = { fastest: 1.1, stall: 1.6 } as const;
const speedPath = 'conditions[1].speed';

/** One of the conditions' flap settings, and where to take it and its height from. */
interface FlapSetting {
  /** Number of the condition, from 1. */
  readonly number: number;
  readonly condition: Condition;
  readonly deflection: number;
}

/** Power of a panel: a fraction of the rated power, or idle; undefined without a propeller. */
type PowerState = number | 'idle' | undefined;

/**
 * Elevator to trim against speed of one combination: flaps up and most down, idle and the greatest power
 * among the study's conditions, away from the ground. Undefined where the combination can't be worked out.
 */
export function elevatorToTrimData(view: RunView, pick: Pick): ElevatorToTrimData | undefined {
  const { study } = view;
  const inputs = numbersOfPick(study, pick);
  const { unit } = displayUnit('speed', study.show);
  const powers = powerStates(study, inputs);
  const panels = flapSettings(study, inputs).flatMap((flaps) =>
    powers.map((power) => trimPanel(view, pick, inputs, flaps, power)),
  );
  if (!panels.every(({ speeds }) => speeds.every(Number.isFinite))) return undefined;
  return {
    heading: chartHeading(view, `Elevator to trim: ${pick.label}`),
    speedTitle: `Calibrated airspeed [${unit}]`,
    travel: {
      up: inDegrees(inputs.get('tail.elevator.up')),
      down: -inDegrees(inputs.get('tail.elevator.down')),
    },
    panels,
  };
}

/** An angle given by the study in degrees, without the digits that radians leave behind. */
function inDegrees(angle = Number.NaN): number {
  return Number((angle / degree).toFixed(angleDigits));
}

/** Every number of the study at its value in a combination, by path. */
function numbersOfPick(study: Study, { values }: Pick): Map<string, number> {
  const figureName = figureOfInput(study);
  return new Map(
    [...study.inputs].map(([path, value]) => [path, values.get(figureName(path)) ?? value] as const),
  );
}

/** Flaps up and most down, as far as the conditions have them. */
function flapSettings({ conditions }: Study, inputs: ReadonlyMap<string, number>): FlapSetting[] {
  const all = conditions.map((condition, index): FlapSetting => {
    const number = index + 1;
    const deflection = condition.flapsDown ? (inputs.get(`conditions[${number}].flaps`) ?? 0) : 0;
    return { number, condition, deflection };
  });
  const least = all.reduce((found, each) => (each.deflection < found.deflection ? each : found));
  const most = all.reduce((found, each) => (each.deflection > found.deflection ? each : found));
  return least === most ? [least] : [least, most];
}

function powerStates({ propeller, conditions }: Study, inputs: ReadonlyMap<string, number>): PowerState[] {
  if (propeller === undefined) return [undefined];
  const fractions = conditions.flatMap(({ power }, index) =>
    power === 'fraction' ? [inputs.get(`conditions[${index + 1}].power`) ?? 0] : [],
  );
  return fractions.length === 0 ? ['idle'] : ['idle', Math.max(...fractions)];
}

/** The study with one condition that is given by its speed, away from the ground. */
function studyAtSpeed(
  { size: _, ...study }: Study,
  { number, condition, deflection }: FlapSetting,
  power: PowerState,
  numbers: ReadonlyMap<string, number>,
): Study {
  const inputs = new Map([...numbers].filter(([path]) => !path.startsWith('conditions[')));
  inputs.set(speedPath, 1);
  inputs.set('conditions[1].height', numbers.get(`conditions[${number}].height`) ?? 0);
  inputs.set('conditions[1].flaps', deflection);
  if (typeof power === 'number') inputs.set('conditions[1].power', power);
  const only: Condition = {
    name: condition.name,
    speedAs: 'speed',
    power: typeof power === 'number' ? 'fraction' : 'idle',
    flapsDown: condition.flapsDown,
    groundEffect: false,
  };
  return { ...study, inputs, conditions: [only], band: {}, requirements: [], preferences: [], skip: [] };
}

const balanceFigures = [
  'lift_coefficient',
  'zero_lift_moment',
  'neutral_point_level',
  'elevator_lift_slope',
  'tail_position',
] as const;

function trimPanel(
  { study }: RunView,
  pick: Pick,
  inputs: ReadonlyMap<string, number>,
  flaps: FlapSetting,
  power: PowerState,
): TrimPanel {
  // The body's stations are stretched from the study's own baseline, so the stages are built on that.
  const stages = buildStages(studyAtSpeed(study, flaps, power, study.inputs), true);
  const flown = studyAtSpeed(study, flaps, power, inputs);
  const over = (speeds: Float64Array, figures: readonly string[]) =>
    evaluateSlice(flown, stages, [{ name: speedPath, paths: [speedPath], values: [speeds] }], figures);
  const fastest = fastestWith(study, pick, inputs, flaps.condition.flapsDown);
  const stall = over(Float64Array.of(fastest), ['stall_speed']).get('stall_speed')?.[0] ?? Number.NaN;
  const greatest = Math.max(beyond.fastest * fastest, beyond.stall * stall);
  const speeds = Float64Array.from(
    { length: points },
    (_, i) => stall + ((greatest - stall) * i) / (points - 1),
  );
  const columns = over(speeds, [...balanceFigures, 'neutral_point']);
  const column = (name: string) => columns.get(name) ?? new Float64Array(points).fill(Number.NaN);
  const [cl, moment, point, slope, tail] = balanceFigures.map(column);
  const curve = (label: string, kind: TrimCurve['kind'], cg: number): TrimCurve => ({
    label,
    kind,
    cg: percent * cg,
    elevator: speeds.map(
      (_, i) => -elevatorToTrim(cl[i], cg, moment[i], point[i], slope[i], tail[i]) / degree,
    ),
  });
  const { factor } = displayUnit('speed', study.show);
  const ofPick = (name: string) => pick.values.get(name) ?? Number.NaN;
  return {
    title: panelTitle(flaps, power),
    speeds: [...speeds].map((speed) => speed * factor),
    curves: [
      curve('CG forward', 'forward', ofPick('cg_forward')),
      curve('CG aft', 'aft', ofPick('cg_aft')),
      curve(
        'CG at the neutral point at mid speed',
        'neutral point',
        column('neutral_point')[(points - 1) / 2],
      ),
    ],
    stallSpeed: Math.round(stall * factor),
  };
}

/** Calibrated speed of the fastest condition with flaps up, or down [m/s]. */
function fastestWith(
  study: Study,
  { values }: Pick,
  inputs: ReadonlyMap<string, number>,
  flapsDown: boolean,
): number {
  const { conditions } = study;
  const speeds = conditions.flatMap((condition, index) => {
    if (condition.flapsDown !== flapsDown) return [];
    const name = conditions.length === 1 ? 'mach' : conditionFigureName('mach', condition);
    const height = inputs.get(`conditions[${index + 1}].height`) ?? 0;
    return [calibratedSpeedFromMach(values.get(name) ?? Number.NaN, height)];
  });
  return Math.max(...speeds);
}

function panelTitle({ condition, deflection }: FlapSetting, power: PowerState): string {
  const flaps = condition.flapsDown ? `Flaps ${inDegrees(deflection)}°` : 'Flaps up';
  if (power === undefined) return flaps;
  return `${flaps}, ${power === 'idle' ? 'idle' : `${Math.round(percent * power)} % power`}`;
}
