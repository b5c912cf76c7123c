import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { parseResin } from '../../../models/cure/parse-resin.ts';
import { recalledResin } from '../../reference/cure/reference-sets.ts';

const folder = new URL('../../../models/cure/resins/', import.meta.url);
const resins = readdirSync(folder).map((name) => parseResin(JSON.parse(readFileSync(new URL(name, folder), 'utf8'))));

describe('the shipped resin documents', () => {
  it('are published or invented for practice, never from memory', () => {
    expect(resins.map(({ source }) => source.status).filter((status) => status === 'recalled')).toEqual([]);
    for (const { source, code } of resins) {
      if (source.status === 'illustrative') expect(code).toBe('skerry-180');
      else expect(source.citation).toMatch(/abstract: /);
    }
  });

  it('give a published set no Tg, gel or range that its study does not', () => {
    for (const resin of resins.filter(({ source }) => source.status === 'published')) {
      expect([resin.glassTransition, resin.gel, resin.validC, resin.thermal]).toEqual([
        undefined,
        undefined,
        undefined,
        undefined,
      ]);
    }
  });

  // Source: the abstracts named in the documents, as set down in test/reference/cure/kinetics.json.
  it.each([
    ['e44-aromatic-amine', 'e44_aromatic_amine'],
    ['vinyl-ester-40-diluent', 'vinylester_lo'],
  ])('%s carries the figures of its abstract', (code, reference) => {
    const shipped = resins.find((resin) => resin.code === code);
    expect(shipped?.kinetics).toEqual(recalledResin(reference).kinetics);
  });
});
