import { describe, expect, it } from 'vitest';
import { StudyError } from '../../src/errors.ts';
import { studyText, testStudy } from '../studies.ts';

/** That many requirements of one edge each, a line each. */
const limits = (count: number) =>
  Array.from({ length: count }, (_, k) => `limit_${k + 1}: {figure: wing_span, at_most: ${20 + k} m}`);

describe('requirements in number', () => {
  it('31 edges are possible', () => {
    const require = [...limits(28), 'in_range: true', 'mac: {at_least: 0.1 m, at_most: 9 m}'].join('\n');
    expect(testStudy({ require }).requirements).toHaveLength(30);
  });

  it('the one beyond is refused where it stands', () => {
    const text = studyText({ require: limits(34).join('\n') });
    const line = text.split('\n').findIndex((one) => one.includes('limit_32:')) + 1;
    expect.assertions(2);
    try {
      testStudy({ require: limits(34).join('\n') });
    } catch (error) {
      expect(error).toBeInstanceOf(StudyError);
      expect((error as StudyError).faults).toMatchObject([{ code: 'OUT_OF_RANGE', line, column: 3 }]);
    }
  });
});
