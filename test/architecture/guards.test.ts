import { describe, expect, it } from 'vitest';
import { findCircles, findWrongDirections } from './directions.ts';
import { findImpurities } from './impurities.ts';
import { placeOf } from './places.ts';
import { readImports } from './read-imports.ts';

/** A house of one file that imports, and the files it may find. */
function house(file: string, text: string): Map<string, string> {
  return new Map([
    ['models/errors.ts', ''],
    ['models/log/readings.ts', ''],
    ['models/run/digest.ts', ''],
    ['models/evaluation/judge.ts', ''],
    ['server/contract/runs.ts', ''],
    ['server/store/runs.ts', ''],
    ['server/actions/record-run.ts', ''],
    ['server/http/routes.ts', ''],
    ['web/api.ts', ''],
    ['web/pages/run.tsx', ''],
    [file, text],
  ]);
}

describe('findWrongDirections', () => {
  it.each([
    ['static', 'models/log/a.ts', "import { judge } from '../evaluation/judge.ts';"],
    ['several lines', 'models/log/a.ts', "import {\n  judge,\n  other,\n} from '../evaluation/judge.ts';"],
    ['type only', 'models/log/a.ts', "import type { Judge } from '../evaluation/judge.ts';"],
    ['re-export', 'models/log/a.ts', "export { judge } from '../evaluation/judge.ts';"],
    ['re-export of all', 'models/log/a.ts', "export * from '../evaluation/judge.ts';"],
    ['re-export of a type', 'models/log/a.ts', "export type { Judge } from '../evaluation/judge.ts';"],
    ['side effect', 'models/log/a.ts', "import '../evaluation/judge.ts';"],
    ['dynamic', 'models/log/a.ts', "const judge = await import('../evaluation/judge.ts');"],
    ['a type by import()', 'models/log/a.ts', "let a: import('../evaluation/judge.ts').Judge;"],
    ['after a comment', 'models/log/a.ts', "/* it's */ import { judge } from '../evaluation/judge.ts';"],
    ['dynamic without a plain name', 'models/log/a.ts', 'const a = await import(name);'],
    ['dynamic by template', 'models/log/a.ts', 'const a = await import(`../$' + '{name}.ts`);'],
    ['the server from models', 'models/run/a.ts', "import { insertRun } from '../../server/store/runs.ts';"],
    ['a package in models', 'models/log/a.ts', "import { parse } from 'csv-parse';"],
    ['a built-in in models', 'models/log/a.ts', "import { readFileSync } from 'node:fs';"],
    ['run knowing the evaluation', 'models/run/a.ts', "import { judge } from '../evaluation/judge.ts';"],
    ['the store knowing http', 'server/store/a.ts', "import { routes } from '../http/routes.ts';"],
    ['the store knowing actions', 'server/store/a.ts', "import { recordRun } from '../actions/record-run.ts';"],
    ['SQL outside the store', 'server/http/a.ts', "import Database from 'better-sqlite3';"],
    ['the server from web', 'web/pages/a.tsx', "import type { Run } from '../../server/store/runs.ts';"],
    ['values of the contract in web', 'web/api.ts', "import { paths } from '../server/contract/runs.ts';"],
    ['a value among types in web', 'web/api.ts', "import { type Run, paths } from '../server/contract/runs.ts';"],
    ['a worker by its address', 'web/api.ts', "new Worker(new URL('../server/store/runs.ts', import.meta.url));"],
    ['a part knowing a page', 'web/parts/a.tsx', "import { Run } from '../pages/run.tsx';"],
    ['a file in no place', 'models/extras/a.ts', ''],
    ['a room of the server not listed', 'server/extras/a.ts', ''],
    ['a file that is not there', 'models/log/a.ts', "import { b } from './b.ts';"],
    ['a file outside the house', 'models/log/a.ts', "import { b } from '../../../elsewhere/b.ts';"],
  ])('notices %s', (_, file, text) => {
    expect(findWrongDirections(house(file, text))).toHaveLength(1);
  });

  it.each([
    ['errors from anywhere in models', 'models/log/a.ts', "import { DomainError } from '../errors.ts';"],
    ['log from run', 'models/run/a.ts', "import type { Readings } from '../log/readings.ts';"],
    ['run from evaluation', 'models/evaluation/a.ts', "import { beginRun } from '../run/digest.ts';"],
    ['the store from actions', 'server/actions/a.ts', "import { insertRun } from '../store/runs.ts';"],
    ['SQL in the store', 'server/store/a.ts', "import Database from 'better-sqlite3';"],
    ['types of the contract in web', 'web/api.ts', "import type { Run } from '../server/contract/runs.ts';"],
    ['models in web', 'web/pages/a.tsx', "import { DomainError } from '../../models/errors.ts';"],
    ['a page loaded late', 'web/main.tsx', "const Run = lazy(() => import('./pages/run.tsx'));"],
    ['words in a comment', 'models/log/a.ts', "// import { judge } from '../evaluation/judge.ts';\n/* import('x') */"],
    ['a type called type', 'models/log/a.ts', "import { type } from '../errors.ts';"],
    ['words in prose', 'web/pages/a.tsx', '<p>Drop a file here to import (or type its name).</p>'],
    ['anything in tests', 'test/models/a.test.ts', "import { judge } from '../../models/evaluation/judge.ts';"],
  ])('allows %s', (_, file, text) => {
    expect(findWrongDirections(house(file, text))).toEqual([]);
  });
});

describe('readImports', () => {
  it('tells a type-only import from one with a value in it', () => {
    const typeOnly = (text: string) => readImports(text).imports.map((one) => one.typeOnly);
    expect(typeOnly("import type { A } from './a.ts';")).toEqual([true]);
    expect(typeOnly("import type A from './a.ts';")).toEqual([true]);
    expect(typeOnly("export type * from './a.ts';")).toEqual([true]);
    expect(typeOnly("import { type A } from './a.ts';")).toEqual([false]);
    expect(typeOnly("import type, { A } from './a.ts';")).toEqual([false]);
    expect(typeOnly("import type from './a.ts';")).toEqual([false]);
  });
});

describe('findCircles', () => {
  it('notices a circle of three', () => {
    const circle = new Map([
      ['models/a.ts', "import { b } from './b.ts';"],
      ['models/b.ts', "export * from './c.ts';"],
      ['models/c.ts', "import './a.ts';"],
    ]);
    expect(findCircles(circle)).toEqual(['models/a.ts -> models/b.ts -> models/c.ts -> models/a.ts']);
  });

  it('passes a diamond, and two files that know each other by type', () => {
    const diamond = new Map([
      ['models/a.ts', "import './b.ts';\nimport './c.ts';"],
      ['models/b.ts', "import './d.ts';"],
      ['models/c.ts', "import './d.ts';"],
      ['models/d.ts', "import type { A } from './a.ts';"],
    ]);
    expect(findCircles(diamond)).toEqual([]);
  });
});

describe('findImpurities', () => {
  it.each([
    'Date.now()',
    'new Date()',
    'new Date',
    'new Date( )',
    'Date()',
    'Math.random()',
    'performance.now()',
    'fetch(url)',
  ])('notices %s', (text) => {
    expect(findImpurities(`const a = ${text};`)).not.toEqual([]);
  });

  it.each([
    'new Date(timeMs).toISOString()',
    'Date.UTC(2026, 2, 1)',
    'Date.parse(text)',
    'document.stages',
    'window.from',
    'instant.Date(1)',
    '1; // not Date.now()',
  ])('allows %s', (text) => {
    expect(findImpurities(`const a = ${text};`)).toEqual([]);
  });
});

describe('placeOf', () => {
  it('takes the longest place, and none for an unlisted folder', () => {
    expect(placeOf('models/errors.ts')).toBe('models');
    expect(placeOf('models/log/time/zone.ts')).toBe('models/log');
    expect(placeOf('server/main.ts')).toBe('server/main.ts');
    expect(placeOf('models/extras/a.ts')).toBeNull();
    expect(placeOf('web/extras/a.tsx')).toBeNull();
    expect(placeOf('server/a.ts')).toBeNull();
    expect(placeOf('stray.ts')).toBeNull();
  });
});
