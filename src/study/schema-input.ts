/** How one number or text of a study stands in the schema, with words and examples for editors. */
import { z } from 'zod';
import type { Dimension } from '../figures/figure.ts';
import { type InputDefinition, inputDefinition } from './inputs.ts';
import { shortNumber, unitExamples } from './quantities.ts';
import type { CgKind } from './study.ts';

export const words = (text: string) => z.string().meta({ description: text });
export const anyNumber = z.union([z.number(), z.string()]);

const examples: Record<Dimension, readonly (string | number)[]> = {
  length: ['2.5 m', '250 mm', '8.2 ft', '98 in'],
  area: ['11.4 m^2', '123 ft^2'],
  volume: ['0.5 m^3', '18 ft^3'],
  mass: ['610 kg', '1340 lb'],
  mass_per_area: ['5.5 kg/m^2', '1.1 lb/ft^2'],
  speed: ['105 kt', '195 km/h', '54 m/s', '121 mph'],
  angle: ['3 deg', '0.05 rad'],
  per_angle: ['6.1 /rad', '0.106 /deg'],
  force: ['400 N', '90 lbf'],
  power: ['73 kW', '98 hp'],
  moment: ['120 N*m', '90 lbf*ft'],
  per_length: ['1.9 rad/m', '2.8 deg/in'],
  force_per_speed: ['0.4 N/kt', '0.1 lbf/kt'],
  ratio: [0.4, '40 %'],
  fraction_of_mac: ['25 %', 0.25],
  count: [5],
};

function unitWords(dimension: Dimension): string {
  if (dimension === 'ratio') return 'A ratio: a bare number, or %.';
  if (dimension === 'fraction_of_mac') return 'A fraction of the MAC: %, or a bare fraction.';
  return `Unit: ${unitExamples[dimension].join(', ')}.`;
}

function limitWords({ dimension, least, most }: InputDefinition): string {
  if (dimension !== 'angle') return `Limits (SI): ${shortNumber(least)} to ${shortNumber(most)}.`;
  const inDegrees = (angle: number) => shortNumber((angle * 180) / Math.PI);
  return `Limits: ${inDegrees(least)} deg to ${inDegrees(most)} deg.`;
}

/** One number of the input table; its description is the table's. */
export function input(path: string, cgKind: CgKind = 'percent_mac') {
  const entry = inputDefinition(path.replace('[n]', '[1]'), cgKind);
  const meaning = entry.meaning.replace(/ ?\(?\b1\b\)?(?=[ ,.])/, '');
  return anyNumber.meta({
    description: [
      path.includes('[n]') ? meaning : entry.meaning,
      unitWords(entry.dimension),
      limitWords(entry),
    ].join(' '),
    examples: [...examples[entry.dimension]],
  });
}

export function optionalInput(path: string) {
  return input(path).optional();
}
