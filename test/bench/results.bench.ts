/**
 * Rows a second of writing the table, one thread, on a block like those of a study:
 * 30 columns, of which 15 hold fewer than 50 distinct values, 5 about 2,000, and 10 all differ.
 */
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { writeToBuffer } from 'fast-csv';
import { parquetWriteBuffer } from 'hyparquet-writer';
import { assembleCases } from '../../src/results/assemble.ts';
import { type Block, largestBlock } from '../../src/results/block.ts';
import { CsvBlockWriter } from '../../src/results/csv-block.ts';
import { ParquetBlockWriter } from '../../src/results/parquet-block.ts';
import { PartWriter } from '../../src/results/part-files.ts';
import { column, randomNumbers } from '../results/sample-table.ts';
import { type BenchRow, type Job, measure } from './measure.ts';

const width = 30;
const columns = Array.from({ length: width }, (_, c) => column(`figure_${c + 1}`));

function realisticBlocks(count: number): Block[] {
  const random = randomNumbers(20_260_101);
  const few = Array.from({ length: 15 }, (_, c) => Array.from({ length: 5 + 3 * c }, () => random() * 20));
  const many = Array.from({ length: 5 }, () => Array.from({ length: 2000 }, () => random() * 3 - 1));
  return Array.from({ length: count }, (_, b) => ({
    rows: largestBlock,
    values: columns.map((_, c) =>
      Float64Array.from({ length: largestBlock }, (_, i) => {
        const row = b * largestBlock + i;
        // Axes step at different paces, as a study's do; other figures come in no order.
        if (c < 15) return few[c][(c < 6 ? Math.floor(row / 7 ** (5 - c)) : row * (c + 1)) % few[c].length];
        if (c < 20) return many[c - 15][Math.floor(random() * 2000)];
        return random() * 2 - 0.5;
      }),
    ),
  }));
}

function differentBlock(): Block {
  const random = randomNumbers(7);
  return {
    rows: largestBlock,
    values: columns.map(() => Float64Array.from({ length: largestBlock }, () => random() * 40 - 5)),
  };
}

let consumed = 0;

function csvJob(job: string, blocks: readonly Block[], note: string): Job {
  const writer = new CsvBlockWriter(columns);
  return {
    job,
    unit: 'rows/s',
    note,
    once: () => {
      let rows = 0;
      for (const block of blocks) {
        writer.reset();
        writer.append(block);
        consumed += writer.bytes().length;
        rows += block.rows;
      }
      return rows;
    },
  };
}

function parquetJob(job: string, blocks: readonly Block[], note: string): Job {
  const writer = new ParquetBlockWriter(columns);
  return {
    job,
    unit: 'rows/s',
    note,
    once: () => {
      let rows = 0;
      for (const block of blocks) {
        writer.reset();
        consumed += writer.append(block).bytes;
        rows += block.rows;
      }
      return rows;
    },
  };
}

/** Few rows: it is slow, and its speed does not depend on their number. */
function fastCsvJob({ values }: Block): Job {
  const rows = 4096;
  return {
    job: 'CSV, fast-csv',
    unit: 'rows/s',
    note: '7 digits by toPrecision',
    once: async () => {
      const table = Array.from({ length: rows }, (_, i) => values.map((v) => Number(v[i].toPrecision(7))));
      consumed += (await writeToBuffer(table)).length;
      return rows;
    },
  };
}

function libraryParquetJob({ rows, values }: Block): Job {
  return {
    job: 'Parquet, hyparquet-writer',
    unit: 'rows/s',
    note: 'doubles, byte-stream-split, uncompressed',
    once: () => {
      const columnData = values.map((data, c) => ({
        name: columns[c].name,
        data,
        type: 'DOUBLE' as const,
        encoding: 'BYTE_STREAM_SPLIT' as const,
      }));
      consumed += parquetWriteBuffer({ columnData, codec: 'UNCOMPRESSED' }).byteLength;
      return rows;
    },
  };
}

function partJob(job: string, folder: string, blocks: readonly Block[]): Job {
  const writer = new PartWriter(join(folder, 'parts'), columns);
  return {
    job,
    unit: 'rows/s',
    note: 'CSV and Parquet, hash, sync, rename',
    once: () => {
      writer.begin(0, 0);
      for (const block of blocks) writer.append(block);
      return writer.finish().rows;
    },
  };
}

function assembleJob(job: string, folder: string, blocks: readonly Block[]): Job {
  const writer = new PartWriter(join(folder, 'parts-to-join'), columns);
  const parts = [0, 1, 2, 3].map((part) => {
    writer.begin(part, part * blocks.length * largestBlock);
    for (const block of blocks) writer.append(block);
    return writer.finish();
  });
  const megabytes = parts.reduce((sum, { bytes }) => sum + bytes, 0) / 1e6;
  return {
    job,
    unit: 'MB/s',
    note: 'parts checked against their hashes and joined',
    once: async () => {
      await assembleCases(folder, parts, columns);
      return megabytes;
    },
  };
}

export async function benchResults(): Promise<BenchRow[]> {
  const blocks = realisticBlocks(8);
  const [disk, memory] = [tmpdir(), '/dev/shm'].map((base) => mkdtempSync(join(base, 'aftlimit-bench-')));
  try {
    const measured = await measure([
      csvJob('CSV, own', blocks, 'realistic repeats'),
      csvJob('CSV, own, every value different', [differentBlock()], '30 columns of different doubles'),
      fastCsvJob(blocks[0]),
      parquetJob('Parquet, own', blocks, 'realistic repeats'),
      parquetJob(
        'Parquet, own, every value different',
        [differentBlock()],
        '30 columns of different doubles',
      ),
      libraryParquetJob(blocks[0]),
      partJob('part on the memory disk', memory, blocks),
      partJob('part on the disk', disk, blocks),
      assembleJob('joining parts on the memory disk', memory, blocks),
      assembleJob('joining parts on the disk', disk, blocks),
    ]);
    if (consumed === 0) throw new Error('nothing was written');
    return measured;
  } finally {
    for (const folder of [disk, memory]) rmSync(folder, { recursive: true, force: true });
  }
}

if (process.argv[1]?.includes('results.bench')) {
  for (const { job, unit, median, spread, note } of await benchResults()) {
    const [least, most] = spread.map((rate) => Math.round(rate).toLocaleString('en'));
    console.log(`${job}: ${Math.round(median).toLocaleString('en')} ${unit} (${least} … ${most}); ${note}`);
  }
}
