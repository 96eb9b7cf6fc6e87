import { DataError, exitCodes, MachineError, StudyError, UsageError } from '../errors.ts';

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
  if (error instanceof StudyError || error instanceof DataError) {
    const { formatStudyError } = await import('../study/format-study-error.ts');
    process.stderr.write(`${formatStudyError(error, { color: colourAllowed() })}\n`);
  } else if (error instanceof UsageError || error instanceof MachineError) {
    process.stderr.write(`${error.code}  ${error.message}\n  ${error.remedy}\n`);
  } else {
    process.stderr.write(`This is a bug in aftlimit; finished parts are safe.\n${stackOf(error)}\n`);
  }
  return exitCodeOf(error);
}

/** The same as one JSON object on a line, for `--json-lines`. @returns the exit code */
export function tellFailureAsLine(error: unknown): number {
  const exitCode = exitCodeOf(error);
  const said = { event: 'failed', time: new Date().toISOString(), exitCode, ...failureFields(error) };
  process.stderr.write(`${JSON.stringify(said)}\n`);
  return exitCode;
}

function failureFields(error: unknown): object {
  if (error instanceof StudyError || error instanceof DataError) {
    return { message: error.message, file: error.file, faults: error.faults };
  }
  if (error instanceof UsageError || error instanceof MachineError) {
    return { code: error.code, message: error.message, remedy: error.remedy };
  }
  return { message: 'This is a bug in aftlimit; finished parts are safe.', stack: stackOf(error) };
}

function exitCodeOf(error: unknown): number {
  const isUsers = error instanceof StudyError || error instanceof DataError || error instanceof UsageError;
  if (isUsers) return exitCodes.user;
  return error instanceof MachineError ? exitCodes.machine : exitCodes.bug;
}

function stackOf(error: unknown): string {
  return error instanceof Error ? (error.stack ?? error.message) : String(error);
}
