/** `npm run bench`: prints one table; names of benches as arguments run only those. */
import { cpus } from 'node:os';
import { benchEvaluation } from './evaluate.bench.ts';
import type { BenchRow } from './measure.ts';
import { benchResults } from './results.bench.ts';
import { benchRuns } from './run.bench.ts';

const benches: Record<string, () => Promise<BenchRow[]>> = {
  evaluation: benchEvaluation,
  results: benchResults,
  runs: benchRuns,
};

function amount(value: number): string {
  if (value >= 1e6) return `${(value / 1e6).toFixed(2)} M`;
  if (value >= 1e4) return `${Math.round(value / 1e3)} k`;
  return value.toFixed(0);
}

const wanted = process.argv.slice(2);
const unknown = wanted.filter((name) => !(name in benches));
if (unknown.length > 0) {
  process.stderr.write(`no bench ${unknown.join(', ')}; there are ${Object.keys(benches).join(', ')}\n`);
  process.exit(2);
}
process.stdout.write(
  `Node ${process.versions.node}, ${cpus().length} cores, ${cpus()[0]?.model ?? 'unknown processor'}\n\n` +
    '| job | median | spread | unit | |\n|---|---:|---:|---|---|\n',
);
for (const [name, bench] of Object.entries(benches)) {
  if (wanted.length > 0 && !wanted.includes(name)) continue;
  for (const { job, unit, median, spread, note } of await bench()) {
    process.stdout.write(
      `| ${job} | ${amount(median)} | ${amount(spread[0])}–${amount(spread[1])} | ${unit} | ${note} |\n`,
    );
  }
}
