/** The figure that says what came of sizing: an index into `sizeOutcomes`. */
export const sizeOutcomeFigure = 'size_outcome';

/** What came of choosing a number of the study so that a figure reaches a value. */
export const sizeOutcomes = [
  'solved',
  'no solution between the ends',
  'several solutions; none taken',
  'the chosen number has no effect on the figure',
  'no solution found, and the figure cannot be worked out over part of the range',
] as const;

export type SizeOutcome = (typeof sizeOutcomes)[number];

export function sizeOutcomeIndex(outcome: SizeOutcome): number {
  return sizeOutcomes.indexOf(outcome);
}
