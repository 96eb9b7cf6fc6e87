/** Limits of control forces from a regulation text, which a study may require by name. */
import { greatestTemporaryForce, poundForce } from '../methods/control-force-rules.ts';
import type { ControlChoices } from './study.ts';

/** A requirement that a regulation text settles. */
export interface ForcePreset {
  readonly paragraph: string;
  readonly edition: string;
  /** What the paragraph asks for, as the figure takes it. */
  readonly asks: string;
  readonly figure: string;
  /** The figure's least value [N]. */
  readonly atLeast: number;
  /** One unit of shortfall [N]. */
  readonly scale: number;
}

/** Said wherever a preset is told: whose rules they are and in which edition is the user's to know. */
export const toBeConfirmed = 'to be confirmed against your own rules';

const edition = 'as in force until 2017';
/** About what a pilot tells apart on a light control: common practice, no source. */
const scale = 5 * poundForce;

export const forcePresets = {
  '14-cfr-23.155-2016': {
    paragraph: '14 CFR 23.155(a)',
    edition,
    asks: 'least stick force to reach the positive limit load factor, at the aftmost CG, in every condition of the study',
    figure: 'limit_load_force_margin',
    atLeast: 0,
    scale,
  },
  '14-cfr-23.143-c-2016': {
    paragraph: '14 CFR 23.143(c)',
    edition,
    asks: 'greatest pitch force for a short time, here of the pull from a condition’s trimmed speed to its stall at the foremost CG; a wheel is held with two hands',
    figure: 'temporary_force_margin',
    atLeast: 0,
    scale,
  },
} as const satisfies Record<string, ForcePreset>;

export type ForcePresetName = keyof typeof forcePresets;

export const forcePresetNames = Object.keys(forcePresets) as ForcePresetName[];

export function isForcePreset(word: string): word is ForcePresetName {
  return Object.hasOwn(forcePresets, word);
}

/** The preset that limits the pull in a condition and so the CG forward. */
export const pullPreset: ForcePresetName = '14-cfr-23.143-c-2016';

/** Greatest pull that it allows [N]. */
export function greatestPull({ kind }: ControlChoices): number {
  return greatestTemporaryForce(kind);
}

/** `14 CFR 23.155(a), as in force until 2017, to be confirmed against your own rules`. */
export function presetSource(name: ForcePresetName): string {
  const { paragraph, edition: inForce } = forcePresets[name];
  return `${paragraph}, ${inForce}, ${toBeConfirmed}`;
}
