import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect, it } from 'vitest';
import { studyText } from '../studies.ts';
import { runHere, temporaryFolder } from './run-folder.ts';

const loading = `  loading:
    empty: {mass: 330 kg, station: 1.98 m}
    items:
      wing: {mass_per_area: 1.1 lb/ft^2, carried_by: wing, at: 40 %}
      tail: {mass_per_area: 6.2 kg/m^2, carried_by: tail, at: 45 %}
      crew: {mass: 165 kg, station: 2.2 m}
    cases: {two_up: [crew]}`;

const vary = `wing.area: {from: 9.4 m^2, to: 13.4 m^2, count: 5}
wing.taper: [0.5, 0.65, 0.8]
tail.volume: {from: 0.4, to: 0.7, count: 4}
loading.items.tail.mass_per_area: [5 kg/m^2, 6.2 kg/m^2]`;

it('a run’s table has the mass and the CG that follow the areas of wing and tail', async () => {
  const folder = temporaryFolder();
  const file = join(folder, 'study.yaml');
  const text = studyText({
    cg: '',
    vary,
    require: 'static_margin: {at_least: 5 %}\nlight: {figure: mass, at_most: 570 kg}',
  });
  writeFileSync(file, text.replace(/^ {2}cg: $/m, loading).replace(/^ {2}mass: .*\n/m, ''));
  const { outcome } = await runHere(file, folder);
  expect(outcome).toBe('finished');

  const [header, ...rows] = readFileSync(join(folder, 'study', 'cases.csv'), 'utf8')
    .trimEnd()
    .split(/\r?\n/);
  const names = header.split(',');
  expect(rows).toHaveLength(5 * 3 * 4 * 2);
  let heavy = 0;
  for (const row of rows) {
    const cells = row.split(',');
    const at = (name: string) => {
      expect(names, name).toContain(name);
      return Number(cells[names.indexOf(name)]);
    };
    // Pound and foot are exact (agreement of 1959, from memory).
    const wing = ((1.1 * 0.45359237) / 0.3048 ** 2) * at('wing_area_m2');
    const tail = at('loading_items_2_mass_per_area_kg_per_m2') * at('tail_area_m2');
    const mass = 330 + wing + tail + 165;
    const wingStation = at('mac_leading_edge_m') + 0.4 * at('mac_m');
    const tailStation = at('tail_station_m') + (0.45 - 0.25) * at('tail_mac_m');
    const moment = 330 * 1.98 + wing * wingStation + tail * tailStation + 165 * 2.2;
    expect(at('mass_kg') / mass).toBeCloseTo(1, 6);
    expect(at('cg_aft_station_m') / (moment / mass)).toBeCloseTo(1, 6);
    expect(at('cg_aft_percent_mac')).toBeCloseTo(
      (100 * (moment / mass - at('mac_leading_edge_m'))) / at('mac_m'),
      3,
    );
    if (mass > 570) {
      heavy++;
      expect(row).toMatch(/light/);
    } else expect(row).not.toMatch(/light/);
  }
  expect(heavy).toBeGreaterThan(0);
  expect(heavy).toBeLessThan(rows.length);
});
