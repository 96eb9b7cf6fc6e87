#!/usr/bin/env node
/** Arguments and exit codes, nothing else. Every command is loaded only when it is called. */
import type { Argv } from 'yargs';
import {
  flag,
  neededTextOption,
  numberOption,
  repeatedTextOption,
  textOption,
} from './commands/arguments.ts';
import { complete } from './commands/complete.ts';
import { tellFailure, usageFailure } from './commands/failure.ts';
import { hideBin, yargs } from './commands/yargs.ts';
import { exitCodes } from './errors.ts';
import { program } from './version.ts';

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
        .option('out', textOption('out', 'folder that holds the runs'))
        .option('name', textOption('name', 'name of the run folder (default: the study file’s)'))
        .option('workers', numberOption('workers', 'worker threads (default: one per core)'))
        .option(
          'part-size',
          numberOption('part-size', 'combinations a part, rounded up to whole blocks of 16384'),
        )
        .option('afresh', flag('afresh', 'discard what the run folder holds'))
        .option('charts', {
          ...flag('charts', 'draw the charts (--no-charts leaves them out)'),
          default: true,
        })
        .option('quiet', { ...flag('quiet', 'say nothing but errors'), alias: 'q' })
        .option('json-lines', flag('json-lines', 'progress as one JSON object a line'))
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
          .option('out', textOption('out', 'folder whose disk the estimate looks at')),
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
            numberOption('combination', 'number of the combination (default: the baseline)'),
          )
          .option('set', repeatedTextOption('give the baseline another number: --set "wing.span=9.4 m"'))
          .option('markdown', flag('markdown', 'as a Markdown table')),
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
            textOption('band', 'another static-margin band, such as 8%:18% (either edge may be left out)'),
          )
          .option(
            'carpet',
            textOption('carpet', 'figure of the carpet plot, and two axes: "tail_area tail.arm tail.volume"'),
          ),
      async (args) => (await import('./commands/charts.ts')).charts(args),
    );
}

function flightTestCommand(parser: Argv) {
  return parser.command(
    'flight-test <data>',
    'neutral point from measured elevator angles and stick forces, and the correction for a study',
    (command) =>
      command
        .positional('data', { type: 'string', demandOption: true, describe: 'table of flown points (CSV)' })
        .option('study', neededTextOption('study', 'study file or run folder of the flown aeroplane'))
        .option(
          'condition',
          textOption(
            'condition',
            'flight condition of the prediction (default: the first that has the flown power and flaps)',
          ),
        )
        .option('to', textOption('to', 'file for the report; it must not be there yet'))
        .option('chart', textOption('chart', 'folder to draw the charts into')),
    async (args) => (await import('./commands/flight-test.ts')).flightTest(args),
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
          .option('json', flag('json', 'as JSON')),
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
          .option('to', textOption('to', 'file to write; it must not be there yet')),
      async (args) => (await import('./commands/new.ts')).newStudy(args),
    );
}

/** The parser's own sentences where they leave out what is meant. */
const wording: Record<string, unknown> = {
  string: 'value',
  boolean: 'flag',
  'Did you mean %s?': 'There is no such command; did you mean %s?',
  'Not enough non-option arguments: got %s, need at least %s': {
    one: 'Too few arguments: %s given, %s needed.',
    other: 'Too few arguments: %s given, %s needed.',
  },
  'Not enough arguments following: %s': '--%s is given without its value.',
};

function makeParser(): Argv {
  const parser = yargs(hideBin(process.argv))
    .scriptName('aftlimit')
    .locale('en')
    .updateStrings(wording as Record<string, string>)
    .usage(
      '$0 <command>\n\nTrade studies of wing and tail: is the static margin kept over the whole loading range?',
    )
    .version(program.version)
    .help()
    .alias('h', 'help')
    .strict()
    .recommendCommands()
    .demandCommand(1, 'A command is wanted; see --help.')
    .parserConfiguration({
      // Said outright, though it is so anyway: else completion does not offer --no-charts.
      'boolean-negation': true,
      'duplicate-arguments-array': true,
      'parse-positional-numbers': false,
      'dot-notation': false,
    })
    .wrap(Math.min(110, process.stdout.columns ?? 100))
    .epilogue(
      'Results go to standard output, everything else to standard error. Exit 0: done; 1: the machine; 2: the study or the arguments; 130: stopped by Ctrl-C.',
    )
    .exitProcess(false)
    .fail((message, error) => {
      // The parser throws its own kind of error for a mistake in the arguments, too.
      throw error === undefined || error.name === 'YError' ? usageFailure(message) : error;
    });
  return referenceCommands(flightTestCommand(readingCommands(runCommand(parser)))).completion(
    'completion',
    'print a completion script for bash, zsh or fish',
    offerWords,
  );
}

/** Answers the completion script, which calls with what is typed so far. At once: the parser does not wait. */
function offerWords(
  _current: string,
  _args: unknown,
  offeredByParser: (done: (error: Error | null, words?: string[]) => void) => void,
  done: (words: string[]) => void,
): void {
  const [, ...words] = hideBin(process.argv);
  offeredByParser((_error, offered = []) => done(complete(words, offered)));
}

/** A reader that has seen enough (`| head`) ends the program; any other refusal is the machine's fault. */
process.stdout.on('error', async (error: NodeJS.ErrnoException) => {
  if (error.code === 'EPIPE') process.exit(exitCodes.done);
  const { writeFault } = await import('./results/machine-fault.ts');
  process.exit(await tellFailure(writeFault(error, 'to standard output')));
});
/** A run goes on when nobody listens any more. */
process.stderr.on('error', () => {});

try {
  await makeParser().parseAsync();
} catch (error) {
  // What is typed so far may well be wrong while a shell asks how it could go on.
  const isUnfinished = process.argv.includes('--get-yargs-completions');
  process.exitCode = isUnfinished ? exitCodes.done : await tellFailure(error);
}
