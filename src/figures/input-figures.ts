import { inputDefinition } from '../study/inputs.ts';
import type { CgKind } from '../study/study.ts';
import type { Dimension, Figure } from './figure.ts';

/** CG ends are figures of their own kind: a CG given as % MAC is the same figure as the one worked out. */
const cgSuffix: Record<CgKind, string> = {
  percent_mac: '',
  station: '_station',
  behind_mac_leading_edge: '_behind_mac_leading_edge',
};

const cgDimension: Record<CgKind, Dimension> = {
  percent_mac: 'fraction_of_mac',
  station: 'length',
  behind_mac_leading_edge: 'length',
};

export interface CgKinds {
  readonly forward: CgKind;
  readonly aft: CgKind;
}

function cgKind(path: string, cg: CgKinds): CgKind | undefined {
  if (path === 'cg.forward') return cg.forward;
  if (path === 'cg.aft') return cg.aft;
  return undefined;
}

/** Figure name of a number given by the study: `wing.panels[1].taper` → `wing_panels_1_taper`. */
export function inputFigureName(path: string, cg: CgKinds): string {
  const kind = cgKind(path, cg);
  const plain = path.replaceAll(/[.[\]]+/g, '_').replace(/_$/, '');
  return kind === undefined ? plain : plain + cgSuffix[kind];
}

/** The figure of a number that the study gives. */
export function inputFigure(path: string, cg: CgKinds): Figure {
  const definition = inputDefinition(path);
  const kind = cgKind(path, cg);
  return {
    name: inputFigureName(path, cg),
    symbol: definition.symbol,
    dimension: kind === undefined ? definition.dimension : cgDimension[kind],
    kind: 'number',
    meaning: definition.meaning,
    formula: 'given',
    source: 'the study',
  };
}
