import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import type { Reporter } from '../../src/engine/reporter.ts';
import { readSmallTable } from '../../src/results/small-table.ts';
import { runStudy } from '../../src/run-study.ts';
import { replaced, type StudyParts, studyText } from '../studies.ts';

const folder = mkdtempSync(join(tmpdir(), 'aftlimit-summary-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

const silent: Reporter = { planned() {}, progress() {}, step() {}, note() {}, finished() {} };
let runs = 0;

/** Runs a study without charts and gives its summary. */
async function summaryOf(parts: StudyParts): Promise<string> {
  const name = `study-${runs++}`;
  const file = join(folder, `${name}.yaml`);
  writeFileSync(file, studyText(parts));
  await runStudy(
    {
      studyFile: file,
      out: folder,
      workers: 1,
      afresh: false,
      charts: false,
      stop: new AbortController().signal,
    },
    silent,
  );
  return readFileSync(join(folder, name, 'summary.md'), 'utf8');
}

const vary = `tail.volume: {from: 0.3, to: 0.6, count: 16}
wing.span: {from: 8 m, to: 11 m, count: 7}`;

describe('the summary', () => {
  it('counts, says what limits, and lists a shortlist that is in shortlist.csv', async () => {
    const summary = await summaryOf({
      vary,
      require: 'static_margin: {at_least: 5 %, at_most: 20 %}\nhandy: {figure: wing_span, at_most: 10.2 m}',
      rest: 'prefer: {tail_area: less}\nshortlist: {keep: 4}',
    });
    const [, feasible, rows] = /\*\*(\d+) of (\d+) combinations/.exec(summary) ?? [];
    expect(Number(rows)).toBe(112);
    expect(Number(feasible)).toBeGreaterThan(0);
    const fails = [...summary.matchAll(/^\| `([\w.]+)` \| (\d+) \| (\d+) \| (\d+) \|$/gm)];
    expect(fails.map(([, name]) => name)).toEqual([
      'static_margin.at_least',
      'static_margin.at_most',
      'handy.at_most',
    ]);
    // 10.5 m and 11 m fail the span, 16 volumes each.
    expect(Number(fails[2][2])).toBe(32);
    const { header, rows: shortlist } = await readSmallTable(
      join(folder, `study-${runs - 1}`, 'shortlist.csv'),
    );
    expect(shortlist).toHaveLength(4);
    for (const row of shortlist) {
      expect(summary).toContain(`| ${row[header.indexOf('combination')]} | `);
      expect(row[header.indexOf('feasible')]).toBe('yes');
    }
  });

  it('says which axes the best ends on, and what was held', async () => {
    const summary = await summaryOf({ vary, rest: 'prefer: {wing_span: less}' });
    expect(summary).toMatch(/least wing_span: 8\.000 m.*at the end of `wing\.span`.*may end too soon/);
    expect(summary).toMatch(/while `wing\.span` varies, held: wing\.area/);
  });

  it('tells of the power it does not know, and outright when there is no body', async () => {
    const withBody = await summaryOf({ vary });
    expect(withBody).toMatch(/power off only: a single tractor propeller at full power costs 1–8 % MAC/);
    expect(withBody).not.toContain('No body');
    const without = await summaryOf({ vary, body: 'none' });
    expect(without).toContain('**No body**');
  });

  it('where the band is met by none, gives the customary CG of a first flight (common practice, no source)', async () => {
    const summary = await summaryOf({ vary, require: 'static_margin: {at_least: 60 %}' });
    expect(summary).toMatch(/\*\*0 of 112 combinations/);
    expect(summary).toMatch(/no further aft than 25 % MAC for a first flight is common practice/);
    expect(summary).not.toContain('## Shortlist');
    expect(summary).toContain('## The closest misses');
  });

  it('a margin of 30 % runs with a note and no error (common practice, no source)', async () => {
    const summary = await summaryOf({
      tail: replaced('tail', 'volume: 0.48', 'volume: 1.3'),
      vary: 'tail.volume: [1.3, 1.4]',
    });
    expect(summary).toMatch(/30 % MAC and more is met/);
  });

  it('a sailplane’s margin under 10 % runs with a note (common practice, no source)', async () => {
    const summary = await summaryOf({
      head: 'title: Glider\nclass: sailplane',
      vary: 'tail.volume: [0.48, 0.5]',
    });
    expect(summary).toMatch(/under 10 % MAC, which is met on sailplanes/);
  });

  it('a neutral point forward of 30 % MAC draws a note (common practice, no source)', async () => {
    const summary = await summaryOf({ vary: 'tail.volume: [0.2, 0.5]' });
    expect(summary).toMatch(/forward of 30 % MAC is unusual/);
  });

  it('says how far a CG held in % MAC wanders, and not when it is a station', async () => {
    const wandering = await summaryOf({ vary });
    expect(wandering).toMatch(/held in % MAC and rides with the wing/);
    const fixed = await summaryOf({ vary, cg: '{as: station, forward: 2.1 m, aft: 2.2 m}' });
    expect(fixed).not.toMatch(/rides with the wing: over/);
  });

  it('tells of a preset its paragraph, its edition, and that it is to be confirmed', async () => {
    const summary = await summaryOf({
      vary: 'tail.volume: [0.48, 0.5]',
      cg: '{as: percent_mac, forward: 24 %, aft: 33 %}\n  control: {kind: wheel, gearing: 1.9 rad/m}',
      require: 'limit_force: {preset: 14-cfr-23.155-2016}\n"<b>": {preset: 14-cfr-23.143-c-2016}',
    });
    const confirm = 'as in force until 2017, to be confirmed against your own rules';
    expect(summary).toContain(`- limit\\_force: 14 CFR 23.155(a), ${confirm}: least stick force`);
    expect(summary).toContain(`- &lt;b&gt;: 14 CFR 23.143(c), ${confirm}: greatest pitch force`);
    expect(summary).toContain(`- \`control.greatest_pull\` 333.6 N: 14 CFR 23.143(c), ${confirm}`);
    expect(summary).toContain('| `limit_force.at_least` |');
  });

  it('keeps a hostile title and question as plain text', async () => {
    const summary = await summaryOf({
      head: 'title: "# <script>alert(1)</script> | *x*"\nquestion: "`a` [b](c)"',
      vary: 'tail.volume: [0.48, 0.5]',
    });
    expect(summary).not.toContain('<script>');
    expect(summary).toContain('\\`a\\` \\[b\\](c)');
  });
});
