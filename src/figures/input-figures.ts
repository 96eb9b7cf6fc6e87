import { figureNameOf, inputDefinition } from '../study/inputs.ts';
import type { CgKind } from '../study/study.ts';
import type { Figure } from './figure.ts';

/** CG ends are figures of their own kind: a CG given as % MAC is the same figure as the one worked out. */
const cgSuffix: Record<CgKind, string> = {
  percent_mac: '',
  station: '_station',
  behind_mac_leading_edge: '_behind_mac_leading_edge',
};

export interface CgKinds {
  readonly forward: CgKind;
  readonly aft: CgKind;
}

/** Name of the figure that one end of the CG range is given as. */
export function cgFigureName(end: keyof CgKinds, kind: CgKind): string {
  return `cg_${end}${cgSuffix[kind]}`;
}

function cgEnd(path: string): keyof CgKinds | undefined {
  if (path === 'cg.forward') return 'forward';
  return path === 'cg.aft' ? 'aft' : undefined;
}

/** Figure name of a number given by the study: `wing.panels[1].taper` → `wing_panels_1_taper`. */
export function inputFigureName(path: string, cg: CgKinds): string {
  const end = cgEnd(path);
  return end === undefined ? figureNameOf(path) : cgFigureName(end, cg[end]);
}

/** The figure of a number that the study gives. */
export function inputFigure(path: string, cg: CgKinds): Figure {
  const end = cgEnd(path);
  const { symbol, dimension, meaning } = inputDefinition(path, end === undefined ? undefined : cg[end]);
  return {
    name: inputFigureName(path, cg),
    symbol,
    dimension,
    kind: 'number',
    meaning,
    formula: 'given',
    source: 'the study',
  };
}
