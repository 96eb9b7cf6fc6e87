import { basename, dirname, join, relative } from 'node:path';
import { flightTestSlopes, renderChart } from '../charts/index.ts';
import { flightTestChartData } from '../flight-test/chart-data.ts';
import { type ComparedState, compareState, conditionOf } from '../flight-test/compare.ts';
import { measureState } from '../flight-test/measure.ts';
import { predict } from '../flight-test/predict.ts';
import { readFlownPoints } from '../flight-test/read-data.ts';
import { flightTestMarkdown } from '../flight-test/report.ts';
import { flownStates } from '../flight-test/states.ts';
import { offer } from '../study/nearest-known.ts';
import type { Condition, Study } from '../study/study.ts';
import { program } from '../version.ts';
import { usageFailure } from './failure.ts';
import { checkNewFile, writeNewFile } from './new-file.ts';
import { readStudyOf } from './worksheet.ts';

export interface FlightTestArguments {
  /** Table of flown points. */
  readonly data: string;
  /** Study file or run folder. */
  readonly study: string;
  readonly condition: string | undefined;
  readonly to: string | undefined;
  readonly chart: string | undefined;
}

/** Reports what measured elevator angles and stick forces say of the neutral point. */
export async function flightTest({
  data,
  study: path,
  condition,
  to,
  chart,
}: FlightTestArguments): Promise<void> {
  if (to !== undefined) checkNewFile(to);
  const study = readStudyOf(path);
  const named = condition === undefined ? undefined : conditionNamed(study, condition);
  const { wing } = predict(study, named ?? study.conditions[0]!);
  const points = await readFlownPoints(data, wing);
  const states = flownStates(points).map((state) => {
    const prediction = predict(study, named ?? conditionOf(state, study.conditions));
    return compareState(state, measureState(state), prediction);
  });
  const pictures =
    chart === undefined ? new Map<ComparedState, string[]>() : await drawStates(states, study, chart, to);
  const markdown = flightTestMarkdown({
    study,
    data: basename(data),
    points,
    wing,
    states,
    picturesOf: (state) => pictures.get(state) ?? [],
  });
  if (to === undefined) process.stdout.write(markdown);
  else {
    writeNewFile(to, markdown);
    process.stderr.write(`${to} is written.\n`);
  }
}

function conditionNamed({ conditions }: Study, name: string): Condition {
  const found = conditions.find((condition) => condition.name === name);
  if (found !== undefined) return found;
  const names = conditions.map((condition) => condition.name);
  throw usageFailure(`--condition: the study has no condition ${name}. ${offer(name, names)}`);
}

/** Draws each measured neutral point. @returns paths of the PNGs as the report names them, by state */
async function drawStates(
  states: readonly ComparedState[],
  study: Study,
  folder: string,
  report: string | undefined,
): Promise<Map<ComparedState, string[]>> {
  const pictures = new Map<ComparedState, string[]>();
  const date = new Date().toISOString().slice(0, 10);
  const of = `${program.name} ${program.version}`;
  let drawn = 0;
  for (const [index, compared] of states.entries()) {
    for (const measured of compared.measured) {
      const title = `Flight test: ${compared.state.name}`;
      const heading = { title, study: study.title, date, program: of };
      const data = flightTestChartData(measured, compared, heading);
      if (data === undefined) continue;
      const name = ['flight-test', index + 1, slug(compared.state.name), measured.kind].join('-');
      await renderChart(name, flightTestSlopes(data), folder);
      const path = relative(report === undefined ? '.' : dirname(report), join(folder, `${name}.png`));
      pictures.set(compared, [...(pictures.get(compared) ?? []), path]);
      drawn++;
    }
  }
  process.stderr.write(`${drawn} chart${drawn === 1 ? '' : 's'} in ${folder}\n`);
  return pictures;
}

/** Part of a file name; other signs than letters and digits become hyphens. */
function slug(text: string): string {
  const longest = 40;
  return text
    .replaceAll(/[^A-Za-z0-9]+/g, '-')
    .replaceAll(/^-|-$/g, '')
    .slice(0, longest);
}
