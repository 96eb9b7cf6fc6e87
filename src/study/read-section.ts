import { shareOfSectionMaximumLift } from '../methods/maximum-lift.ts';
import { type Section, sectionByName, sections } from '../methods/sections-table.ts';
import { offer } from './nearest-known.ts';
import { shorten } from './quantities.ts';
import type { Reading } from './reading.ts';
import { type SourceNode, type Span, valueIn } from './source.ts';

type Surface = 'wing' | 'tail';

const sectionKeys = [
  ['lift_slope', 'liftSlope'],
  ['zero_lift_angle', 'zeroLiftAngle'],
  ['moment', 'moment'],
  ['aerodynamic_centre', 'aerodynamicCentre'],
  ['maximum_lift', 'maximumLift'],
  ['thickness', 'thickness'],
] as const satisfies readonly (readonly [string, keyof Section])[];

/** A thin symmetric section, as tails have. */
const customaryTailSection = 'naca-0009';

/** Reads a section by name or by numbers; returns the name where one stands. */
export function readSection(surface: Surface, map: SourceNode, reading: Reading): string | undefined {
  const node = valueIn(map, 'section');
  if (!node)
    return surface === 'tail' ? assumeTailSection(map, reading) : enterUnknown(surface, map.span, reading);
  if (node.kind === 'map') {
    for (const [key] of sectionKeys) reading.take(node, key, `${surface}.section.${key}`);
    return undefined;
  }
  if (node.kind !== 'scalar' || typeof node.value !== 'string')
    return enterUnknown(surface, node.span, reading);
  const found = sectionByName(node.value);
  if (found) {
    enterNumbers(surface, found, node.span, reading);
    return found.name;
  }
  tellUnknownSection(node.value, node.span, surface, reading);
  return enterUnknown(surface, node.span, reading);
}

/** Reads the greatest lift of a whole wing or tail; left out, it follows from the section's. */
export function readMaximumLift(surface: Surface, map: SourceNode, reading: Reading): void {
  const path = `${surface}.maximum_lift`;
  if (reading.take(map, 'maximum_lift', path)) return;
  const value = `${shareOfSectionMaximumLift} × that of its section`;
  reading.assumptions.push({ path, value, source: 'common practice, no source' });
}

function enterNumbers(surface: Surface, section: Section, span: Span, reading: Reading): void {
  for (const [key, field] of sectionKeys) {
    reading.inputs.set(`${surface}.section.${key}`, section[field]);
    reading.spans.set(`${surface}.section.${key}`, span);
  }
}

function enterUnknown(surface: Surface, span: Span, reading: Reading): undefined {
  for (const [key] of sectionKeys) {
    reading.inputs.set(`${surface}.section.${key}`, Number.NaN);
    reading.spans.set(`${surface}.section.${key}`, span);
  }
}

function assumeTailSection(map: SourceNode, reading: Reading): string {
  const section = sectionByName(customaryTailSection)!;
  enterNumbers('tail', section, map.span, reading);
  const source = `thin and symmetric; common practice, no source. Its numbers: ${section.source}`;
  reading.assumptions.push({ path: 'tail.section', value: section.name, source });
  return section.name;
}

function tellUnknownSection(name: string, span: Span, surface: Surface, reading: Reading): void {
  reading.faults.add(
    'UNKNOWN_SECTION',
    span,
    `${surface}.section is '${shorten(name)}', which is not in the shipped table.`,
    `${offer(
      name.toLowerCase().replace(/[\s_]+/g, '-'),
      sections.map((entry) => entry.name),
    )} Or give its own numbers: {lift_slope: 6.1 /rad, zero_lift_angle: -2 deg, moment: -0.05}.`,
  );
}
