import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Sources } from './directions.ts';

export const top = join(import.meta.dirname, '..', '..');

/** Every hand-written source of the house, by its path from the top. */
export function readSources(): Sources {
  const sources = new Map<string, string>();
  for (const room of ['models', 'server', 'web', 'test']) {
    if (!existsSync(join(top, room))) continue;
    for (const entry of readdirSync(join(top, room), { recursive: true, withFileTypes: true })) {
      const path = join(entry.parentPath, entry.name)
        .slice(top.length + 1)
        .replaceAll('\\', '/');
      if (entry.isFile() && /\.(ts|tsx|mjs|css)$/.test(entry.name))
        sources.set(path, readFileSync(join(top, path), 'utf8'));
    }
  }
  for (const name of readdirSync(top)) {
    if (/\.(ts|mts|js|mjs)$/.test(name)) sources.set(name, readFileSync(join(top, name), 'utf8'));
  }
  return sources;
}
