import { readFileSync } from 'node:fs';
import type { Cycle } from '../../models/cycle/cycle.ts';
import type { Layout } from '../../models/log/layout.ts';
import type { Load } from '../../models/run/load.ts';

/** One of the recorded runs that are also held against the engine alone. */
export function recordedCase(name: string) {
  const read = (file: string) => readFileSync(new URL(`../golden/recorded/${name}/${file}`, import.meta.url));
  const json = (file: string) => JSON.parse(read(file).toString());
  return {
    log: read('run.csv'),
    layout: json('layout.json') as Layout,
    cycle: json('cycle.json') as Cycle,
    load: (): Load => json('load.json'),
  };
}
