import { describe, expect, it } from 'vitest';
import type { StudyError } from '../../src/errors.ts';
import { replaced, studyText, testStudy } from '../studies.ts';

const path = 'body.stations[8].at';

describe('the last body station, varied', () => {
  it('must reach the tail', () => {
    const changes = { vary: `${path}: [6.95 m, 6.6 m, 6.2 m]` };
    const lines = studyText(changes).split('\n');
    const line = lines.findIndex((one) => one.includes(`${path}:`)) + 1;
    const column = lines[line - 1].indexOf('6.2 m') + 1;
    expect.assertions(1);
    try {
      testStudy(changes);
    } catch (error) {
      expect((error as StudyError).faults).toMatchObject([{ code: 'TAIL_BEYOND_BODY', line, column }]);
    }
  });

  it('may end ahead of it where a boom goes on', () => {
    const body = replaced('body', 'depth: 0.22 m}]', 'depth: 0.22 m}], boom: {width: 0.1 m, depth: 0.1 m}');
    expect(testStudy({ body, vary: `${path}: [6.95 m, 6.2 m]` }).axes).toHaveLength(1);
  });
});
