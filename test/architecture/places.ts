/** Where a file may live, and what it may import: the longest matching place counts. */
export interface Place {
  /** Places whose files it may import. */
  readonly may: readonly string[];
  /** Places of which it may import types only. */
  readonly mayTypes?: readonly string[];
  /** Packages and built-in modules it may import; `*` is any, `node:` every built-in. */
  readonly packages: readonly string[];
}

const MODELS = [
  'models',
  'models/numerics',
  'models/log',
  'models/cycle',
  'models/run',
  'models/cure',
  'models/evaluation',
  'models/chart',
  'models/material',
  'models/trace',
  'models/forecast',
  'models/measured',
];
const PATHS = [
  'server/contract/paths.ts',
  'server/contract/instrument-paths.ts',
  'server/contract/trace-paths.ts',
  'server/contract/record-paths.ts',
];
const CONTRACT = ['server/contract', ...PATHS];
const SHARED = ['models', 'models/numerics'];
const WEB_PACKAGES = ['preact', '@preact/signals', 'preact-iso', 'chart.js', '@fontsource-variable/*'];

function room(may: readonly string[], packages: readonly string[] = []): Place {
  return { may, packages };
}

function webRoom(may: readonly string[]): Place {
  return {
    may: [...may, ...MODELS, ...PATHS],
    mayTypes: ['server/contract'],
    packages: WEB_PACKAGES,
  };
}

/** `models` stands for the files directly in it (errors, units, document), `web` for those directly in web. */
export const PLACES: Readonly<Record<string, Place>> = {
  models: room(['models']),
  'models/numerics': room(SHARED),
  'models/log': room([...SHARED, 'models/log']),
  'models/cycle': room([...SHARED, 'models/cycle']),
  'models/cure': room([...SHARED, 'models/cure']),
  'models/run': room([...SHARED, 'models/run', 'models/log', 'models/cycle']),
  'models/evaluation': room([
    ...SHARED,
    'models/evaluation',
    'models/run',
    'models/log',
    'models/cycle',
    'models/cure',
    'models/material',
  ]),
  'models/chart': room([
    ...SHARED,
    'models/chart',
    'models/evaluation',
    'models/run',
    'models/log',
    'models/cycle',
    'models/cure',
  ]),
  'models/material': room([...SHARED, 'models/material', 'models/cure']),
  'models/measured': room(SHARED),
  'models/trace': room([...SHARED, 'models/trace', 'models/evaluation']),
  'models/forecast': room([...MODELS.filter((place) => !/chart|material|trace/.test(place))]),

  'server/contract': room([...CONTRACT, ...MODELS], ['zod']),
  // Addresses only: it loads no schema, so that pages may build them too.
  'server/contract/paths.ts': room([]),
  'server/contract/record-paths.ts': room(['server/contract/paths.ts']),
  'server/contract/instrument-paths.ts': room(PATHS),
  'server/contract/trace-paths.ts': room(PATHS),
  'server/store': room(['server/store', ...CONTRACT, ...MODELS], ['node:', 'better-sqlite3']),
  'server/files': room(['server/files', ...CONTRACT, ...MODELS], ['node:', 'read-excel-file']),
  'server/report': room(['server/report', ...CONTRACT, ...MODELS], ['node:', '@bwip-js/node']),
  'server/actions': room(
    ['server/actions', 'server/store', 'server/files', 'server/report', ...CONTRACT, ...MODELS],
    ['node:'],
  ),
  'server/live': room(
    ['server/live', 'server/actions', 'server/store', 'server/files', ...CONTRACT, ...MODELS],
    ['node:', 'chokidar', 'modbus-serial', 'mqtt', 'nodemailer'],
  ),
  'server/practice': room(
    ['server/practice', 'server/actions', 'server/store', 'server/files', ...CONTRACT, ...MODELS],
    ['node:'],
  ),
  'server/http': room(
    [
      'server/http',
      'server/actions',
      'server/store',
      'server/files',
      'server/report',
      'server/live',
      ...CONTRACT,
      ...MODELS,
    ],
    ['node:', 'express', 'compression', 'helmet', 'zod'],
  ),
  'server/app.ts': room(
    ['server/http', 'server/live', 'server/store', 'server/actions', ...CONTRACT, ...MODELS],
    ['node:', 'express', 'compression', 'helmet'],
  ),
  'server/command': room(
    [
      'server/command',
      'server/app.ts',
      'server/http',
      'server/live',
      'server/practice',
      'server/report',
      'server/actions',
      'server/store',
      'server/files',
      ...CONTRACT,
      ...MODELS,
    ],
    ['node:'],
  ),
  'server/main.ts': room(['server/command', 'server/app.ts', 'models'], ['node:']),

  web: webRoom(['web', 'web/pages', 'web/parts', 'web/charts', 'web/style']),
  'web/pages': webRoom(['web', 'web/pages', 'web/parts', 'web/charts', 'web/words', 'web/style']),
  'web/parts': webRoom(['web', 'web/parts', 'web/words', 'web/style']),
  'web/charts': webRoom(['web', 'web/charts', 'web/parts', 'web/words', 'web/style']),
  'web/words': webRoom(['web/words']),
  'web/style': { may: ['web/style'], packages: WEB_PACKAGES },

  test: { may: ['*'], packages: ['*', 'node:'] },
  'vite.config.ts': room([], ['*', 'node:']),
  'vitest.config.ts': room([], ['*', 'node:']),
};

/** The place of a file; null where it lies in none. `models/errors.ts` is of `models`, `models/foo/a.ts` of no place. */
export function placeOf(file: string): string | null {
  if (Object.hasOwn(PLACES, file)) return file;
  for (let folder = folderOf(file); folder !== ''; folder = folderOf(folder)) {
    if (!Object.hasOwn(PLACES, folder)) continue;
    const isFlat = folder === 'models' || folder === 'web';
    return isFlat && folderOf(file) !== folder ? null : folder;
  }
  return null;
}

function folderOf(path: string): string {
  return path.includes('/') ? path.slice(0, path.lastIndexOf('/')) : '';
}
