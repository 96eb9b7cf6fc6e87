import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { drawSvg } from '../../src/charts/draw-spec.ts';
import { cleanText } from '../../src/charts/text-width.ts';
import { controlCharts } from './control-samples.ts';
import { everyChart, heading, longHeading } from './samples.ts';
import { outside, overlaps, textsOfSvg } from './texts-of-svg.ts';

/** The JSON schema that Vega-Lite ships: what a specification may say, by its authors. */
const schemaFile = createRequire(import.meta.url).resolve('vega-lite/vega-lite-schema.json');
const schema = z.fromJSONSchema(JSON.parse(readFileSync(schemaFile, 'utf8')));

describe.each(Object.entries({ ...everyChart, ...controlCharts }))('%s', (_name, chart) => {
  it('is valid Vega-Lite, draws without a warning, and keeps its texts apart and inside', async () => {
    const spec = chart();
    expect(schema.safeParse(JSON.parse(JSON.stringify(spec))).success).toBe(true);

    const warnings: string[] = [];
    const svg = await drawSvg(spec, warnings);
    expect(warnings).toEqual([]);
    expect(svg).not.toMatch(/NaN|undefined|Infinity/);

    const texts = textsOfSvg(svg);
    const [, width, height] = /width="(\d+)" height="(\d+)"/.exec(svg)!;
    expect(overlaps(texts)).toEqual([]);
    expect(outside(texts, Number(width), Number(height))).toEqual([]);
  });

  it('carries title, study, caution and date', async () => {
    const svg = await drawSvg(chart());
    const said = textsOfSvg(svg)
      .map(({ text }) => text)
      .join(' ');
    const given = [heading, longHeading].find(({ title }) => said.includes(title.slice(0, 30)));
    expect(given).toBeDefined();
    expect(said).toContain(cleanText(given!.study).slice(0, 30));
    expect(said).toContain('Preliminary estimate; confirm by test.');
    expect(said).toContain('2026-12-01');
    expect(said).toContain('aftlimit 0.1.0');
  });
});

it('notices overlapping and protruding texts when they are there', () => {
  const text = (x: number, y: number, turn = 0) =>
    `<text text-anchor="start" transform="translate(${x},${y}) rotate(${turn})" font-size="10px">Margin</text>`;
  const svg = `<svg><g transform="translate(5,5)">${text(0, 20)}${text(20, 20)}${text(100, 20, 90)}${text(190, 90)}</g></svg>`;
  const texts = textsOfSvg(svg);
  expect(overlaps(texts)).toEqual(["'Margin' on 'Margin'"]);
  expect(outside(texts, 200, 100)).toEqual(['Margin']);
});
