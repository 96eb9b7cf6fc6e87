import { UsageError } from '../errors.ts';
import { inputDefinition } from './inputs.ts';
import { nearestKnown } from './nearest-known.ts';
import { isFault, parseQuantity } from './quantities.ts';
import type { Study } from './study.ts';
import { plainPath } from './varied-paths.ts';

export interface Replacement {
  readonly path: string;
  /** SI. */
  readonly value: number;
}

/**
 * Reads `wing.span=9.4 m`: one number of the study and a value for it.
 * Throws UsageError BAD_ARGUMENT for a path that is no number of this study, or an unreadable value.
 */
export function readReplacement(study: Study, text: string): Replacement {
  const [, word = '', quantity = ''] = /^\s*([^=]+?)\s*=\s*(.*?)\s*$/.exec(text) ?? [];
  const path = plainPath(word, study);
  if (!study.inputs.has(path)) {
    const nearest = nearestKnown(path, [...study.inputs.keys()]);
    const offer = nearest === undefined ? 'aftlimit figures STUDY lists them.' : `Did you mean ${nearest}?`;
    throw new UsageError('BAD_ARGUMENT', `'${text}' names no number that this study gives.`, offer);
  }
  const kind = path === 'cg.forward' ? study.cg.forward : path === 'cg.aft' ? study.cg.aft : undefined;
  const read = parseQuantity(quantity, inputDefinition(path, kind), path);
  if (isFault(read)) throw new UsageError('BAD_ARGUMENT', read.found, read.remedy);
  return { path, value: read.si };
}
