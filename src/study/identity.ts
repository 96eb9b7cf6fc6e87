import { createHash } from 'node:crypto';
import type { Study } from './study.ts';

/**
 * SHA-256 over everything in a study that settles its results: numbers, choices, axes, skips,
 * requirements, table columns. Titles, comments and layout of the file do not enter.
 */
export function studyIdentity(study: Study): string {
  const { inputs, wing, tail, body, cg, conditions, methods, axes, skip, band, requirements, columns } =
    study;
  const { flaps, propeller, hinge, control, landingGear, loading, size, corrections } = study;
  const content = {
    inputs: [...inputs].sort(([p], [q]) => (p < q ? -1 : 1)),
    wing,
    tail,
    body: body ?? 'none',
    cg,
    equipment: { flaps, propeller, hinge, control, landingGear },
    loading,
    size,
    corrections,
    conditions,
    methods,
    axes: axes.map(({ name, paths, values }) => ({
      name,
      paths,
      values: values.map((column) => [...column]),
    })),
    skip,
    band,
    requirements,
    columns: columns ?? 'all',
  };
  return createHash('sha256').update(JSON.stringify(content)).digest('hex');
}
