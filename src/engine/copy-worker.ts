/** A worker thread that copies parts into the cases files. */
import { MachineError } from '../errors.ts';
import { copyPart } from '../results/assemble.ts';
import type { CopyAnswer, CopyPart } from './messages.ts';

export default function copy({ copy: work }: CopyPart): CopyAnswer {
  try {
    return { kind: 'part_copied', whole: copyPart(work) };
  } catch (error) {
    if (!(error instanceof MachineError)) throw error;
    const { code, message, remedy } = error;
    return { kind: 'part_not_copied', code, message, remedy };
  }
}
