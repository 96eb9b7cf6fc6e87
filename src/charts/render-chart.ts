import { randomUUID } from 'node:crypto';
import { mkdir, rename, rm, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { MachineError } from '../errors.ts';
import { drawPng, drawSvg } from './draw-spec.ts';
import type { ChartSpec } from './sheet.ts';

export type ChartFormat = 'vl.json' | 'svg' | 'png';
export const chartFormats: readonly ChartFormat[] = ['vl.json', 'svg', 'png'];

const plainName = /^[a-z0-9][a-z0-9._-]*$/i;

/**
 * Writes one chart as `<name>.vl.json`, `.svg` and `.png` (two picture pixels a chart pixel).
 * Each file is whole or not there. The same specification gives the same bytes.
 * @param name file name without its ending: letters, digits, `.`, `_`, `-`
 * @returns paths of the files written, in the order of `formats`
 * @throws MachineError when a file cannot be written
 */
export async function renderChart(
  name: string,
  spec: ChartSpec,
  folder: string,
  formats: readonly ChartFormat[] = chartFormats,
): Promise<string[]> {
  if (!plainName.test(name)) throw new RangeError(`'${name}' is not a plain file name for a chart`);
  const svg = formats.some((format) => format !== 'vl.json') ? await drawSvg(spec) : '';
  const written: string[] = [];
  for (const format of formats) {
    const path = join(folder, `${name}.${format}`);
    await writeWhole(folder, path, await contentOf(format, spec, svg));
    written.push(path);
  }
  return written;
}

async function contentOf(format: ChartFormat, spec: ChartSpec, svg: string): Promise<string | Uint8Array> {
  if (format === 'vl.json') return `${JSON.stringify(spec)}\n`;
  return format === 'svg' ? `${svg}\n` : drawPng(svg);
}

async function writeWhole(folder: string, path: string, content: string | Uint8Array): Promise<void> {
  const temporary = `${path}.${randomUUID()}.tmp`;
  try {
    await mkdir(folder, { recursive: true });
    await writeFile(temporary, content);
    await rename(temporary, path);
  } catch (error) {
    await rm(temporary, { force: true }).catch(() => undefined);
    throw machineFault(path, error);
  }
}

function machineFault(path: string, error: unknown): unknown {
  const reason = (error as NodeJS.ErrnoException).code;
  if (reason === undefined) return error;
  const code =
    reason === 'ENOSPC' || reason === 'EDQUOT'
      ? 'DISK_FULL'
      : reason === 'EACCES' || reason === 'EPERM' || reason === 'EROFS'
        ? 'NO_PERMISSION'
        : 'WRITE_FAILED';
  return new MachineError(
    code,
    `The chart ${path} could not be written (${reason}). The run's results are not touched.`,
    'Make room or give permission, then draw the charts again from the finished run.',
  );
}
