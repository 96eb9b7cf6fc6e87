/**
 * The argument parser. The build puts it into one file: read as the forty files it is installed as,
 * it takes a third of the time that `--help` may take.
 */
export { default as yargs } from 'yargs';
export { hideBin } from 'yargs/helpers';
