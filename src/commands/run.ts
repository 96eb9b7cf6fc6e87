import { availableParallelism } from 'node:os';
import { exitCodes } from '../errors.ts';
import { runStudy } from '../run-study.ts';
import { tellFailureAsLine, usageFailure } from './failure.ts';
import { makeReporter, progressMode } from './progress.ts';

export interface RunArguments {
  readonly study: string;
  readonly out: string | undefined;
  readonly name: string | undefined;
  readonly workers: number | undefined;
  readonly partSize: number | undefined;
  readonly afresh: boolean | undefined;
  readonly charts: boolean | undefined;
  readonly quiet: boolean | undefined;
  readonly jsonLines: boolean | undefined;
}

export const defaultOut = 'out';
/** More threads than this only wait for the disk. */
const mostWorkers = 256;

/** Evaluates a study; the first Ctrl-C stops it cleanly, the second at once. */
export async function run(args: RunArguments): Promise<void> {
  const { name, partSize } = args;
  if (name !== undefined && (/[\\/]/.test(name) || name.startsWith('.'))) {
    throw usageFailure('--name is one folder name, without slashes and not hidden.');
  }
  const stop = new AbortController();
  const mode = progressMode(args);
  const reporter = makeReporter(mode);
  const onSignal = (signal: NodeJS.Signals) => {
    if (stop.signal.aborted) process.exit(exitCodes.interrupted);
    reporter.note(`${signal}: finishing the parts in hand, then stopping. Once more stops at once.`);
    stop.abort();
  };
  process.on('SIGINT', onSignal).on('SIGTERM', onSignal);
  try {
    const outcome = await runStudy(
      {
        studyFile: args.study,
        out: args.out ?? defaultOut,
        ...(name === undefined ? {} : { name }),
        workers: wholeNumber('workers', args.workers, mostWorkers) ?? availableParallelism(),
        ...(partSize === undefined
          ? {}
          : { partSize: wholeNumber('part-size', partSize, Number.MAX_SAFE_INTEGER) ?? partSize }),
        afresh: args.afresh ?? false,
        charts: args.charts ?? true,
        stop: stop.signal,
      },
      reporter,
    );
    if (outcome === 'stopped') process.exitCode = exitCodes.interrupted;
  } catch (error) {
    if (mode !== 'json') throw error;
    process.exitCode = tellFailureAsLine(error);
  } finally {
    process.off('SIGINT', onSignal).off('SIGTERM', onSignal);
  }
}

function wholeNumber(option: string, value: number | undefined, most: number): number | undefined {
  if (value === undefined) return undefined;
  if (!Number.isInteger(value) || value < 1 || value > most) {
    throw usageFailure(
      `--${option} is a whole number from 1${most < Number.MAX_SAFE_INTEGER ? ` to ${most}` : ' up'}.`,
    );
  }
  return value;
}
