import { forcePresets, presetSource } from '../study/force-presets.ts';
import type { Study } from '../study/study.ts';

/** What each preset of a study is: the requirement's name, and paragraph, edition and what it asks in one line. */
export function presetTexts({ requirements }: Pick<Study, 'requirements'>): { name: string; text: string }[] {
  return requirements.flatMap(({ name, preset }) =>
    preset === undefined ? [] : [{ name, text: `${presetSource(preset)}: ${forcePresets[preset].asks}` }],
  );
}
