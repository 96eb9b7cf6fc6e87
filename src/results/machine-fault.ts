import { MachineError, type MachineFaultCode } from '../errors.ts';

const writeFaults: Record<string, { code: MachineFaultCode; found: string; remedy: string }> = {
  ENOSPC: {
    code: 'DISK_FULL',
    found: 'the disk is full',
    remedy: 'Nothing finished is lost. Make room and run the same command again: it goes on from there.',
  },
  EACCES: {
    code: 'NO_PERMISSION',
    found: 'it may not be written',
    remedy: 'Choose another folder, or get permission to write there, and run the same command again.',
  },
};
writeFaults.EDQUOT = { ...writeFaults.ENOSPC, found: "the disk's quota is used up" };
writeFaults.EPERM = writeFaults.EACCES;
writeFaults.EROFS = { ...writeFaults.EACCES, found: 'the disk is read-only' };

/** A failed write as the fault of the machine it is; what is no fault of the file system comes back unchanged. */
export function writeFault(error: unknown, path: string): unknown {
  const code = faultCode(error);
  if (code === undefined) return error;
  const {
    code: kind,
    found,
    remedy,
  } = writeFaults[code] ?? {
    code: 'WRITE_FAILED',
    found: `the machine refused (${code})`,
    remedy: 'Nothing finished is lost. Once the cause is gone, run the same command again.',
  };
  return new MachineError(kind, `Could not write ${path}: ${found}.`, remedy);
}

/** A failed read, likewise. */
export function readFault(error: unknown, path: string): unknown {
  const code = faultCode(error);
  if (code === undefined) return error;
  return new MachineError(
    'READ_FAILED',
    `Could not read ${path}: the machine refused (${code}).`,
    'Check that the file is there and may be read, and run the same command again.',
  );
}

function faultCode(error: unknown): string | undefined {
  if (!(error instanceof Error) || !('code' in error) || !('syscall' in error)) return undefined;
  return typeof error.code === 'string' ? error.code : undefined;
}
