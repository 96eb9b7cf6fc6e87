import type { FinishedRun, PlannedRun, Reporter } from '../engine/reporter.ts';
import { byteText, countText, durationText } from '../reports/number-text.ts';

const barWidth = 30;
const barInterval = 100;
const lineInterval = 5000;

export type ProgressMode = 'bar' | 'lines' | 'json' | 'quiet';

/** How progress is told: a bar on a terminal, plain lines elsewhere, unless the user chose. */
export function progressMode(options: {
  quiet: boolean | undefined;
  jsonLines: boolean | undefined;
}): ProgressMode {
  if (options.quiet) return 'quiet';
  if (options.jsonLines) return 'json';
  return process.stderr.isTTY ? 'bar' : 'lines';
}

export function makeReporter(mode: ProgressMode): Reporter {
  switch (mode) {
    case 'quiet':
      return silentReporter;
    case 'json':
      return jsonReporter();
    default:
      return textReporter(mode === 'bar');
  }
}

const silentReporter: Reporter = {
  planned() {},
  progress() {},
  step() {},
  note() {},
  finished() {},
};

/** One JSON object a line on standard error, each with `event` and `time`. */
function jsonReporter(): Reporter {
  const tell = (event: string, fields: object) => {
    process.stderr.write(`${JSON.stringify({ event, time: new Date().toISOString(), ...fields })}\n`);
  };
  return {
    planned: (plan) => tell('planned', plan),
    progress: (done, total) => tell('progress', { done, total }),
    step: (what) => tell('step', { what }),
    note: (text) => tell('note', { text }),
    finished: (run) => tell('finished', run),
  };
}

function textReporter(bar: boolean): Reporter {
  let started = 0;
  let firstDone: number | undefined;
  let lastTold = 0;
  let barShown = false;
  const say = (text: string) => {
    if (barShown) process.stderr.write('\r\u001b[K');
    barShown = false;
    process.stderr.write(`${text}\n`);
  };
  return {
    planned(plan: PlannedRun) {
      for (const line of plannedLines(plan)) say(line);
      started = Date.now();
    },
    progress(done, total) {
      firstDone ??= done;
      const now = Date.now();
      if (done < total && now - lastTold < (bar ? barInterval : lineInterval)) return;
      lastTold = now;
      const text = progressText(done, total, done - firstDone, (now - started) / 1000);
      if (!bar) return say(text);
      const filled = Math.round((barWidth * done) / Math.max(1, total));
      process.stderr.write(`\r\u001b[K${'█'.repeat(filled)}${'░'.repeat(barWidth - filled)} ${text}`);
      barShown = true;
    },
    step: (what) => say(what),
    note: (text) => say(text),
    finished: (run) => say(finishedText(run)),
  };
}

function progressText(done: number, total: number, sinceStart: number, seconds: number): string {
  const percent = total === 0 ? 100 : Math.floor((100 * done) / total);
  const rate = seconds > 0 ? sinceStart / seconds : 0;
  const left = rate > 0 ? `, ${durationText((total - done) / rate)} left` : '';
  const perSecond = rate > 0 ? `, ${countText(Math.round(rate))}/s` : '';
  return `${percent} %  ${countText(done)} of ${countText(total)}${perSecond}${done < total ? left : ''}`;
}

export function plannedLines(plan: PlannedRun): string[] {
  const resumed =
    plan.alreadyDone > 0
      ? [`Going on from an earlier sitting: ${countText(plan.alreadyDone)} combinations are there.`]
      : [];
  return [
    plan.title,
    `${countText(plan.combinations)} combinations on ${plan.workers} worker${plan.workers === 1 ? '' : 's'}, about ${durationText(plan.secondsExpected)}; ` +
      `needs ${byteText(plan.bytesNeeded)} of ${byteText(plan.bytesFree)} free in ${plan.folder}`,
    ...resumed,
  ];
}

function finishedText(run: FinishedRun): string {
  const share = run.rows === 0 ? '' : ` (${((100 * run.feasible) / run.rows).toFixed(1)} %)`;
  return `Done in ${durationText(run.seconds)}: ${countText(run.feasible)} of ${countText(run.rows)} combinations are feasible${share}. See ${run.folder}/summary.md`;
}
