#!/usr/bin/env node
import type { Argv } from 'yargs';
/** Arguments and exit codes, nothing else. Every command is loaded only when it is called. */
import yargs from 'yargs';
import { hideBin } from 'yargs/helpers';
import { tellFailure, usageFailure } from './commands/failure.ts';
import { exitCodes } from './errors.ts';
import { program } from './version.ts';

/** yargs turns a repeated flag into a list and a bad number into NaN; both are mistakes here. */
function singleNumber(name: string) {
  return (value: unknown): number | undefined => {
    if (value === undefined) return undefined;
    if (Array.isArray(value) || typeof value !== 'number' || !Number.isFinite(value)) {
      throw usageFailure(`--${name} takes one number.`);
    }
    return value;
  };
}

function singleText(name: string) {
  return (value: unknown): string | undefined => {
    if (value === undefined) return undefined;
    if (typeof value !== 'string' || value === '') throw usageFailure(`--${name} takes one text.`);
    return value;
  };
}

function numberOption(describe: string, name: string) {
  return { type: 'number', describe, coerce: singleNumber(name), requiresArg: true } as const;
}

function textOption(describe: string, name: string) {
  return { type: 'string', describe, coerce: singleText(name), requiresArg: true } as const;
}

const studyArgument = { type: 'string', demandOption: true, describe: 'study file (YAML)' } as const;
const runArgument = {
  type: 'string',
  demandOption: true,
  describe: 'run folder, such as out/coastal-tourer',
} as const;

function runCommand(parser: Argv) {
  return parser.command(
    'run <study>',
    'evaluate every combination; leave table, charts, summary and shortlist in out/<name>/',
    (command) =>
      command
        .positional('study', studyArgument)
        .option('out', textOption('folder that holds the runs', 'out'))
        .option('name', textOption('name of the run folder (default: the study file’s)', 'name'))
        .option('workers', numberOption('worker threads (default: one per core)', 'workers'))
        .option(
          'part-size',
          numberOption('combinations a part, rounded up to whole blocks of 16384', 'part-size'),
        )
        .option('afresh', { type: 'boolean', default: false, describe: 'discard what the run folder holds' })
        .option('charts', {
          type: 'boolean',
          default: true,
          describe: 'draw the charts (--no-charts leaves them out)',
        })
        .option('quiet', { type: 'boolean', alias: 'q', describe: 'say nothing but errors' })
        .option('json-lines', {
          type: 'boolean',
          describe: 'progress as one JSON object a line',
        })
        .conflicts('quiet', 'json-lines'),
    async (args) => (await import('./commands/run.ts')).run(args),
  );
}

function readingCommands(parser: Argv) {
  return parser
    .command(
      'check <study>',
      'read a study, show its plan and estimates; write nothing',
      (command) =>
        command
          .positional('study', studyArgument)
          .option('out', textOption('folder whose disk the estimate looks at', 'out')),
      async (args) => (await import('./commands/check.ts')).check(args),
    )
    .command(
      'worksheet <study>',
      'one combination worked through, every figure with symbol, value, unit, formula and source',
      (command) =>
        command
          .positional('study', { ...studyArgument, describe: 'study file or run folder' })
          .option(
            'combination',
            numberOption('number of the combination (default: the baseline)', 'combination'),
          )
          .option('set', {
            type: 'string',
            array: true,
            requiresArg: true,
            describe: 'give the baseline another number: --set "wing.span=9.4 m"',
          })
          .option('markdown', { type: 'boolean', default: false, describe: 'as a Markdown table' }),
      async (args) => (await import('./commands/worksheet.ts')).worksheet(args),
    )
    .command(
      'charts <run>',
      'draw the charts of a finished run again',
      (command) =>
        command
          .positional('run', runArgument)
          .option(
            'band',
            textOption('another static-margin band, such as 8%:18% (either edge may be left out)', 'band'),
          )
          .option(
            'carpet',
            textOption('figure of the carpet plot, and two axes: "tail_area tail.arm tail.volume"', 'carpet'),
          ),
      async (args) => (await import('./commands/charts.ts')).charts(args),
    );
}

function referenceCommands(parser: Argv) {
  return parser
    .command(
      'figures [study]',
      'list every figure: name, symbol, unit, meaning, formula, source',
      (command) =>
        command
          .positional('study', { type: 'string', describe: 'study file, to list the figures of that study' })
          .option('json', { type: 'boolean', default: false, describe: 'as JSON' }),
      async (args) => (await import('./commands/figures.ts')).figures(args),
    )
    .command(
      'schema',
      'print the JSON Schema of study files, for editors',
      (command) => command,
      async () => (await import('./commands/schema.ts')).schema(),
    )
    .command(
      'new <kind>',
      'print a commented starter study, or write it with --to',
      (command) =>
        command
          .positional('kind', { choices: ['tourer', 'sailplane', 'uncrewed'] as const, demandOption: true })
          .option('to', textOption('file to write; it must not be there yet', 'to')),
      async (args) => (await import('./commands/new.ts')).newStudy(args),
    );
}

async function main(): Promise<void> {
  const parser = yargs(hideBin(process.argv))
    .scriptName('aftlimit')
    .locale('en')
    .usage(
      '$0 <command>\n\nTrade studies of wing and tail: is the static margin kept over the whole loading range?',
    )
    .version(program.version)
    .help()
    .alias('h', 'help')
    .strict()
    .recommendCommands()
    .demandCommand(1, 'A command is wanted; see --help.')
    .parserConfiguration({ 'duplicate-arguments-array': true, 'parse-positional-numbers': false })
    .wrap(Math.min(110, process.stdout.columns ?? 100))
    .epilogue(
      'Results go to standard output, everything else to standard error. Exit 0: done; 1: the machine; 2: the study or the arguments.',
    )
    .completion('completion', 'print a completion script for bash or zsh')
    .exitProcess(false)
    .fail((message, error) => {
      throw error ?? usageFailure(message);
    });
  referenceCommands(readingCommands(runCommand(parser)));
  await parser.parseAsync();
}

process.stdout.on('error', (error: NodeJS.ErrnoException) => {
  if (error.code === 'EPIPE') process.exit(exitCodes.done);
  throw error;
});

main().catch(async (error: unknown) => {
  process.exitCode = await tellFailure(error);
});
