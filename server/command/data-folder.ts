import { existsSync, mkdirSync } from 'node:fs';
import { homedir } from 'node:os';
import { join, resolve } from 'node:path';
import { DomainError } from '../../models/errors.ts';

/** Where a workshop's data is kept where nobody says: the place the desktop keeps such things in. */
export function defaultDataFolder(env: NodeJS.ProcessEnv = process.env, platform = process.platform): string {
  if (platform === 'win32') return join(env.LOCALAPPDATA ?? join(homedir(), 'AppData', 'Local'), 'dwellbook');
  if (platform === 'darwin') return join(homedir(), 'Library', 'Application Support', 'dwellbook');
  return join(env.XDG_DATA_HOME || join(homedir(), '.local', 'share'), 'dwellbook');
}

/** The folder of a workshop, made where it is new. */
export function makeDataFolder(folder: string): string {
  const path = resolve(folder);
  try {
    mkdirSync(path, { recursive: true });
  } catch (cause) {
    const { code = 'unknown error' } = cause as NodeJS.ErrnoException;
    throw new DomainError(
      'file-unreadable',
      `${path}: the data folder cannot be made (${code})`,
      { folder: path },
      { cause },
    );
  }
  return path;
}

export function databasePath(folder: string): string {
  return join(folder, 'workshop.sqlite');
}

/** Refuses where a workshop must be there already. */
export function requireDatabase(folder: string): string {
  const path = databasePath(resolve(folder));
  if (existsSync(path)) return path;
  throw new DomainError('file-unreadable', `${path}: there is no workshop here`, { file: path });
}
