import { readdirSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { parseArgs } from 'node:util';
import type { BenchResult } from './result.ts';

type Bench = () => Promise<BenchResult[]>;

/** Runs every benchmark beside this file, one after the other; each says what it measured beside its floor. */
async function main(): Promise<void> {
  const { values, positionals } = parseArgs({ options: { json: { type: 'boolean' } }, allowPositionals: true });
  const results: BenchResult[] = [];
  for (const bench of await findBenches()) {
    if (positionals.length > 0 && !positionals.some((name) => bench.name.toLowerCase().includes(name))) continue;
    if (!values.json) process.stderr.write(`${bench.name} …\n`);
    results.push(...(await bench()));
  }
  process.stdout.write(values.json ? `${JSON.stringify(results, null, 1)}\n` : table(results));
}

/** A benchmark is an exported function whose name begins with `bench` and takes nothing. */
async function findBenches(): Promise<Bench[]> {
  const folder = new URL('./', import.meta.url);
  const files = readdirSync(fileURLToPath(folder)).filter((file) => file.endsWith('.js') && file !== 'main.js');
  const rooms = await Promise.all(files.sort().map((file) => import(new URL(file, folder).href)));
  return rooms.flatMap((room) =>
    Object.entries(room).flatMap(([name, value]) =>
      /^bench[A-Z]/.test(name) && typeof value === 'function' && value.length === 0 ? [value as Bench] : [],
    ),
  );
}

function table(results: readonly BenchResult[]): string {
  const rows = results.map(({ name, value, unit, floor, ratio, goal, holds, note }) => [
    holds ? 'holds' : 'FALLS SHORT',
    name,
    `${shown(value)} ${unit}`,
    floor === null ? '' : `floor ${shown(floor)}`,
    ratio === null ? '' : `ratio ${shown(ratio)}`,
    `goal ${goal}`,
    note ?? '',
  ]);
  const widths = [0, 1, 2, 3, 4, 5].map((column) => Math.max(...rows.map((row) => row[column]?.length ?? 0)));
  return rows
    .map(
      (row) =>
        `${row
          .map((cell, n) => cell.padEnd(widths[n] ?? 0))
          .join('  ')
          .trimEnd()}\n`,
    )
    .join('');
}

function shown(figure: number): string {
  return String(Number(figure.toPrecision(3)));
}

await main();
