import type { LoadingDiagramData, LoadingLimit } from '../../charts/index.ts';
import { controlLimitKinds } from '../../figures/control-limit-kinds.ts';
import { displayUnit } from '../../figures/display.ts';
import { baselinePlaces } from '../../stages/build-stages.ts';
import type { LoadingState } from '../../stages/loading-paths.ts';
import { loadingPaths } from '../../stages/loading-paths.ts';
import type { LoadingChoices } from '../../study/study.ts';
import type { RunView } from '../run-view.ts';
import { bandText, chartHeading } from '../run-view.ts';
import type { Pick } from './pick-data.ts';

const percent = 100;

/** Mass against CG of one combination: every loading case as it burns down, between the limits of the CG. */
export function loadingDiagramData(
  view: RunView,
  loading: LoadingChoices,
  { label, values }: Pick,
): LoadingDiagramData {
  const { study } = view;
  const value = (name: string) => values.get(name) ?? Number.NaN;
  const mass = displayUnit('mass', study.show);
  const length = displayUnit('length', study.show);
  const [leadingEdge, chord] = [value('mac_leading_edge'), value('mac')];
  const point = (state: LoadingState) => ({
    cg: (percent * (state.station - leadingEdge)) / chord,
    mass: state.mass * mass.factor,
  });
  const { empty, cases } = loadingPaths(loading, study.body, baselinePlaces(study), values);
  const greatest = values.get('loading_at_most');
  return {
    heading: chartHeading(view, `Loading of ${label === 'baseline' ? 'the baseline' : label}`),
    massTitle: `Mass [${mass.unit}]`,
    station: {
      title: `Station of the CG [${length.unit}]`,
      leadingEdge: leadingEdge * length.factor,
      chord: chord * length.factor,
    },
    cases: cases.map((states, k) => ({ label: loading.cases[k].name, states: states.map(point) })),
    limits: limitsOf(view, value),
    ...(greatest === undefined ? {} : { greatestMass: greatest * mass.factor }),
    empty: point(empty),
  };
}

/** The band's edges and, where it is worked out, the forward limit of control; one CG at every mass each. */
function limitsOf({ band, study }: RunView, value: (name: string) => number): LoadingLimit[] {
  const { lower, upper } = band;
  const least = value('neutral_point');
  const greatest = study.conditions.length === 1 ? least : value('neutral_point_aftmost');
  const limit = (label: string, cg: number, forbidden: LoadingLimit['forbidden']): LoadingLimit[] =>
    Number.isNaN(cg) ? [] : [{ label, forbidden, line: [{ cg: percent * cg, mass: 0 }] }];
  const kind = controlLimitKinds[value('control_limit_kind')]?.label;
  const control = kind === undefined ? 'control limit' : `control limit: ${kind}`;
  return [
    ...(lower === undefined ? [] : limit(`aft limit: margin ${bandText({ lower })}`, least - lower, 'aft')),
    ...(upper === undefined
      ? []
      : limit(`too stable: margin ${bandText({ upper })}`, greatest - upper, 'forward')),
    ...limit(control, value('control_limit_forward'), 'forward'),
  ];
}
