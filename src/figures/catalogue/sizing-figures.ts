import { entry, sources } from './entry.ts';

/** What came of choosing a number of the study in each combination. */
export const sizingFigures = {
  size_outcome: entry(
    '–',
    'count',
    'What came of choosing a number so that a figure reaches its value; unless solved that number is empty.',
    'changes of sign on an even grid of nine, each closed in on by bracketed steps',
    sources.study,
    'choice',
  ),
} as const;
