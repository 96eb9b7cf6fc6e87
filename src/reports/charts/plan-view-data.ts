import type { PlanOutline, PlanPoint, PlanViewData } from '../../charts/index.ts';
import { displayUnit } from '../../figures/display.ts';
import { bodyStationPlace } from '../../methods/body-stations.ts';
import { panelLeadingEdgeTangent } from '../../methods/panel-planform.ts';
import { quarterChord, spanwiseStationOfMac, sweepTangentAt } from '../../methods/planform.ts';
import type { BaselinePlaces } from '../../stages/body.ts';
import { baselinePlaces } from '../../stages/build-stages.ts';
import type { Study } from '../../study/study.ts';
import type { RunView } from '../run-view.ts';
import { chartHeading } from '../run-view.ts';
import type { Pick } from './pick-data.ts';

type Values = ReadonlyMap<string, number>;

/** Plan-view outlines of the picks, in the study's unit of length. */
export function planViewData(view: RunView, picks: readonly Pick[]): PlanViewData {
  const { study } = view;
  const { unit, factor } = displayUnit('length', study.show);
  const baseline = baselinePlaces(study);
  const scaled = (points: readonly PlanPoint[]) =>
    points.map(({ station, aside }) => ({ station: station * factor, aside: aside * factor }));
  const outlines = picks.map((pick): PlanOutline => {
    const value = (name: string) => pick.values.get(name) ?? Number.NaN;
    const station = (fraction: number) => factor * (value('mac_leading_edge') + fraction * value('mac'));
    const body = bodyOutline(study, pick.values, baseline);
    return {
      label: pick.label,
      detail: pick.detail,
      wing: scaled(wingOutline(study, pick.values)),
      tail: scaled(tailOutline(study, pick.values)),
      ...(body === undefined ? {} : { body: scaled(body) }),
      mac: {
        aside: factor * value('mac_spanwise_station'),
        leadingEdge: factor * value('mac_leading_edge'),
        length: factor * value('mac'),
      },
      aerodynamicCentre: station(value('wing_aerodynamic_centre')),
      neutralPoint: station(value('neutral_point')),
      cg: { forward: station(value('cg_forward')), aft: station(value('cg_aft')) },
    };
  });
  return { heading: chartHeading(view, 'Plan views to scale'), unit, outlines };
}

/** Leading edge from the centreline outward, then the trailing edge back in. */
function wingOutline(study: Study, values: Values): PlanPoint[] {
  const value = (name: string) => values.get(name) ?? Number.NaN;
  const leading: PlanPoint[] = [{ station: value('wing_root_leading_edge'), aside: 0 }];
  const chords = [value('wing_root_chord')];
  for (const panel of panelsOf(study, values)) {
    const inner = leading[leading.length - 1];
    const chord = chords[chords.length - 1];
    leading.push({
      station: inner.station + panel.tangent(chord) * panel.width,
      aside: inner.aside + panel.width,
    });
    chords.push(chord * panel.taper);
  }
  const trailing = leading.map(({ station, aside }, k) => ({ station: station + chords[k], aside }));
  return [...leading, ...trailing.reverse()];
}

interface OutlinePanel {
  readonly width: number;
  readonly taper: number;
  /** Tangent of the leading edge's sweep, given the inner chord. */
  readonly tangent: (innerChord: number) => number;
}

function panelsOf({ wing }: Study, values: Values): OutlinePanel[] {
  const value = (name: string) => values.get(name) ?? Number.NaN;
  const panel = (width: number, prefix: string, sweep: 'quarter_chord' | 'leading_edge'): OutlinePanel => {
    const taper = value(`${prefix}_taper`);
    const given = Math.tan(value(`${prefix}_sweep_${sweep}`));
    const tangent = (chord: number) =>
      sweep === 'leading_edge' ? given : panelLeadingEdgeTangent(given, chord, taper, width);
    return { width, taper, tangent };
  };
  const semiSpan = value('wing_span') / 2;
  if (wing.form === 'trapezoid') return [panel(semiSpan, 'wing', wing.sweep)];
  return wing.panels.map(({ sweep }, index) => {
    const prefix = `wing_panels_${index + 1}`;
    const given = value(`${prefix}_${wing.panelWidth}`);
    return panel(wing.panelWidth === 'width' ? given : given * semiSpan, prefix, sweep);
  });
}

function tailOutline({ tail }: Study, values: Values): PlanPoint[] {
  const value = (name: string) => values.get(name) ?? Number.NaN;
  const [root, taper, span] = [value('tail_root_chord'), value('tail_taper'), value('tail_span')];
  const from = tail.sweep === 'quarter_chord' ? quarterChord : 0;
  const given = Math.tan(value(`tail_sweep_${tail.sweep}`));
  const tangent = sweepTangentAt(given, from, 0, value('tail_aspect_ratio'), taper);
  // A V-tail's span is measured along its panels; the plan shows its projection.
  const shown = tail.layout === 'V' ? Math.cos(value('tail_v_angle')) : 1;
  const quarterMac = spanwiseStationOfMac(span, taper) * tangent + quarterChord * value('tail_mac');
  const nose = value('quarter_mac_station') + value('tail_arm') - quarterMac;
  const tip = nose + (tangent * span) / 2;
  return [
    { station: nose, aside: 0 },
    { station: tip, aside: (shown * span) / 2 },
    { station: tip + root * taper, aside: (shown * span) / 2 },
    { station: nose + root, aside: 0 },
  ];
}

/** Right half of the body, moved with wing and tail as the moment's integrals take it. */
function bodyOutline({ body }: Study, values: Values, baseline: BaselinePlaces): PlanPoint[] | undefined {
  if (body === undefined) return undefined;
  const value = (name: string) => values.get(name) ?? Number.NaN;
  const tail = value('quarter_mac_station') + value('tail_arm');
  const behind = (station: number) => value(`body_stations_${station}_at`) - baseline.rootLeadingEdge;
  const points = Array.from({ length: body.stations }, (_, i) => {
    const place = bodyStationPlace(
      behind(i + 1),
      baseline.rootChord,
      baseline.tail - baseline.rootLeadingEdge,
      behind(body.stations),
      value('wing_root_chord'),
      tail - value('wing_root_leading_edge'),
      body.boom,
    );
    return {
      station: value('wing_root_leading_edge') + place,
      aside: value(`body_stations_${i + 1}_width`) / 2,
    };
  });
  if (!body.boom) return points;
  const boom = value('body_boom_width') / 2;
  const end = points[points.length - 1];
  return end.station < tail ? [...points, { ...end, aside: boom }, { station: tail, aside: boom }] : points;
}
