import { readFileSync } from 'node:fs';

const here = new URL('.', import.meta.url);

/** Figures computed outside this project; how, stands in their `source`. */
export function readTraceReference<T>(name: string): T {
  return JSON.parse(readFileSync(new URL(name, here), 'utf8')) as T;
}
