import type { BuildUp, MacRulerData, MacRulerRow, NeutralPointBuildUpData } from '../../charts/index.ts';
import { conditionFigureName } from '../../figures/condition-figures.ts';
import { controlLimitKinds } from '../../figures/control-limit-kinds.ts';
import type { Figure } from '../../figures/figure.ts';
import { baselineInputs } from '../../stages/build-stages.ts';
import { runOnce } from '../../stages/run-once.ts';
import { captionValue } from '../axis-text.ts';
import type { RunView } from '../run-view.ts';
import { chartHeading } from '../run-view.ts';
import { inputsOfCombination } from '../worksheet.ts';

const percent = 100;
/** Varied numbers named in a caption at most. */
const captionNumbers = 5;

/** One combination to draw, worked out in full. */
export interface Pick {
  readonly label: string;
  readonly detail: string;
  /** Every figure, SI. */
  readonly values: ReadonlyMap<string, number>;
}

/** The shortlisted combinations, or the baseline when none is feasible. */
export function picksOf(view: RunView): Pick[] {
  const { laidOut, study, shortlist } = view;
  const { stages } = laidOut.plan;
  if (shortlist.length === 0) {
    const values = runOnce(stages, baselineInputs(study));
    return [{ label: 'baseline', detail: 'no combination is feasible', values }];
  }
  const worked = shortlist.map(({ row }) => ({
    label: `#${row.combination}`,
    values: runOnce(stages, inputsOfCombination(laidOut, row.combination)),
  }));
  const named = tellingFigures(
    view,
    worked.map(({ values }) => values),
  );
  return worked.map((pick) => ({ ...pick, detail: detailOf(view, named, pick.values) }));
}

/** The varied numbers by which the picks differ, the CG range left to the drawing; all varied ones when they agree. */
function tellingFigures({ laidOut }: RunView, picks: readonly ReadonlyMap<string, number>[]): Figure[] {
  const { plan, figures } = laidOut;
  const varied = plan.authorOrder.flatMap((position) => {
    const axis = plan.axes[position];
    return axis.size > 1 && axis.name !== 'cg' ? axis.figures : [];
  });
  const differing = varied.filter((name) => new Set(picks.map((values) => values.get(name))).size > 1);
  return (differing.length === 0 ? varied : differing).slice(0, captionNumbers).flatMap((name) => {
    const figure = figures.get(name);
    return figure === undefined ? [] : [figure];
  });
}

function detailOf({ study }: RunView, named: readonly Figure[], values: ReadonlyMap<string, number>): string {
  return named
    .map((figure) => captionValue(figure, values.get(figure.name) ?? Number.NaN, study.show))
    .join(', ');
}

/** A figure of a pick in % MAC. */
function ofMac({ values }: Pick, name: string): number {
  return percent * (values.get(name) ?? Number.NaN);
}

export function macRulerData(view: RunView, picks: readonly Pick[]): MacRulerData {
  const { lower, upper } = view.band;
  const { conditions } = view.study;
  const several = conditions.length > 1;
  const rows = picks.map((pick): MacRulerRow => {
    const neutralPoint = ofMac(pick, 'neutral_point');
    const aftmost = several ? ofMac(pick, 'neutral_point_aftmost') : neutralPoint;
    const controlLimit = controlLimitOf(pick);
    const from = [
      ...(upper === undefined ? [] : [aftmost - percent * upper]),
      ...(controlLimit === undefined ? [] : [controlLimit.at]),
    ];
    return {
      label: pick.label,
      detail: pick.detail,
      cg: { forward: ofMac(pick, 'cg_forward'), aft: ofMac(pick, 'cg_aft') },
      window: {
        ...(from.length === 0 ? {} : { from: Math.max(...from) }),
        ...(lower === undefined ? {} : { to: neutralPoint - percent * lower }),
      },
      neutralPoint,
      aerodynamicCentre: ofMac(pick, 'wing_aerodynamic_centre'),
      ...(several && {
        neutralPoints: conditions.map((each) => ofMac(pick, conditionFigureName('neutral_point', each))),
      }),
      ...furtherPoints(pick),
      ...(controlLimit !== undefined && { controlLimit }),
    };
  });
  return {
    heading: chartHeading(view, 'CG range, CG window and neutral point on the MAC'),
    ...(several && { conditions: conditions.map(({ name }) => name) }),
    rows,
  };
}

/** Points with free stick and of manoeuvre, as far as the study has them. */
function furtherPoints(pick: Pick): Partial<MacRulerRow> {
  const figures = {
    freeStickNeutralPoint: 'neutral_point_free_stick',
    manoeuvrePoint: 'manoeuvre_point',
    freeStickManoeuvrePoint: 'manoeuvre_point_free_stick',
  } as const;
  return Object.fromEntries(
    Object.entries(figures)
      .filter(([, name]) => pick.values.has(name))
      .map(([key, name]) => [key, ofMac(pick, name)]),
  );
}

/** The forward limit of control and what sets it; undefined where it is not worked out. */
function controlLimitOf(pick: Pick): MacRulerRow['controlLimit'] {
  if (!pick.values.has('control_limit_forward')) return undefined;
  const kind = controlLimitKinds[pick.values.get('control_limit_kind') ?? Number.NaN];
  return { at: ofMac(pick, 'control_limit_forward'), name: kind?.label ?? 'not computed' };
}

const buildUpSteps = [
  ['wing', 'neutral_point_wing'],
  ['tail', 'neutral_point_tail'],
  ['body', 'neutral_point_body'],
  ['propeller', 'neutral_point_propeller'],
  ['vertical position', 'neutral_point_height'],
  ['measured correction', 'neutral_point_correction'],
] as const;

export function buildUpData(view: RunView, picks: readonly Pick[]): NeutralPointBuildUpData {
  const { cg, propeller, corrections } = view.study;
  const absent = new Set([
    ...(cg.heightGiven ? [] : ['neutral_point_height']),
    ...(propeller === undefined ? ['neutral_point_propeller'] : []),
    ...(corrections === undefined ? ['neutral_point_correction'] : []),
  ]);
  const steps = buildUpSteps.filter(([, figure]) => !absent.has(figure));
  const combinations = picks.map(
    (pick): BuildUp => ({
      label: pick.label,
      detail: pick.detail,
      steps: steps.map(([name, figure]) => ({ name, change: ofMac(pick, figure) })),
      neutralPoint: ofMac(pick, 'neutral_point'),
    }),
  );
  return { heading: chartHeading(view, 'Build-up of the neutral point'), combinations };
}
