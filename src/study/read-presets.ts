/** Requirements by the name of a preset. */
import {
  type ForcePresetName,
  forcePresets,
  greatestPull,
  isForcePreset,
  presetSource,
  pullPreset,
} from './force-presets.ts';
import type { Reading } from './reading.ts';
import { firstOf, keySpan, type MapEntry, mapIn, type SourceNode, valueIn, wordIn } from './source.ts';
import type { Requirement, Study } from './study.ts';

const ownKeys = ['figure', 'at_least', 'at_most'] as const;

/** What stick forces need of a study. */
type Forces = Pick<Study, 'control' | 'hinge'>;

/**
 * The requirement that a preset makes; undefined where the map names none that is known. Figure and edges
 * beside it, and a study without stick forces, are faults.
 * @param scale reads the study's own scale, or takes the preset's [N]
 */
export function presetRequirement(
  name: string,
  { value: map }: MapEntry,
  forces: Forces,
  scale: (otherwise: number) => number,
  reading: Reading,
): Requirement | undefined {
  const word = wordIn(map, 'preset');
  if (word === undefined || !isForcePreset(word)) return undefined;
  for (const key of ownKeys) if (valueIn(map, key)) tellBoth(name, key, map, reading);
  checkForces(word, map, forces, reading);
  const { figure, atLeast, scale: customary } = forcePresets[word];
  return { name, figure, atLeast, scale: scale(customary), preset: word };
}

function tellBoth(name: string, key: string, map: SourceNode, reading: Reading): void {
  reading.faults.add(
    'OVERDETERMINED',
    keySpan(map, key),
    `require.${name} has ${key} beside a preset, which settles it.`,
    `Remove ${key}, or the preset.`,
  );
}

function checkForces(word: ForcePresetName, map: SourceNode, forces: Forces, reading: Reading): void {
  const { control, hinge } = forces;
  if (control && hinge !== 'none') return;
  const found = control
    ? `'${word}' limits a stick force, and nothing is known of the hinge moments of the all-moving tail.`
    : `'${word}' limits a stick force, and the aeroplane has no control.`;
  const remedy = control
    ? 'Add hinge: {alpha: …} to tail.elevator.'
    : 'Add control: with its kind and gearing to aeroplane.';
  reading.faults.add('MISSING_KEY', valueIn(map, 'preset')?.span ?? firstOf(map), found, remedy);
}

/**
 * A pull that a preset limits also limits the CG forward: it stands for `control.greatest_pull` where the
 * study does not say that itself.
 */
export function assumeGreatestPull(root: SourceNode, { control, hinge }: Forces, reading: Reading): void {
  const required = mapIn(root, 'require');
  const asked = [...(required?.entries ?? [])].some(
    ([, { value }]) => wordIn(value, 'preset') === pullPreset,
  );
  if (!required || !asked || !control || hinge === 'none') return;
  if (reading.inputs.has('control.greatest_pull')) return;
  reading.assume('control.greatest_pull', greatestPull(control), presetSource(pullPreset), firstOf(required));
}
