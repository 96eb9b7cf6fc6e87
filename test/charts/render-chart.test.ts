import { mkdtemp, readdir, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { drawSvg, pictureScale } from '../../src/charts/draw-spec.ts';
import { type ChartSpec, renderChart } from '../../src/charts/index.ts';
import { MachineError } from '../../src/errors.ts';
import { heading, region } from './samples.ts';
import { textsOfSvg } from './texts-of-svg.ts';

let folder: string;
beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'charts-'));
});
afterEach(() => rm(folder, { recursive: true, force: true }));

const chart = (over = heading) =>
  region(
    3,
    2,
    (i, j) => (i * j) / 2,
    (i, j) => i - j,
    undefined,
    over,
  );

/** Width and height in a PNG file's header chunk (PNG specification, W3C, section 11.2.1; from memory). */
function pngSize(png: Buffer): { width: number; height: number } {
  expect(png.subarray(1, 4).toString('latin1')).toBe('PNG');
  return { width: png.readUInt32BE(16), height: png.readUInt32BE(20) };
}

describe('files of a chart', () => {
  it('are three, whole, with a picture twice the size of the drawing', async () => {
    const spec = chart();
    const written = await renderChart('region', spec, join(folder, 'charts'));
    expect(written.map((path) => path.slice(folder.length))).toEqual([
      '/charts/region.vl.json',
      '/charts/region.svg',
      '/charts/region.png',
    ]);
    expect((await readdir(join(folder, 'charts'))).sort()).toEqual([
      'region.png',
      'region.svg',
      'region.vl.json',
    ]);
    expect(JSON.parse(await readFile(written[0]!, 'utf8'))).toEqual(JSON.parse(JSON.stringify(spec)));
    const [, width, height] = /width="(\d+)" height="(\d+)"/.exec(await readFile(written[1]!, 'utf8'))!;
    expect(pngSize(await readFile(written[2]!))).toEqual({
      width: pictureScale * Number(width),
      height: pictureScale * Number(height),
    });
  });

  it('have the same bytes each time, whatever was drawn in between', async () => {
    const first = await renderChart('a', chart(), folder);
    await renderChart('between', chart({ ...heading, title: 'Another' }), folder);
    const again = await renderChart('b', chart(), folder);
    for (const [index, path] of first.entries()) {
      expect((await readFile(path)).equals(await readFile(again[index]!))).toBe(true);
    }
  });

  it('have the same bytes when many are drawn at once', async () => {
    const charts = ['One', 'Two', 'Three', 'Four'].map((title) => chart({ ...heading, title }));
    const alone: string[] = [];
    for (const spec of charts) alone.push(await drawSvg(spec));
    expect(await Promise.all(charts.map((spec) => drawSvg(spec)))).toEqual(alone);
    expect(alone[0]).toContain('url(#gradient_0)');
  });

  it('are only those asked for', async () => {
    await renderChart('region', chart(), folder, ['svg']);
    expect(await readdir(folder)).toEqual(['region.svg']);
  });

  it('never leave the folder by their name', async () => {
    await expect(renderChart('../escape', chart(), folder)).rejects.toThrow(RangeError);
    expect(await readdir(folder)).toEqual([]);
  });

  it('that cannot be written are a fault of the machine', async () => {
    const blocked = join(folder, 'taken');
    await writeFile(blocked, '');
    const fault = await renderChart('region', chart(), blocked).catch((error: unknown) => error);
    expect(fault).toBeInstanceOf(MachineError);
    expect((fault as MachineError).code).toBe('WRITE_FAILED');
    expect((fault as MachineError).message).toContain('region.vl.json');
  });
});

describe('what a study can say in a title', () => {
  const hostile = {
    'a script': '<script>alert(1)</script>',
    quotes: `"double" 'single' \`back\` & </text>`,
    'right to left': 'שלום עולם',
    emoji: '✈️ 🛩️ glider',
    'an expression': '{"expr": "1/0"} datum.x \\u0041',
  };
  it.each(Object.entries(hostile))('%s stays text', async (_kind, title) => {
    const svg = await drawSvg(chart({ ...heading, title, study: title }));
    expect(svg).not.toMatch(/<script/i);
    const texts = textsOfSvg(svg).map(({ text }) => text);
    expect(texts.filter((text) => text === title)).toHaveLength(2);
  });

  it('direction overrides, control signs and half letters are taken out', async () => {
    const svg = await drawSvg(chart({ ...heading, title: 'a\u202eb\u0000c\ud800d\u2028e' }));
    const texts = textsOfSvg(svg).map(({ text }) => text);
    expect(texts).toContain('a b c d e');
  });

  it('cell names that look like code stay text', async () => {
    const name = `"][0]+alert(1)+["`;
    const spec = region(
      2,
      2,
      () => 0.5,
      () => 1,
      () => name,
    );
    const texts = textsOfSvg(await drawSvg(spec)).map(({ text }) => text);
    expect(texts.filter((text) => text === name).length).toBeGreaterThanOrEqual(2);
  });
});

it('nothing is fetched: data from outside is refused', async () => {
  const spec: ChartSpec = {
    data: { url: 'file:///etc/hostname', format: { type: 'csv' } },
    mark: 'point',
    encoding: { x: { field: 'a', type: 'quantitative' } },
  };
  const warnings: string[] = [];
  await drawSvg(spec, warnings);
  expect(warnings.join('\n')).toContain('file:///etc/hostname');
});
