/**
 * Combinations a second of evaluation alone, one thread, every figure of the table: the engine with
 * its shared stages against the same formulas one combination at a time.
 */

import { readFileSync } from 'node:fs';
import { Evaluator } from '../../src/engine/evaluator.ts';
import { layOut } from '../../src/engine/lay-out.ts';
import type { Plan } from '../../src/plan/plan.ts';
import { blockCount, blockSize } from '../../src/plan/plan.ts';
import { readStudyFile, readStudyText } from '../../src/read-study-file.ts';
import type { Study } from '../../src/study/study.ts';
import type { PlainInputs } from '../engine/plain-loop.ts';
import { evaluatePlain, isPlainPath, plainFigures, plainInputs } from '../engine/plain-loop.ts';
import { randomNumbers } from '../results/sample-table.ts';
import type { BenchRow, Job } from './measure.ts';
import { measure } from './measure.ts';

const sampled = 60_000;
let consumed = 0;

/** The tourer without its skip rule, so that both ways do the same combinations. */
function tourer(): Study {
  return { ...readStudyFile('test/plain-tourer.yaml'), skip: [] };
}

/** The demo tourer without what it sizes: four conditions, power, flaps, loading, trim and the forward limit. */
function wholeTourerText(): string {
  return readFileSync('studies/coastal-tourer.yaml', 'utf8').replace(/^size:.*\n/m, '');
}

function wholeTourer(): Study {
  return { ...readStudyText(wholeTourerText(), 'whole-tourer.yaml'), skip: [] };
}

/** The same with the tail volume chosen in each combination so that the aft margin is 8 %. */
function sizedTourer(): Study {
  const text = wholeTourerText()
    .replace(/^ {2}tail\.volume: .*\n/m, '')
    .concat('\nsize: {choose: tail.volume, so_that: static_margin_aft, is: 8 %, between: [0.2, 1.2]}\n');
  return { ...readStudyText(text, 'sized-tourer.yaml'), skip: [] };
}

/** A study whose every number varies along one axis of random points: nothing can be shared. */
function sampledTourer(): Study {
  const study = tourer();
  const random = randomNumbers(11);
  const paths = study.axes.flatMap((axis) => axis.paths);
  const ranges = study.axes.flatMap((axis) => axis.values);
  const values = ranges.map((range) => {
    const [least, greatest] = [Math.min(...range), Math.max(...range)];
    return Float64Array.from({ length: sampled }, () => least + (greatest - least) * random());
  });
  return { ...study, axes: [{ name: 'sample', paths, values }] };
}

function singleAxisTourer(): Study {
  const study = tourer();
  const values = [Float64Array.from({ length: sampled }, (_, i) => 3.6 + (1.6 * i) / (sampled - 1))];
  return { ...study, axes: [{ name: 'tail.arm', paths: ['tail.arm'], values }] };
}

function engineJob(job: string, study: Study, note: string): Job {
  const { plan, columns } = layOut(study);
  const evaluator = new Evaluator(
    plan,
    columns.map((column) => column.figure.name),
  );
  const margin = columns.findIndex((column) => column.figure.name === 'static_margin_aft');
  const blocks = blockCount(plan);
  return {
    job,
    unit: 'combinations/s',
    note: `${columns.length} columns; ${note}`,
    once: () => {
      let rows = 0;
      for (let block = 0; block < blocks; block++) {
        rows += evaluator.evaluate(block * blockSize, blockSize);
        // A sized study leaves rows without a solution empty.
        const value = evaluator.columns[margin][0];
        if (!Number.isNaN(value)) consumed += value;
      }
      return rows;
    },
  };
}

/** Sets the numbers of the plan's axes one combination after the other, the fastest axis last. */
function plainJob(job: string, study: Study, note: string): Job {
  const { plan } = layOut(study);
  const inputs = plainInputs(study);
  const out = new Float64Array(plainFigures.length);
  const margin = plainFigures.indexOf('static_margin_aft');
  const setters = axisSetters(plan, study, inputs);
  return {
    job,
    unit: 'combinations/s',
    note,
    once: () => {
      const digits = new Int32Array(plan.axes.length);
      setters.forEach((set) => {
        set(0);
      });
      for (let combination = 0; combination < plan.combinations; combination++) {
        evaluatePlain(inputs, out);
        consumed += out[margin];
        // Step the digits like an odometer.
        for (let axis = digits.length - 1; axis >= 0; axis--) {
          digits[axis] = (digits[axis] + 1) % plan.axes[axis].size;
          setters[axis](digits[axis]);
          if (digits[axis] !== 0) break;
        }
      }
      return plan.combinations;
    },
  };
}

function axisSetters(plan: Plan, study: Study, inputs: PlainInputs): ((position: number) => void)[] {
  return plan.axes.map((_axis, place) => {
    const { paths, values } = study.axes[plan.authorOrder.indexOf(place)];
    const plain = paths.map((path) => {
      if (!isPlainPath(path)) throw new Error(`the plain loop does not know ${path}`);
      return path;
    });
    return (position) => {
      for (let k = 0; k < plain.length; k++) inputs.numbers[plain[k]] = values[k][position];
    };
  });
}

/** Both ways must agree before either is timed. */
function checkAgreement(study: Study): void {
  const { plan } = layOut(study);
  const evaluator = new Evaluator(plan, plainFigures);
  const inputs = plainInputs(study);
  const setters = axisSetters(plan, study, inputs);
  const out = new Float64Array(plainFigures.length);
  const rows = evaluator.evaluate(0, Math.min(plan.combinations, blockSize));
  for (let row = 0; row < rows; row += 997) {
    let rest = row;
    for (let axis = plan.axes.length - 1; axis >= 0; axis--) {
      setters[axis](rest % plan.axes[axis].size);
      rest = Math.floor(rest / plan.axes[axis].size);
    }
    evaluatePlain(inputs, out);
    plainFigures.forEach((name, k) => {
      const [engine, plain] = [evaluator.columns[k][row], out[k]];
      const same =
        Object.is(engine, plain) || Math.abs(engine - plain) <= 1e-9 * Math.max(1, Math.abs(plain));
      if (!same) throw new Error(`${name} of combination ${row}: engine ${engine}, plain loop ${plain}`);
    });
  }
}

export async function benchEvaluation(): Promise<BenchRow[]> {
  const studies = [
    { name: 'tourer study', study: tourer() },
    { name: 'sampled study', study: sampledTourer() },
    { name: 'single-axis study', study: singleAxisTourer() },
  ];
  for (const { study } of studies) checkAgreement(study);
  const rows = await measure(
    studies.flatMap(({ name, study }) => [
      engineJob(`evaluation, ${name}, engine`, study, 'shared stages'),
      plainJob(`evaluation, ${name}, plain loop`, study, 'one combination at a time'),
    ]),
  );
  rows.push(
    ...(await measure([
      engineJob(
        'evaluation, whole tourer, engine',
        wholeTourer(),
        'four conditions, power, flaps, loading, trim',
      ),
      engineJob(
        'evaluation, sized tourer, engine',
        sizedTourer(),
        'the same, tail volume chosen for 8 % margin',
      ),
    ])),
  );
  if (!(consumed > 0)) throw new Error('a margin was not computed');
  return rows;
}
