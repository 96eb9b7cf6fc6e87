import type { Reading } from './reading.ts';
import { mapIn, type SourceNode, wordIn } from './source.ts';
import type { Methods } from './study.ts';

type MethodKey = keyof Methods;

/** Methods taken where a study names none, and why. */
const customary: { readonly [Key in MethodKey]: { readonly value: Methods[Key]; readonly source: string } } =
  {
    lift_slope: { value: 'polhamus', source: 'fits wings of any sweep; wing and tail by the same formula' },
    downwash: { value: 'torenbeek', source: 'closest to a flat-wake lattice on ordinary layouts' },
    aerodynamic_centre: { value: 'table', source: 'the quarter point of the MAC is wrong for swept wings' },
    body_moment: { value: 'multhopp', source: 'uses the body’s own shape' },
  };

/** Reads `methods`; each left out takes its customary one. */
export function readMethods(root: SourceNode, reading: Reading): Methods {
  const map = mapIn(root, 'methods');
  const read = <Key extends MethodKey>(key: Key): Methods[Key] => {
    const word = wordIn(map, key);
    if (word !== undefined) return word as Methods[Key];
    const { value, source } = customary[key];
    reading.assumptions.push({ path: `methods.${key}`, value, source });
    return value;
  };
  return {
    lift_slope: read('lift_slope'),
    downwash: read('downwash'),
    aerodynamic_centre: read('aerodynamic_centre'),
    body_moment: read('body_moment'),
  };
}
