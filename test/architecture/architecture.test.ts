import { describe, expect, it } from 'vitest';
import { ERROR_CODES } from '../../models/errors.ts';
import { findCircles, findWrongDirections } from './directions.ts';
import { findImpurities } from './impurities.ts';
import { readSources } from './read-sources.ts';

const sources = readSources();
const files = [...sources.keys()];

describe('the house', () => {
  it('was seen', () => {
    for (const file of ['models/errors.ts', 'models/cycle/cycle.ts', 'test/architecture/places.ts', 'vite.config.ts']) {
      expect(files).toContain(file);
    }
    expect(files.filter((file) => file.startsWith('models/')).length).toBeGreaterThan(7);
  });

  it('imports only in the directions of the table', () => {
    expect(findWrongDirections(sources)).toEqual([]);
  });

  it('has no circles', () => {
    expect(findCircles(sources)).toEqual([]);
  });

  it('keeps models pure', () => {
    const impure = files
      .filter((file) => file.startsWith('models/'))
      .flatMap((file) => findImpurities(sources.get(file)!).map((what) => `${file} ${what}`));
    expect(impure).toEqual([]);
  });

  it('fetches only in web/api.ts', () => {
    const fetching = files.filter((file) => file.startsWith('web/') && /\bfetch\s*\(/.test(sources.get(file)!));
    expect(fetching.filter((file) => file !== 'web/api.ts')).toEqual([]);
  });

  it('has no hand-written file above 300 lines', () => {
    const long = files.filter((file) => sources.get(file)!.trimEnd().split('\n').length > 300);
    expect(long).toEqual([]);
  });

  it('names files in kebab-case, with no barrels and no utils', () => {
    const odd = files.filter((file) => {
      const name = file.slice(file.lastIndexOf('/') + 1);
      return (
        !/^[a-z0-9]+(-[a-z0-9]+)*(\.[a-z]+)*\.(ts|tsx|mjs|css)$/.test(name) || /^(index|utils?|helpers?)\./.test(name)
      );
    });
    expect(odd).toEqual([]);
  });

  it('skips no test and leaves none alone', () => {
    const marks = new RegExp(`\\b(?:it|test|describe)\\.(?:${['skip', 'only', 'todo', 'fails'].join('|')})\\b`);
    expect(files.filter((file) => file.endsWith('.test.ts') && marks.test(sources.get(file)!))).toEqual([]);
  });
});

describe('server/http/problem.ts', () => {
  it('has a row for every error code', () => {
    const table = sources.get('server/http/problem.ts') ?? '';
    expect(ERROR_CODES.length).toBeGreaterThan(10);
    expect(ERROR_CODES.filter((code) => !new RegExp(`['"]?\\b${code}['"]?\\s*:`).test(table))).toEqual([]);
  });
});
