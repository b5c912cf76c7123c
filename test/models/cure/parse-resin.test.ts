import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { parseResin } from '../../../models/cure/parse-resin.ts';
import { DomainError } from '../../../models/errors.ts';
import { recalledResin, referenceSets } from '../../reference/cure/reference-sets.ts';

const shipped = new URL('../../../models/cure/resins/', import.meta.url);
const readShipped = (name: string) => JSON.parse(readFileSync(new URL(name, shipped), 'utf8'));
const practice = readShipped('skerry-180.json');

/** The practice document with one value changed; undefined takes the key away. */
function changed(path: string, value: unknown): unknown {
  const document = structuredClone(practice);
  const keys = path.split('.');
  let place = document;
  for (const key of keys.slice(0, -1)) place = place[key] ??= {};
  if (value === undefined) delete place[keys.at(-1)!];
  else place[keys.at(-1)!] = value;
  return document;
}

function refusalOf(document: unknown): DomainError {
  try {
    parseResin(document);
  } catch (error) {
    if (error instanceof DomainError) return error;
    throw error;
  }
  throw new Error('was not refused');
}

const perMinute = { ...practice.kinetics, A1: 2600 * 60, A2: 11800 * 60 };
const lls = recalledResin('lls_3501_6');

describe('parseResin', () => {
  it('returns the practice set as it stands', () => {
    expect(parseResin(practice)).toEqual(practice);
  });

  it.each(readdirSync(shipped))('reads the shipped set %s', (name) => {
    expect(parseResin(readShipped(name)).code).toBe(name.replace('.json', ''));
  });

  it.each(Object.keys(referenceSets))('refuses no published law: %s', (name) => {
    expect(parseResin(JSON.parse(JSON.stringify(recalledResin(name))))).toEqual(recalledResin(name));
  });

  it.each([
    ['format', 'dwellbook-resin/2', 'document-wrong-format'],
    ['colour', 'amber', 'document-unknown-key'],
    ['kinetics.k', 1, 'document-unknown-key'],
    ['initialDegree', undefined, 'document-missing-key'],
    ['gasConstant', undefined, 'document-missing-key'],
    ['kinetics.E1', undefined, 'document-missing-key'],
    ['initialDegree', 1, 'document-wrong-value'],
    ['initialDegree', -0.01, 'document-wrong-value'],
    ['initialDegree', '0.01', 'document-wrong-value'],
    ['kinetics.A1', -2600, 'document-wrong-value'],
    ['kinetics.E1', -61300, 'document-wrong-value'],
    ['kinetics.E1', 61.3, 'document-wrong-value'],
    ['kinetics.n', 0, 'document-wrong-value'],
    ['kinetics.m', -1, 'document-wrong-value'],
    ['kinetics.law', 'arrhenius', 'document-wrong-value'],
    ['gasConstant', 1.987, 'document-wrong-value'],
    ['validC', [200, 60], 'document-wrong-value'],
    ['validC', [333, 445], 'document-wrong-value'],
    ['diffusion.alphaCT', -0.005, 'document-wrong-value'],
    ['glassTransition.tgInfC', -20, 'document-wrong-value'],
    ['glassTransition.tgInfC', 494, 'document-wrong-value'],
    ['glassTransition.lambda', 0, 'document-wrong-value'],
    ['gel.degree', 1.2, 'document-wrong-value'],
    ['thermal.heatOfReaction', 466, 'document-wrong-value'],
    ['thermal.basis', 'fibre', 'document-wrong-value'],
    ['source.status', 'trusted', 'document-wrong-value'],
  ])('refuses %s = %j by name', (path, value, code) => {
    const refusal = refusalOf(changed(path, value));
    expect(refusal.code).toBe(code);
    expect(refusal.message).toContain(path);
  });

  it('asks about rate constants per minute taken for per second', () => {
    const refusal = refusalOf(changed('kinetics', perMinute));
    expect(refusal.message).toMatch(/^kinetics .* 1\/min\?/);
  });

  it('takes fast rate constants whose author confirms them', () => {
    const document = changed('kinetics', perMinute) as typeof practice;
    document.source.confirmed = 'a snap-cure resin; table 2 prints A in 1/s';
    expect(parseResin(document).kinetics).toEqual(perMinute);
  });

  it('asks about a diffusion line for °C, where the integration has K', () => {
    // The practice line moved to °C: αC0 + 273.15 αCT.
    const refusal = refusalOf(changed('diffusion.alphaC0', -1.355 + 0.00502 * 273.15));
    expect(refusal.message).toMatch(/^diffusion\.alphaC0 .* °C\?/);
  });

  it('refuses a diffusion line that stops the cure before it starts', () => {
    expect(refusalOf(changed('diffusion.alphaC0', -2.5)).message).toContain('before it starts');
  });

  it('refuses a start from 0 where nothing ever starts from 0', () => {
    const refusal = refusalOf({ ...recalledResin('hubert_8552'), initialDegree: 0 });
    expect(refusal.message).toMatch(/^initialDegree .* above 0/);
  });

  it('takes the negative A2 of Lee, Loos and Springer and refuses a lost sign', () => {
    expect(refusalOf({ ...lls, kinetics: { ...lls.kinetics, A2: 33566666 } }).message).toContain('kinetics.A2');
  });

  it('refuses a first branch that stalls before its switch even when hottest', () => {
    expect(refusalOf({ ...lls, kinetics: { ...lls.kinetics, A2: -66566666 } }).message).toContain('stalls');
  });

  it.each([
    ['degree', [0.01, 0.5, 0.5], 'kinetics.degree[2]'],
    ['E', [60000, 61000], 'kinetics.E'],
    ['lnAf', [10, 11, null], 'kinetics.lnAf[2]'],
  ])('refuses an isoconversional table with a bad %s', (key, list, named) => {
    const table = { law: 'isoconversional', degree: [0.01, 0.5, 0.9], E: [6e4, 6e4, 6e4], lnAf: [10, 11, 9] };
    const { diffusion: _, ...rest } = practice;
    expect(refusalOf({ ...rest, kinetics: { ...table, [key]: list } }).message).toContain(named);
    expect(refusalOf({ ...rest, initialDegree: 0.005, kinetics: table }).message).toContain('initialDegree');
    expect(parseResin({ ...rest, kinetics: table }).kinetics.law).toBe('isoconversional');
  });
});
