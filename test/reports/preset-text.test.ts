import { describe, expect, it } from 'vitest';
import { layOut } from '../../src/engine/lay-out.ts';
import { checkReport } from '../../src/reports/check-report.ts';
import { presetTexts } from '../../src/reports/preset-text.ts';
import { control, controlStudy } from '../stages/control-studies.ts';
import { testStudy } from '../studies.ts';

const study = controlStudy({
  equipment: control(),
  require: 'limit_force: {preset: 14-cfr-23.155-2016}\npull: {preset: 14-cfr-23.143-c-2016}',
});

describe('a preset in words', () => {
  it('has its paragraph, its edition and that it is to be confirmed', () => {
    const texts = presetTexts(study);
    expect(texts.map(({ name }) => name)).toEqual(['limit_force', 'pull']);
    const confirm = 'as in force until 2017, to be confirmed against your own rules: ';
    expect(texts[0].text).toContain(`14 CFR 23.155(a), ${confirm}least stick force`);
    expect(texts[1].text).toContain(`14 CFR 23.143(c), ${confirm}greatest pitch force`);
    expect(presetTexts(testStudy())).toEqual([]);
  });

  it('stands in what check prints, beside its edge and the pull that it limits', () => {
    const facts = { workers: 1, bytesNeeded: 1, bytesFree: 2, seconds: 1 };
    const lines = checkReport({ study, laidOut: layOut(study), ...facts }).split('\n');
    const linesFrom = (start: string) => lines.filter((line) => line.trim().startsWith(start));
    expect(linesFrom('limit_force.at_least: ')[0]).toContain('limit_load_force_margin ≥ 0.0 N');
    expect(linesFrom('limit_force: ')[0]).toMatch(
      /14 CFR 23\.155\(a\).*to be confirmed against your own rules/,
    );
    expect(linesFrom('pull: ')[0]).toMatch(/14 CFR 23\.143\(c\).*to be confirmed against your own rules/);
    expect(linesFrom('control.greatest_pull: ')[0]).toMatch(
      /266\.9 N \(14 CFR 23\.143\(c\), .*to be confirmed against your own rules\)/,
    );
  });
});
