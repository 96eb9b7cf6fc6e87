import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import fc from 'fast-check';
import { writeToString } from 'fast-csv';
import { afterAll, describe, expect, test } from 'vitest';
import { DataError, type DataFaultCode, dataFaultCodes, UsageError } from '../../src/errors.ts';
import { readCsv } from '../../src/flight-test/csv-text.ts';
import { type FlownPoint, readFlownPoints } from '../../src/flight-test/read-data.ts';
import { formatStudyError } from '../../src/study/format-study-error.ts';
import { degree, wing } from './flown.ts';

const folder = mkdtempSync(join(tmpdir(), 'aftlimit-flown-'));
afterAll(() => rmSync(folder, { recursive: true }));
const file = join(folder, 'flown.csv');

const header =
  'point,calibrated_speed_kt,mass_kg,cg_percent_mac,elevator_deg,stick_force_N,flaps,power,height_m';
const first = 'a1,62.5,598,24.5,-2.4,12,up,idle,900';
const good = [header, first, 'a2,80,597,24.4,-1.1,-3.5,up,idle,910', ''].join('\n');

function read(text: string | Uint8Array): Promise<FlownPoint[]> {
  writeFileSync(file, text);
  return readFlownPoints(file, wing);
}

async function errorOf(text: string | Uint8Array): Promise<DataError> {
  const failed = await read(text).then(
    () => undefined,
    (error: unknown) => error,
  );
  if (!(failed instanceof DataError)) throw new Error(`no DataError but ${failed}`);
  return failed;
}

describe('good tables', () => {
  test('become points in SI', async () => {
    const [point] = await read(good);
    // By hand, dynamic pressure from the compressible relation (ISO 2533 sea level): 62.5 kt = 32.1528 m/s,
    // q ≈ ½ 1.225 V² = 633.2 Pa less a few hundredths; C_L = 598 · 9.80665/(633.2 · 11.4) = 0.8124.
    expect(point).toMatchObject({
      name: 'a1',
      line: 2,
      calibratedSpeed: expect.closeTo(32.1528, 4),
      mass: 598,
      cg: 0.245,
      elevator: expect.closeTo(-0.0418879, 7),
      stickForce: 12,
      flaps: 'up',
      power: 'idle',
      height: 900,
      liftCoefficient: expect.closeTo(0.8124, 3),
      dynamicPressure: expect.closeTo(633.2, 0),
    });
  });

  const same: readonly (readonly [string, string | Uint8Array])[] = [
    ['with a byte-order mark', `\ufeff${good}`],
    ['with CR LF', good.replaceAll('\n', '\r\n')],
    ['with CR alone', good.replaceAll('\n', '\r')],
    ['without the last line end', good.trimEnd()],
    ['with empty lines and rows of empty cells', good.replace('\na2', '\n\n,,,,,,,,\na2').concat('\n\n')],
    ['with quoted cells', good.replace('a1,62.5,598', '"a1","62.5", "598" ')],
    ['with blanks round cells', good.replaceAll(',', ' , ')],
    ['with capital letters in texts', good.replace('up,idle', 'UP,Idle')],
    ['with a typographic minus', good.replace('-2.4', '−2.4')],
    ['with an apostrophe before a minus, as spreadsheets want it', good.replace('-2.4', "'-2.4")],
    ['with exponents and a plus', good.replace('62.5', '+6.25e1')],
  ];
  test.each(same)('%s tell the same', async (_, text) => {
    const withoutLines = (points: FlownPoint[]) => points.map(({ line: _line, ...point }) => point);
    expect(withoutLines(await read(text))).toEqual(withoutLines(await read(good)));
  });

  test.each([
    ['calibrated_speed_kt,62.5', 'calibrated_speed_m_per_s,32.152777777777779'],
    ['calibrated_speed_kt,62.5', 'calibrated_speed_km_per_h,115.75'],
    ['calibrated_speed_kt,62.5', 'calibrated_speed_mph,71.923715'],
    ['mass_kg,598', 'mass_lb,1318.3643'],
    ['height_m,900', 'height_ft,2952.7559'],
    ['stick_force_N,12', 'stick_force_lbf,2.6977073'],
    // Station of 24.5 % MAC: 1.9 + 0.245 · 1.24 = 2.2038 m
    ['cg_percent_mac,24.5', 'cg_station_m,2.2038'],
    ['cg_percent_mac,24.5', 'cg_station_ft,7.2303150'],
    ['cg_percent_mac,24.5', 'cg_station_in,86.763780'],
  ])('%s and %s are one', async (one, other) => {
    const exchanged = [header, first].map((line, row) => {
      const [from, to] = [one, other].map((pair) => pair.split(',')[row]!);
      return line.replace(from!, to!);
    });
    const [expected] = await read([header, first].join('\n'));
    const [found] = await read(exchanged.join('\n'));
    expect(exchanged.join('\n')).not.toBe([header, first].join('\n'));
    for (const key of ['calibratedSpeed', 'mass', 'height', 'stickForce', 'cg'] as const)
      expect(found![key]! / expected![key]!).toBeCloseTo(1, 6);
  });

  test('flaps may be given in degrees; 30 and 30.0 are one state', async () => {
    const text = good.replace('flaps', 'flaps_deg').replace('up', '30').replace('up', '30.0');
    expect((await read(text)).map(({ flaps }) => flaps)).toEqual(['30°', '30°']);
  });
  test('flaps and forces may be left out, and single forces', async () => {
    const [one, two] = await read(good.replace(',12,', ',,'));
    expect(one).not.toHaveProperty('stickForce');
    expect(two!.stickForce).toBe(-3.5);
    const bare = good.replace('stick_force_N,flaps,', '').replace('12,up,', '').replace('-3.5,up,', '');
    expect(Object.keys((await read(bare))[0]!)).not.toEqual(expect.arrayContaining(['flaps']));
  });
  test('a point’s line is that of the file, quoted line ends and empty lines counted', async () => {
    const points = await read(good.replace('a1,', '\n"a\n1",'));
    expect(points.map(({ line, name }) => [line, name])).toEqual([
      [3, 'a 1'],
      [5, 'a2'],
    ]);
  });
});

describe('cells know their place', () => {
  test('in any table that the CSV writer makes', async () => {
    const sign = fc.constantFrom('"', ',', '\n', 'a', ' ', 'ü', '1', ';');
    const text = fc.array(sign, { maxLength: 6 }).map((signs) => signs.join(''));
    const row = fc.array(text, { minLength: 2, maxLength: 4 }).map((cells) => ['x', ...cells]);
    await fc.assert(
      fc.asyncProperty(fc.array(row, { minLength: 1, maxLength: 4 }), async (rows) => {
        writeFileSync(file, await writeToString(rows));
        const csv = await readCsv(file);
        expect(csv.rows.map((cells) => cells.map((cell) => cell.text))).toEqual(
          rows.map((cells) => cells.map((cell) => cell.trim())),
        );
        const lines = csv.text.split('\n');
        for (const [k, cell] of csv.rows.flat().entries()) {
          const marked = lines[cell.line - 1]!.slice(cell.column - 1, cell.column - 1 + cell.length);
          // Of a cell of several lines the first is marked.
          if (!rows.flat()[k]!.includes('\n')) expect(marked).toContain(cell.text.replaceAll('"', '""'));
          const before = cell.column === 1 ? ',' : lines[cell.line - 1]![cell.column - 2];
          expect(before).toBe(',');
        }
      }),
      { numRuns: 150 },
    );
  });
});

interface FaultCase {
  readonly what: string;
  readonly code: DataFaultCode;
  readonly text: string | Uint8Array;
  /** Line and column of the fault, and the marked text. */
  readonly at: readonly [number, number, string];
  readonly found: RegExp;
  readonly remedy: RegExp;
}

const edit = (from: string, to: string) => {
  if (!good.includes(from)) throw new Error(`the table has no ${from}`);
  return good.replace(from, to);
};

const cases: readonly FaultCase[] = [
  {
    what: 'Latin-1',
    code: 'NOT_UTF8',
    text: Buffer.from(edit('a1', 'ä1'), 'latin1'),
    at: [1, 1, ''],
    found: /not UTF-8/,
    remedy: /UTF-8/,
  },
  {
    what: 'UTF-16',
    code: 'NOT_UTF8',
    text: Buffer.from(`\ufeff${good}`, 'utf16le'),
    at: [1, 1, ''],
    found: /not UTF-8/,
    remedy: /UTF-8/,
  },
  {
    what: 'a quote that is left open',
    code: 'UNREADABLE_CSV',
    text: edit('a2,', '"a2,'),
    at: [3, 1, '"'],
    found: /quotes .* do not match/,
    remedy: /whole cell/,
  },
  {
    what: 'a quote that ends inside a cell',
    code: 'UNREADABLE_CSV',
    text: edit('a1,', '"a"1,'),
    at: [2, 1, '"'],
    found: /quotes .* do not match/,
    remedy: /as two/,
  },
  {
    what: 'semicolons',
    code: 'WRONG_SEPARATOR',
    text: good.replaceAll(',', ';').replaceAll('.', ','),
    at: [1, 1, header.replaceAll(',', ';')],
    found: /one cell, 'point;calibrated/,
    remedy: /commas, and write decimals with a point/,
  },
  {
    what: 'tabs',
    code: 'WRONG_SEPARATOR',
    text: good.replaceAll(',', '\t'),
    at: [1, 1, header.replaceAll(',', '\t')],
    found: /one cell/,
    remedy: /commas/,
  },
  { what: 'an empty file', code: 'NO_POINTS', text: '', at: [1, 1, ''], found: /empty/, remedy: /one row/ },
  {
    what: 'a header alone',
    code: 'NO_POINTS',
    text: `${header}\n`,
    at: [1, 1, 'point'],
    found: /no points/,
    remedy: /one row/,
  },
  {
    what: 'a misspelt column',
    code: 'UNKNOWN_COLUMN',
    text: edit('flaps', 'flabs'),
    at: [1, header.indexOf('flaps') + 1, 'flabs'],
    found: /no column 'flabs'/,
    remedy: /^Did you mean flaps\?/,
  },
  {
    what: 'a column that is nothing like any',
    code: 'UNKNOWN_COLUMN',
    text: edit('flaps', 'outside air temperature'),
    at: [1, header.indexOf('flaps') + 1, 'outside air temperature'],
    found: /outside air temperature/,
    remedy: /^Known columns: point, calibrated_speed_kt/,
  },
  {
    what: 'a height in two units',
    code: 'DUPLICATE_COLUMN',
    text: edit('flaps', 'height_ft'),
    at: [1, edit('flaps', 'height_ft').indexOf('height_m') + 1, 'height_m'],
    found: /height_m says again what height_ft says/,
    remedy: /one of the two/,
  },
  {
    what: 'a CG given both ways',
    code: 'DUPLICATE_COLUMN',
    text: edit('flaps', 'cg_station_m'),
    at: [1, header.indexOf('flaps') + 1, 'cg_station_m'],
    found: /cg_station_m says again what cg_percent_mac says/,
    remedy: /one of the two/,
  },
  {
    what: 'a row too long, by decimal commas without quotes',
    code: 'WRONG_CELL_COUNT',
    text: edit('62.5', '62,5'),
    at: [2, 1, first.replace('.5', ',5')],
    found: /10 cells, and the header 9/,
    remedy: /decimals with a point/,
  },
  {
    what: 'a row too short',
    code: 'WRONG_CELL_COUNT',
    text: edit(',12,up', ',12'),
    at: [2, 1, first.replace(',up', '')],
    found: /8 cells, and the header 9/,
    remedy: /every column/,
  },
  {
    what: 'a mass that was not written down',
    code: 'MISSING_CELL',
    text: edit(',598,', ',,'),
    at: [2, 9, ','],
    found: /mass_kg is empty/,
    remedy: /leave out a point/,
  },
  {
    what: 'a power that was not written down',
    code: 'MISSING_CELL',
    text: edit('idle', ''),
    at: [2, first.indexOf('idle') + 1, ','],
    found: /power is empty/,
    remedy: /Every point/,
  },
  {
    what: 'a decimal comma in quotes',
    code: 'DECIMAL_COMMA',
    text: edit('62.5', '"62,5"'),
    at: [2, 4, '"62,5"'],
    found: /calibrated_speed_kt is '62,5', with a decimal comma/,
    remedy: /Write 62\.5;/,
  },
  {
    what: 'a number with its unit',
    code: 'NOT_A_NUMBER',
    text: edit('62.5', '62.5 kt'),
    at: [2, 4, '62.5 kt'],
    found: /calibrated_speed_kt is '62.5 kt'/,
    remedy: /its unit, kt, stands in the column's name/,
  },
  ...['NaN', 'Infinity', '0x40', '1 000', '--3', '1e'].map(
    (text): FaultCase => ({
      what: `${text} as a number`,
      code: 'NOT_A_NUMBER',
      text: edit('62.5', text),
      at: [2, 4, text],
      found: /where a number is wanted/,
      remedy: /the number alone/,
    }),
  ),
  {
    what: 'an elevator that no hinge allows',
    code: 'OUT_OF_RANGE',
    text: edit('-2.4', '-61'),
    at: [2, first.indexOf('-2.4') + 1, '-61'],
    found: /elevator_deg is -61 deg, outside -60 deg to 60 deg/,
    remedy: /Correct it/,
  },
  {
    what: 'a CG ahead of any wing',
    code: 'OUT_OF_RANGE',
    text: edit('24.5', '-50.1'),
    at: [2, first.indexOf('24.5') + 1, '-50.1'],
    found: /The CG is -50\.1 % MAC, outside -50 % MAC to 150 % MAC \(.*datum/,
    remedy: /Correct it/,
  },
  {
    what: 'a CG station of another datum',
    code: 'OUT_OF_RANGE',
    text: edit('cg_percent_mac', 'cg_station_m'),
    at: [2, first.indexOf('24.5') + 1, '24.5'],
    found: /The CG is 1822\.581 % MAC/,
    remedy: /Correct it/,
  },
  {
    what: 'a mass in grams',
    code: 'OUT_OF_RANGE',
    text: edit('598', '59800000'),
    at: [2, 9, '59800000'],
    found: /mass_kg is/,
    remedy: /Correct it/,
  },
  {
    what: 'a lift coefficient that no wing has',
    code: 'OUT_OF_RANGE',
    text: edit('62.5', '27'),
    at: [2, 4, '27'],
    found: /The lift coefficient of this point is 4\.3\d*, outside 0\.01 to 4 \(.*wing area/,
    remedy: /Correct it/,
  },
  {
    what: 'one name twice',
    code: 'DUPLICATE_POINT',
    text: edit('a2', 'a1'),
    at: [3, 1, 'a1'],
    found: /'a1' stands in line 2 already/,
    remedy: /name of its own/,
  },
];

describe('faults', () => {
  const tested = new Set<DataFaultCode>();
  afterAll(() => expect([...tested].sort()).toEqual(Object.keys(dataFaultCodes).sort()));

  test.each(cases)('$code: $what', async ({ code, text, at, found, remedy }) => {
    const error = await errorOf(text);
    const [fault] = error.faults.filter((one) => one.code === code);
    expect(fault, JSON.stringify(error.faults)).toBeDefined();
    expect([fault!.line, fault!.column]).toEqual(at.slice(0, 2));
    const line = error.text.split('\n')[fault!.line - 1] ?? '';
    const marked = line.slice(fault!.column - 1, fault!.column - 1 + fault!.length);
    expect(marked).toBe(at[2]);
    expect(fault!.found).toMatch(found);
    expect(fault!.remedy).toMatch(remedy);
    tested.add(code);
  });

  test.each([
    ['point', /points’ names/, 'Add point.'],
    ['calibrated_speed_kt', /calibrated airspeed/, /^Add one of calibrated_speed_kt, .*_mph\.$/],
    ['mass_kg', /mass/, 'Add one of mass_kg, mass_lb.'],
    ['cg_percent_mac', /CG/, /^Add one of cg_percent_mac, cg_station_m/],
    ['elevator_deg', /elevator/, 'Add elevator_deg.'],
    ['power', /power/, 'Add power.'],
    ['height_m', /height/, 'Add one of height_m, height_ft.'],
  ])('MISSING_COLUMN: %s is not there', async (name, found, remedy) => {
    const index = header.split(',').indexOf(name);
    const without = good
      .split('\n')
      .map((line) => line.split(',').toSpliced(index, 1).join(','))
      .join('\n');
    const { faults, text } = await errorOf(without);
    expect(faults.map(({ code }) => code)).toEqual(['MISSING_COLUMN']);
    expect(faults[0]).toMatchObject({ line: 1, column: 1, length: text.split('\n')[0]!.length });
    expect(faults[0]!.found).toMatch(found);
    expect(faults[0]!.remedy).toMatch(remedy);
    tested.add('MISSING_COLUMN');
  });

  test.each(['indicated_speed_kt', 'airspeed_kt', 'ias_kt', 'speed_kt', 'true_airspeed_kt', 'TAS'])(
    '%s is refused: calibrated airspeed is wanted',
    async (name) => {
      const { faults } = await errorOf(edit('calibrated_speed_kt', name));
      expect(faults.map(({ code }) => code).sort()).toEqual(['MISSING_COLUMN', 'UNKNOWN_COLUMN']);
      expect(faults.find(({ code }) => code === 'UNKNOWN_COLUMN')!.remedy).toMatch(
        /instrument and position error/,
      );
    },
  );
  test('a column without its unit is told the names with units', async () => {
    const { faults } = await errorOf(edit('mass_kg', 'mass'));
    expect(faults.find(({ code }) => code === 'UNKNOWN_COLUMN')!.remedy).toBe(
      'The unit stands in the name: mass_kg, mass_lb.',
    );
  });

  test('all are told at once, in the order of the text, in the printed style of studies', async () => {
    const error = await errorOf(
      [
        header.replace('flaps', 'flabs'),
        'a1,"62,5",598,24.5,x,12,up,idle,900',
        'a1,62,598,24.5,,12,up,idle',
      ].join('\n'),
    );
    expect(error.faults.map(({ code, line }) => [code, line])).toEqual([
      ['UNKNOWN_COLUMN', 1],
      ['DECIMAL_COMMA', 2],
      ['NOT_A_NUMBER', 2],
      ['WRONG_CELL_COUNT', 3],
    ]);
    const printed = formatStudyError(error, { color: false });
    expect(printed).toContain(`${file}:2:4  DECIMAL_COMMA
  calibrated_speed_kt is '62,5', with a decimal comma.
     2 | a1,"62,5",598,24.5,x,12,up,idle,900
       |    ^^^^^^
  Write 62.5; thousands have no mark.
`);
  });
  test('a table that is not there, or is a folder, is the user’s mistake', async () => {
    for (const [path, why] of [
      [join(folder, 'nothing.csv'), /nothing\.csv is not there/],
      [folder, /is a folder/],
    ] as const) {
      const failed = await readFlownPoints(path, wing).catch((error: unknown) => error);
      expect(failed).toBeInstanceOf(UsageError);
      expect((failed as UsageError).code).toBe('NO_SUCH_FILE');
      expect((failed as UsageError).message).toMatch(why);
    }
  });
  test('an elevator of 60° is the last one believed', async () => {
    expect((await read(edit('-2.4', '-60')))[0]!.elevator).toBeCloseTo(-60 * degree, 12);
  });
});
