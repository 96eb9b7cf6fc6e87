import { layOut } from '../engine/lay-out.ts';
import { catalogueFigure, figureNames, isWorksheetOnly } from '../figures/catalogue.ts';
import { displayUnit, tableColumn } from '../figures/display.ts';
import type { Figure } from '../figures/figure.ts';
import { inputFigure } from '../figures/input-figures.ts';
import { inputDefinitions } from '../study/inputs.ts';
import { readStudyOf } from './worksheet.ts';

export interface FiguresArguments {
  readonly study: string | undefined;
  readonly json: boolean | undefined;
}

/** Lists every figure, or those of one study. */
export async function figures({ study, json }: FiguresArguments): Promise<void> {
  const listed = study === undefined ? allFigures() : figuresOf(study);
  process.stdout.write(json ? `${JSON.stringify(listed.map(asRecord), null, 2)}\n` : asText(listed));
}

/** Inputs under their general names (`wing.panels[n].taper`), then everything that is worked out. */
function allFigures(): Figure[] {
  const cg = { forward: 'percent_mac', aft: 'percent_mac' } as const;
  const inputs = inputDefinitions.map(({ path }) => inputFigure(path, cg));
  const given = new Set(inputs.map(({ name }) => name));
  return [...inputs, ...figureNames.filter((name) => !given.has(name)).map((name) => catalogueFigure(name))];
}

function figuresOf(path: string): Figure[] {
  const { plan, figures: known } = layOut(readStudyOf(path));
  return [...known.values()].filter(({ name }) => plan.axesOfFigure.has(name) || name === 'combination');
}

function asRecord(figure: Figure) {
  const { name, symbol, meaning, formula, source, kind } = figure;
  const { name: column, unit } = tableColumn(figure);
  return { name, column, symbol, unit, kind, in_table: !isWorksheetOnly(name), meaning, formula, source };
}

function asText(listed: readonly Figure[]): string {
  const width = Math.max(...listed.map(({ name }) => name.length));
  const symbolWidth = Math.max(...listed.map(({ symbol }) => symbol.length));
  const indent = ' '.repeat(width + 2);
  const lines = listed.flatMap((figure) => {
    const { name, symbol, meaning, formula, source, dimension } = figure;
    const { unit } = displayUnit(dimension, 'metric');
    const head = `${name.padEnd(width)}  ${symbol.padEnd(symbolWidth)}  ${unit.padEnd(6)}  ${meaning}`;
    return formula === 'given' ? [head] : [head, `${indent}${formula}   [${source}]`];
  });
  return `${lines.join('\n')}\n`;
}
