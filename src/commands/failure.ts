import { exitCodes, MachineError, StudyError, UsageError } from '../errors.ts';

/** A mistake in the arguments, as found by the argument parser. */
export function usageFailure(message: string): UsageError {
  return new UsageError(
    'BAD_ARGUMENT',
    message,
    'aftlimit --help lists the commands, aftlimit COMMAND --help its options.',
  );
}

/** Whether colour may be used on standard error (NO_COLOR, https://no-color.org, switches it off). */
export function colourAllowed(): boolean {
  return Boolean(process.stderr.isTTY) && !process.env.NO_COLOR;
}

/** Tells the user what went wrong on standard error. @returns the exit code */
export async function tellFailure(error: unknown): Promise<number> {
  if (error instanceof StudyError) {
    const { formatStudyError } = await import('../study/format-study-error.ts');
    process.stderr.write(`${formatStudyError(error, { color: colourAllowed() })}\n`);
    return exitCodes.user;
  }
  if (error instanceof UsageError || error instanceof MachineError) {
    process.stderr.write(`${error.code}  ${error.message}\n  ${error.remedy}\n`);
    return error instanceof UsageError ? exitCodes.user : exitCodes.machine;
  }
  const stack = error instanceof Error ? (error.stack ?? error.message) : String(error);
  process.stderr.write(`This is a bug in aftlimit; finished parts are safe.\n${stack}\n`);
  return exitCodes.bug;
}
