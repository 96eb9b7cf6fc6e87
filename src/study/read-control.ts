import type { Reading } from './reading.ts';
import { firstOf, keySpan, mapIn, type SourceNode, valueIn, wordIn } from './source.ts';
import type { ControlChoices, LandingGearChoices } from './study.ts';

/** Reads `aeroplane.control` into the inputs; undefined where the study gives none. */
export function readControl(aeroplane: SourceNode, reading: Reading): ControlChoices | undefined {
  const control = mapIn(aeroplane, 'control');
  if (!control) return undefined;
  for (const key of ['gearing', 'spring', 'bobweight', 'greatest_pull', 'load_factor'])
    reading.take(control, key, `control.${key}`);
  return { kind: wordIn(control, 'kind') === 'wheel' ? 'wheel' : 'stick' };
}

const needed = ['main_wheels', 'rotation_speed'] as const;
const noseWheelOnly = ['rotation_speed', 'ground_angle', 'below_datum'] as const;

/** Reads `aeroplane.landing_gear` into the inputs; undefined where the study gives none. */
export function readLandingGear(aeroplane: SourceNode, reading: Reading): LandingGearChoices | undefined {
  const gear = mapIn(aeroplane, 'landing_gear');
  if (!gear) return undefined;
  reading.take(gear, 'main_wheels', 'landing_gear.main_wheels');
  if (wordIn(gear, 'kind') === 'tail_wheel') {
    refuseNoseWheel(gear, reading);
    return { kind: 'tail_wheel' };
  }
  for (const key of noseWheelOnly) reading.take(gear, key, `landing_gear.${key}`);
  for (const key of needed) {
    if (valueIn(gear, key)) continue;
    const found = `landing_gear has no ${key}, without which a nose wheel's lift-off is not settled.`;
    reading.faults.addBeside('MISSING_KEY', firstOf(gear), found, `Add ${key}:.`);
  }
  return { kind: 'nose_wheel' };
}

function refuseNoseWheel(gear: SourceNode, reading: Reading): void {
  for (const key of noseWheelOnly) {
    if (!valueIn(gear, key)) continue;
    reading.faults.add(
      'OVERDETERMINED',
      keySpan(gear, key),
      `landing_gear.${key} belongs to a nose wheel, and the kind is tail_wheel.`,
      `Remove ${key}, or say kind: nose_wheel.`,
    );
  }
}
