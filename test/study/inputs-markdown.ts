import { type InputDefinition, inputDefinitions } from '../../src/study/inputs.ts';
import { shortNumber } from '../../src/study/quantities.ts';

const radian = Math.PI / 180;

/** SI, angles in degrees. */
function shown({ dimension }: InputDefinition, value: number): string {
  if (dimension === 'angle') return `${shortNumber(value / radian)}°`;
  return shortNumber(value).replace('-', '−');
}

const units: Partial<Record<InputDefinition['dimension'], string>> = {
  length: 'm',
  area: 'm²',
  mass: 'kg',
  mass_per_area: 'kg/m²',
  speed: 'm/s',
  per_angle: '/rad',
  force: 'N',
  power: 'W',
  per_length: 'rad/m',
};

function row(entry: InputDefinition): string {
  const { path, symbol, meaning, least, most, limits, whenLeftOut } = entry;
  const unit = units[entry.dimension] ? ` ${units[entry.dimension]}` : '';
  const range = `${shown(entry, least)} to ${shown(entry, most)}${unit}`.replaceAll('-', '−');
  const otherwise = whenLeftOut ? `${shown(entry, whenLeftOut.value)}${unit} (${whenLeftOut.source})` : '';
  return `| \`${path}\` | ${symbol} | ${meaning} | ${range}: ${limits} | ${otherwise} |`;
}

/** The table of all numbers as it stands in studies/README.md. */
export function inputsMarkdown(): string {
  const head = [
    '| path | symbol | meaning | hard limits, and why | when left out |',
    '|---|---|---|---|---|',
  ];
  return [...head, ...inputDefinitions.map(row)].join('\n');
}
