import { loadingFigure, loadingFigureCount } from '../methods/loading.ts';
import type { LoadingChoices, Study } from '../study/study.ts';
import type { BaselinePlaces } from './body.ts';
import type { CaseItems } from './loading-items.ts';
import { Aboard, casesOf, ItemReader } from './loading-items.ts';
import type { Stage } from './stage.ts';

type LoadedStudy = Pick<Study, 'loading' | 'inputs' | 'body' | 'cg'>;

/**
 * Stages of a study that gives masses instead of a CG range: the CG's travel, the mass of the heaviest
 * case where the study gives none, and the height of its CG where every mass has a height. Structure
 * that grows with the geometry is an item `carried_by: wing` or `tail` with a mass per area; it moves with
 * what carries it in any case.
 */
export function loadingStages(study: LoadedStudy, places: BaselinePlaces): Stage[] {
  const { loading } = study;
  if (loading === undefined) return [];
  return [
    travelStage(loading, study.body, places),
    ...(study.inputs.has('mass') ? [] : [massStage(loading)]),
    ...(study.cg.heightGiven ? [heightStage(loading)] : []),
  ];
}

/** Foremost and aftmost CG over all cases, at every break of what burns in them. */
function travelStage(loading: LoadingChoices, body: Study['body'], places: BaselinePlaces): Stage {
  const aboard = new Aboard(loading, body, places);
  const { cases } = aboard;
  const extremes = new Float64Array(loadingFigureCount);
  return {
    name: 'loading',
    reads: aboard.reads,
    writes: ['cg_forward_station', 'cg_aft_station', 'cg_forward_case', 'cg_aft_case'],
    cost: 20 * cases.length + 5 * loading.items.length,
    kernel: (count, inputs, [forward, aft, forwardCase, aftCase]) => {
      for (let row = 0; row < count; row++) {
        aboard.read(inputs, row);
        let foremost = Number.POSITIVE_INFINITY;
        let aftmost = Number.NEGATIVE_INFINITY;
        let foremostCase = 0;
        let aftmostCase = 0;
        // A case without a CG leaves the range unknown: NaN is never overtaken.
        for (let k = 0; k < cases.length && !Number.isNaN(foremost); k++) {
          aboard.extremes(cases[k], extremes);
          if (!(extremes[loadingFigure.foremost] >= foremost)) {
            foremost = extremes[loadingFigure.foremost];
            foremostCase = k;
          }
          if (!(extremes[loadingFigure.aftmost] <= aftmost)) {
            aftmost = extremes[loadingFigure.aftmost];
            aftmostCase = k;
          }
        }
        const unknown = Number.isNaN(foremost);
        forward[row] = unknown ? Number.NaN : foremost;
        aft[row] = unknown ? Number.NaN : aftmost;
        forwardCase[row] = unknown ? Number.NaN : foremostCase;
        aftCase[row] = unknown ? Number.NaN : aftmostCase;
      }
    },
  };
}

function fullMass({ emptyMass, masses }: ItemReader, { aboard }: CaseItems): number {
  let mass = emptyMass;
  for (let k = 0; k < aboard.length; k++) mass += masses[aboard[k]];
  return mass;
}

/** The case that is heaviest with all aboard; the first of equals. */
function heaviest(reader: ItemReader, cases: readonly CaseItems[]): number {
  let found = 0;
  let most = fullMass(reader, cases[0]);
  for (let k = 1; k < cases.length; k++) {
    const mass = fullMass(reader, cases[k]);
    if (mass > most) {
      most = mass;
      found = k;
    }
  }
  return found;
}

/** Mass of the heaviest case, for lift and for whatever else asks for the aeroplane's mass. */
function massStage(loading: LoadingChoices): Stage {
  // The other number is not needed; the mass read twice keeps the reader plain.
  const reader = new ItemReader(loading, 'mass', ({ massAs }) => massAs);
  const cases = casesOf(loading);
  return {
    name: 'mass of the heaviest case',
    reads: reader.reads,
    writes: ['mass'],
    cost: 10 * cases.length,
    kernel: (count, inputs, [mass]) => {
      for (let row = 0; row < count; row++) {
        reader.read(inputs, row);
        mass[row] = fullMass(reader, cases[heaviest(reader, cases)]);
      }
    },
  };
}

/** Height of the heaviest case's CG. */
function heightStage(loading: LoadingChoices): Stage {
  const reader = new ItemReader(loading, 'height', () => 'height');
  const cases = casesOf(loading);
  return {
    name: 'height of the CG',
    reads: reader.reads,
    writes: ['cg_above_datum'],
    cost: 15 * cases.length,
    kernel: (count, inputs, [height]) => {
      for (let row = 0; row < count; row++) {
        reader.read(inputs, row);
        const one = cases[heaviest(reader, cases)];
        let moment = reader.emptyMass * reader.emptyOther;
        for (let k = 0; k < one.aboard.length; k++) {
          moment += reader.masses[one.aboard[k]] * reader.others[one.aboard[k]];
        }
        height[row] = moment / fullMass(reader, one);
      }
    },
  };
}
