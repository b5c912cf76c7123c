import { describe, expect, it } from 'vitest';
import { parseMaterial } from '../../../models/material/parse-material.ts';
import { TAPE } from './made-ledger.ts';

const WHOLE = {
  ...TAPE,
  maker: 'Skerry Row',
  form: 'prepreg tape',
  origin: { document: 'SR-MS-002', issue: '1', clause: '4' },
  resin: 'skerry-180',
  storage: { ...TAPE.storage, atLeast: -40 },
  out: { ...TAPE.out, humidityAtMost: 60 },
  tack: { lifeDays: 20 },
  thaw: { from: 'temperature', above: 10 },
  refreezing: { atMost: 3 },
  equivalent: { rule: 'arrhenius', approvedBy: 'process engineer 1', E: 90_000, atMost: 32, colderCountsLess: false },
  extension: { times: 1, tests: ['DSC'] },
  ageing: { freshDegree: 0.01, degreeAtOutLife: 0.03, source: 'DSC' },
};

describe('parseMaterial', () => {
  it('reads every key and keeps it as written', () => {
    expect(parseMaterial(JSON.parse(JSON.stringify(WHOLE)))).toEqual(WHOLE);
  });

  it.each<[object, string]>([
    [{ format: 'dwellbook-resin/1' }, 'format'],
    [{ shelf: 1 }, 'shelf'],
    [{ out: { atMost: 24 } }, 'out.lifeDays'],
    [{ out: { atMost: 24, lifeDays: 0 } }, 'out.lifeDays'],
    [{ out: { atMost: 75, lifeDays: 30 }, thaw: undefined }, 'out.atMost'], // °F taken for °C
    [{ storage: { atMost: -18, lifeDays: 365, atLeast: -10 } }, 'storage.atLeast'],
    [{ storage: { atMost: -18, lifeDays: 365, outAbove: -20 } }, 'storage.outAbove'],
    [{ storage: { atMost: 25, lifeDays: 365 } }, 'out.atMost'],
    [{ thaw: { from: 'temperature' } }, 'thaw.above'],
    [{ thaw: { from: 'temperature', above: 30 } }, 'thaw.above'],
    [{ refreezing: { atMost: 1.5 } }, 'refreezing.atMost'],
    [{ equivalent: { rule: 'arrhenius', E: 90_000, atMost: 32 } }, 'equivalent.approvedBy'],
    [{ equivalent: { rule: 'arrhenius', approvedBy: 'x', E: 90, atMost: 32 } }, 'equivalent.E'], // kJ/mol for J/mol
    [{ equivalent: { rule: 'arrhenius', approvedBy: 'x', E: 90_000, atMost: 24 } }, 'equivalent.atMost'],
    [
      {
        equivalent: {
          rule: 'two-lives',
          approvedBy: 'x',
          lives: [
            [23, 30],
            [32, 10],
          ],
        },
      },
      'equivalent.lives[0]',
    ],
    [
      {
        equivalent: {
          rule: 'two-lives',
          approvedBy: 'x',
          lives: [
            [24, 30],
            [32, 40],
          ],
        },
      },
      'equivalent.lives[1]',
    ],
    [{ ageing: { freshDegree: 0.03, degreeAtOutLife: 0.01, source: 'DSC' } }, 'ageing.degreeAtOutLife'],
  ])('refuses %o at %s', (change, path) => {
    const document = JSON.parse(JSON.stringify({ ...WHOLE, ...change }));
    expect(() => parseMaterial(document)).toThrow(expect.objectContaining({ message: expect.stringContaining(path) }));
  });

  it('takes a document in °F', () => {
    const fahrenheit = {
      ...TAPE,
      units: { temperature: '°F' },
      storage: { atMost: 0, lifeDays: 365 },
      out: { lifeDays: 10, atMost: 75 },
    };
    expect(parseMaterial(fahrenheit).out.atMost).toBe(75);
  });
});
