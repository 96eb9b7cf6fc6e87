import type { SkipRule } from '../study/study.ts';
import type { Stage } from './stage.ts';

/** Two values of an axis closer than this, relative to their size, count as equal in a skip test. */
const equalTolerance = 1e-9;

/** Writes `skipped`: 1 where every test of at least one rule holds. Reads varied numbers only. */
export function skipStage(rules: readonly SkipRule[], figureOfInput: (path: string) => string): Stage {
  const tests = rules.flatMap((rule, index) => rule.tests.map((test) => ({ ...test, rule: index })));
  return {
    name: 'skip',
    reads: tests.map((test) => figureOfInput(test.path)),
    writes: ['skipped'],
    cost: 2,
    kernel: (count, inputs, [skipped]) => {
      const holds = new Uint8Array(rules.length);
      for (let row = 0; row < count; row++) {
        holds.fill(1);
        for (let t = 0; t < tests.length; t++) {
          const { below, above, equal, rule } = tests[t];
          const value = inputs[t][row];
          const kept =
            (below === undefined || value < below) &&
            (above === undefined || value > above) &&
            (equal === undefined || Math.abs(value - equal) <= equalTolerance * Math.max(1, Math.abs(equal)));
          if (!kept) holds[rule] = 0;
        }
        skipped[row] = holds.includes(1) ? 1 : 0;
      }
    },
  };
}
