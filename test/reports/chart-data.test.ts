import { mkdtempSync, readdirSync, readFileSync, rmSync, unlinkSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { charts } from '../../src/commands/charts.ts';
import { layOut } from '../../src/engine/lay-out.ts';
import { evaluateSlice } from '../../src/engine/slice.ts';
import { readStudyText } from '../../src/read-study-file.ts';
import { alongAxisData } from '../../src/reports/charts/along-axis-data.ts';
import { carpetAxes, carpetData } from '../../src/reports/charts/carpet-data.ts';
import { buildUpData, macRulerData, picksOf } from '../../src/reports/charts/pick-data.ts';
import { planViewData } from '../../src/reports/charts/plan-view-data.ts';
import { regionData } from '../../src/reports/charts/region-data.ts';
import { sliceData } from '../../src/reports/charts/slice-data.ts';
import { tailSizingData } from '../../src/reports/charts/tail-sizing-data.ts';
import type { RunView } from '../../src/reports/run-view.ts';
import { valueShower } from '../../src/reports/run-view.ts';
import { readRun } from '../../src/results/run-folder.ts';
import { RunQueries } from '../../src/results/run-queries.ts';
import { runStudy } from '../../src/run-study.ts';
import { chooseShortlist } from '../../src/selection/shortlist.ts';
import { studyText } from '../studies.ts';

const folder = mkdtempSync(join(tmpdir(), 'aftlimit-chart-data-'));
const run = join(folder, 'study');
const text = studyText({
  vary: `wing.span: {from: 8 m, to: 11 m, count: 7}
tail.volume: {from: 0.6, to: 0.36, count: 9}
cg: [{forward: 22 %, aft: 31 %}, {forward: 22 %, aft: 33 %}, {forward: 24 %, aft: 33 %}]`,
  require: 'static_margin: {at_least: 5 %, at_most: 20 %}\nhandy: {figure: wing_span, at_most: 10.2 m}',
});
const study = readStudyText(text, 'study.yaml');
const laidOut = layOut(study);
let view: RunView;

beforeAll(async () => {
  const file = join(folder, 'study.yaml');
  writeFileSync(file, text);
  await runStudy(
    {
      studyFile: file,
      out: folder,
      workers: 1,
      afresh: false,
      charts: true,
      stop: new AbortController().signal,
    },
    { planned() {}, progress() {}, step() {}, note() {}, finished() {} },
  );
  const queries = await RunQueries.open(run, laidOut.columns);
  const shortlist = await chooseShortlist(queries, laidOut.columns, [], 3, valueShower(study, laidOut));
  view = {
    study,
    laidOut,
    queries,
    shortlist,
    band: study.band,
    rows: readRun(run).rows,
    date: '2026-12-01',
    program: 'aftlimit',
  };
});
afterAll(() => {
  view.queries.close();
  rmSync(folder, { recursive: true, force: true });
});

const axis = (name: string) => {
  const found = laidOut.plan.axes.find((candidate) => candidate.name === name);
  if (found === undefined) throw new Error(name);
  return found;
};

describe('data behind the charts', () => {
  it('region map: a tied axis whose first number repeats keeps its cells apart', async () => {
    const data = await regionData(view, axis('tail.volume'), axis('cg'));
    expect(data.y.labels).toEqual(['22–31', '22–33', '24–33']);
    expect(Array.from(data.feasibleShare).every((share) => share >= 0 && share <= 1)).toBe(true);
    // Seven spans a cell: shares are sevenths.
    for (const share of Array.from(data.feasibleShare)) expect((share * 7) % 1).toBeCloseTo(0, 9);
    // A more aft CG never has the better margin.
    const at = (ix: number, iy: number) => data.bestAftMargin[iy * 9 + ix];
    for (let ix = 0; ix < 9; ix++) expect(at(ix, 0) - at(ix, 1)).toBeCloseTo(2, 9);
  });

  it('slice: margin and slacks at the baseline’s other numbers', () => {
    const data = sliceData(view, axis('wing.span'), axis('tail.volume'));
    const [nx, ny] = [data.x.values.length, data.y.values.length];
    const values = evaluateSlice(
      study,
      laidOut.plan.stages,
      [
        {
          name: 'point',
          paths: ['wing.span', 'tail.volume'],
          values: [Float64Array.of(8, 11), Float64Array.of(0.36, 0.6)],
        },
      ],
      ['static_margin_aft', 'static_margin_forward'],
    );
    const [least, greatest] = values.get('static_margin_aft') ?? [];
    expect(data.aftMargin[0]).toBeCloseTo(100 * least, 9);
    expect(data.aftMargin[nx * ny - 1]).toBeCloseTo(100 * greatest, 9);
    expect(data.requirements.map(({ name }) => name)).toEqual([
      'static_margin.at_least',
      'static_margin.at_most',
      'handy.at_most',
    ]);
    expect(data.requirements[0].slack[0]).toBeCloseTo(least - 0.05, 12);
    expect(data.requirements[2].slack[nx - 1]).toBeCloseTo(10.2 - 11, 9);
    expect(data.baseline).toEqual({ x: 9.4, y: 0.48 });
  });

  it('along the axes: the baseline’s line runs inside the envelope of all combinations', async () => {
    const { axes } = await alongAxisData(view);
    expect(axes.map(({ title }) => title)).toEqual(['Wing span [m]', 'Tail volume', 'CG range [% MAC]']);
    for (const { aft, aftRange, values } of axes) {
      values.forEach((_, k) => {
        expect(aft[k]).toBeGreaterThanOrEqual(aftRange.least[k] - 1e-9);
        expect(aft[k]).toBeLessThanOrEqual(aftRange.greatest[k] + 1e-9);
      });
    }
    const volumes = axes[1].values as number[];
    expect(volumes).toEqual([...volumes].sort((p, q) => p - q));
  });

  it('tail sizing: the smallest tail that fits has just the lower edge’s margin', () => {
    const data = tailSizingData(view);
    const aftLine = data.limits[0].cg;
    const upper = data.sizes.findIndex((_, k) => aftLine[k] >= data.loading.aft);
    const [s0, s1] = [data.sizes[upper - 1], data.sizes[upper]];
    const size =
      s0 + ((s1 - s0) * (data.loading.aft - aftLine[upper - 1])) / (aftLine[upper] - aftLine[upper - 1]);
    const margin = evaluateSlice(
      study,
      laidOut.plan.stages,
      [{ name: 'tail.volume', paths: ['tail.volume'], values: [Float64Array.of(size)] }],
      ['static_margin_aft'],
    ).get('static_margin_aft')?.[0];
    expect(margin).toBeCloseTo(0.05, 4);
  });

  it('picks: windows, build-up and plan agree with the figures', () => {
    const picks = picksOf(view);
    expect(picks).toHaveLength(3);
    const ruler = macRulerData(view, picks);
    const build = buildUpData(view, picks);
    const plan = planViewData(view, picks);
    picks.forEach(({ values }, k) => {
      const value = (name: string) => values.get(name) ?? Number.NaN;
      expect(ruler.rows[k].window.to).toBeCloseTo(100 * value('cg_window_aft'), 9);
      const sum = build.combinations[k].steps.reduce((total, { change }) => total + change, 0);
      expect(sum).toBeCloseTo(build.combinations[k].neutralPoint, 9);
      const outline = plan.outlines[k];
      // The shoelace area of the right half is half the wing's.
      expect(2 * areaOf(outline.wing)).toBeCloseTo(value('wing_area'), 9);
      expect(2 * areaOf(outline.tail)).toBeCloseTo(value('tail_area'), 9);
      expect(outline.mac.length).toBeCloseTo(value('mac'), 12);
    });
  });

  it('carpet: over the two axes that change the margin most', () => {
    const axes = carpetAxes(view, 'static_margin_aft');
    expect(axes?.map(({ name }) => name)).toEqual(['tail.volume', 'wing.span']);
    const data = carpetData(view, 'tail_area', [axis('wing.span'), axis('tail.volume')]);
    expect(data.values).toHaveLength(63);
    expect(data.figureTitle).toBe('Tail area [m²]');
  });
});

function areaOf(points: readonly { station: number; aside: number }[]): number {
  let twice = 0;
  points.forEach((point, k) => {
    const next = points[(k + 1) % points.length];
    twice += point.station * next.aside - next.station * point.aside;
  });
  return Math.abs(twice) / 2;
}

describe('charts of a finished run', () => {
  it('are there in three formats each, and drawn again by another band without evaluating', async () => {
    const names = readdirSync(join(run, 'charts'));
    for (const chart of [
      'tail-sizing',
      'mac-ruler',
      'neutral-point-build-up',
      'plan-views',
      'margin-along-axes',
      'carpet',
    ]) {
      for (const ending of ['vl.json', 'svg', 'png']) expect(names).toContain(`${chart}.${ending}`);
    }
    expect(names).toContain('slice-wing-span-tail-volume.svg');
    expect(names).toContain('region-tail-volume-cg.png');
    const before = readFileSync(join(run, 'cases.parquet'));
    const said: string[] = [];
    const write = process.stdout.write;
    process.stdout.write = ((chunk: string) => said.push(chunk) > 0) as typeof process.stdout.write;
    try {
      await charts({ run, band: '8%:18%', carpet: undefined });
    } finally {
      process.stdout.write = write;
    }
    const feasible = await view.queries.counts({ lower: 0.08, upper: 0.18 });
    expect(said.join('')).toContain(`${feasible.feasible} of ${feasible.rows} combinations`);
    expect(readFileSync(join(run, 'charts', 'tail-sizing.svg'), 'utf8')).toContain('8–18 % MAC');
    expect(readFileSync(join(run, 'cases.parquet')).equals(before)).toBe(true);
  });

  it('need the exact doubles: with the CSV alone they are refused', async () => {
    unlinkSync(join(run, 'cases.parquet'));
    await expect(charts({ run, band: '8%:18%', carpet: undefined })).rejects.toMatchObject({
      code: 'RUN_NOT_FINISHED',
    });
  });
});
