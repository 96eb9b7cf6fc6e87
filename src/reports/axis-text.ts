import type { LaidOut } from '../engine/lay-out.ts';
import { displayUnit } from '../figures/display.ts';
import type { Figure } from '../figures/figure.ts';
import type { PlanAxis } from '../plan/plan.ts';
import type { ShowSystem } from '../study/study.ts';

/** Decimals at most of a value on an axis or in a caption. */
const decimals = 3;

/** `wing_panels_3_taper` → `Wing panel 3 taper`. */
export function figureWords(name: string): string {
  const words = name
    .replaceAll(/panels_(\d+)/g, 'panel $1')
    .replaceAll(/stations_(\d+)/g, 'station $1')
    .replaceAll(/conditions_(\d+)/g, 'condition $1')
    .replaceAll('_', ' ')
    .replaceAll(/\b(cg|mac)\b/g, (word) => word.toUpperCase());
  return words.charAt(0).toUpperCase() + words.slice(1);
}

function unitText(figure: Figure, show: ShowSystem): string {
  const { unit } = displayUnit(figure.dimension, show);
  return unit === '' ? '' : ` [${unit}]`;
}

/** `Wing span [m]`. */
export function figureTitle(figure: Figure, show: ShowSystem): string {
  return figureWords(figure.name) + unitText(figure, show);
}

/** The figures of an axis; an axis of the plan always has some. */
function axisFigures(laidOut: LaidOut, axis: PlanAxis): Figure[] {
  return axis.figures.map((name) => {
    const figure = laidOut.figures.get(name);
    if (figure === undefined) throw new Error(`the catalogue lacks the figure ${name}`);
    return figure;
  });
}

/** `Wing span [m]`; for tied numbers their titles one after the other. */
export function axisTitle(laidOut: LaidOut, axis: PlanAxis, show: ShowSystem): string {
  const figures = axisFigures(laidOut, axis);
  if (axis.name === 'cg') return `CG range${unitText(figures[0], show)}`;
  return figures.map((figure) => figureTitle(figure, show)).join(' / ');
}

/** Text of the axis' value at a position: `9.4`; for tied numbers `22–31` (CG) or `4 / 0.3`. */
export function axisLabel(laidOut: LaidOut, axis: PlanAxis, position: number, show: ShowSystem): string {
  const texts = axisFigures(laidOut, axis).map((figure, k) =>
    plainNumber(axis.values[k][position] * displayUnit(figure.dimension, show).factor),
  );
  return texts.join(axis.name === 'cg' ? '–' : ' / ');
}

export function plainNumber(value: number): string {
  return Number.isNaN(value) ? '–' : String(Number(value.toFixed(decimals))).replace('-', '−');
}

/** An axis inside a sentence: `tail arm`, `CG range`. */
export function axisWords(axis: PlanAxis): string {
  if (axis.name === 'cg') return 'CG range';
  return axis.figures.map(figureInSentence).join(' with ');
}

/** A figure inside a sentence: `tail area`, `CG forward`. */
export function figureInSentence(name: string): string {
  const words = figureWords(name);
  return /^[A-Z][a-z]/.test(words) ? words.charAt(0).toLowerCase() + words.slice(1) : words;
}

/** One figure's value for a caption: `span 9.4 m`. */
export function captionValue(figure: Figure, value: number, show: ShowSystem): string {
  const { unit, factor } = displayUnit(figure.dimension, show);
  const text = plainNumber(value * factor);
  if (unit === '' || unit === '°') return `${figureInSentence(figure.name)} ${text}${unit}`;
  return `${figureInSentence(figure.name)} ${text} ${unit}`;
}
