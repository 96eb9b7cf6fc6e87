import type { BuildUp, MacRulerData, MacRulerRow, NeutralPointBuildUpData } from '../../charts/index.ts';
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
  const rows = picks.map((pick): MacRulerRow => {
    const neutralPoint = ofMac(pick, 'neutral_point');
    return {
      label: pick.label,
      detail: pick.detail,
      cg: { forward: ofMac(pick, 'cg_forward'), aft: ofMac(pick, 'cg_aft') },
      window: {
        ...(upper === undefined ? {} : { from: neutralPoint - percent * upper }),
        ...(lower === undefined ? {} : { to: neutralPoint - percent * lower }),
      },
      neutralPoint,
      aerodynamicCentre: ofMac(pick, 'wing_aerodynamic_centre'),
    };
  });
  return { heading: chartHeading(view, 'CG range, CG window and neutral point on the MAC'), rows };
}

const buildUpSteps = [
  ['wing', 'neutral_point_wing'],
  ['tail', 'neutral_point_tail'],
  ['body', 'neutral_point_body'],
  ['vertical position', 'neutral_point_height'],
] as const;

export function buildUpData(view: RunView, picks: readonly Pick[]): NeutralPointBuildUpData {
  const withHeight = view.study.cg.heightGiven;
  const steps = buildUpSteps.filter(([, figure]) => withHeight || figure !== 'neutral_point_height');
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
