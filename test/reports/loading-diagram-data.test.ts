import { expect, it } from 'vitest';
import { layOut } from '../../src/engine/lay-out.ts';
import { readStudyText } from '../../src/read-study-file.ts';
import { loadingDiagramData } from '../../src/reports/charts/loading-diagram-data.ts';
import { baselineInputs } from '../../src/stages/build-stages.ts';
import { runOnce } from '../../src/stages/run-once.ts';
import { studyText } from '../studies.ts';

const loading = `  loading:
    empty: {mass: 400 kg, station: 2.05 m}
    items:
      spar: {mass: 60 kg, carried_by: wing, at: 40 %}
      pilot: {mass: 85 kg, station: 2.2 m}
      tank: {mass: 44 kg, station: 1.4 m, burns: true}
    cases: {solo: [pilot], trip: [pilot, tank]}
    at_most: 600 kg`;

function diagram(show: 'metric' | 'US', loadingText = loading) {
  const text = studyText({ head: `title: Test aeroplane\nshow: ${show}`, cg: '' })
    .replace(/^ {2}cg: $/m, loadingText)
    .replace(/^ {2}mass: .*\n/m, '');
  const study = readStudyText(text, 'loaded.yaml');
  const laidOut = layOut(study);
  const values = runOnce(laidOut.plan.stages, baselineInputs(study));
  // Neither the table nor the shortlist is read for this chart.
  const view = { study, laidOut, band: study.band, date: '2026-12-01', program: 'aftlimit' } as Parameters<
    typeof loadingDiagramData
  >[0];
  const data = loadingDiagramData(view, study.loading!, { label: 'baseline', detail: '', values });
  return { data, at: (name: string) => values.get(name) ?? Number.NaN };
}

it('draws each case from full to burnt down in % MAC, whose ends are the CG range', () => {
  const { data, at } = diagram('metric');
  expect(data.cases.map(({ label, states }) => [label, states.length])).toEqual([
    ['solo', 1],
    ['trip', 2],
  ]);
  const cgs = data.cases.flatMap(({ states }) => states.map(({ cg }) => cg));
  expect(Math.min(...cgs)).toBeCloseTo(100 * at('cg_forward'), 9);
  expect(Math.max(...cgs)).toBeCloseTo(100 * at('cg_aft'), 9);
  expect(data.cases[1].states.map(({ mass }) => mass)).toEqual([589, 545]);
  expect(data.empty.mass).toBe(460);
  expect(data.greatestMass).toBe(600);
});

it('draws the limits of the band', () => {
  const { data, at } = diagram('metric');
  const lines = data.limits.map(({ label, forbidden, line }) => [label, forbidden, line[0].cg]);
  expect(lines).toEqual([
    ['aft limit: margin at least 5 % MAC', 'aft', expect.closeTo(100 * at('neutral_point') - 5, 9)],
    ['too stable: margin at most 20 % MAC', 'forward', expect.closeTo(100 * at('neutral_point') - 20, 9)],
  ]);
});

it('shows mass and station in the study’s units', () => {
  const { data, at } = diagram('US');
  expect(data.massTitle).toBe('Mass [lb]');
  expect(data.station.title).toBe('Station of the CG [ft]');
  // One pound is 0.45359237 kg and one foot 0.3048 m, both exact (common practice, no source).
  expect(data.empty.mass).toBeCloseTo(460 / 0.45359237, 9);
  expect(data.station.chord).toBeCloseTo(at('mac') / 0.3048, 9);
});

it('draws masses that follow the area as those of the combination', () => {
  const { data, at } = diagram('metric', loading.replace('mass: 60 kg', 'mass_per_area: 6 kg/m^2'));
  const spar = 6 * at('wing_area');
  expect(data.empty.mass).toBeCloseTo(400 + spar, 9);
  expect(data.cases[1].states.map(({ mass }) => mass)).toEqual([
    expect.closeTo(400 + spar + 85 + 44, 9),
    expect.closeTo(400 + spar + 85, 9),
  ]);
  const cgs = data.cases.flatMap(({ states }) => states.map(({ cg }) => cg));
  expect(Math.min(...cgs)).toBeCloseTo(100 * at('cg_forward'), 9);
  expect(Math.max(...cgs)).toBeCloseTo(100 * at('cg_aft'), 9);
});
