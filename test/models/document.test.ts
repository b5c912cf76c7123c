import { describe, expect, it } from 'vitest';
import {
  format,
  listOf,
  number,
  object,
  oneOf,
  pairOf,
  parseJson,
  refuseNamedTwice,
  text,
} from '../../models/document.ts';
import { DomainError } from '../../models/errors.ts';

const readStage = object((fields) => ({
  name: fields.required('name', text),
  kind: fields.required('kind', oneOf(['heat', 'dwell'])),
  ...fields.optional('over', pairOf(number())),
  ...fields.optional('minutes', number({ above: 0 })),
}));
const readDocument = object((fields) => ({
  format: fields.required('format', format('trial/1')),
  stages: fields.required('stages', listOf(readStage, { atLeast: 1 })),
}));

/** The refusal of a call, as `code at key`. */
function refusalOf(call: () => unknown): string {
  try {
    call();
  } catch (error) {
    if (error instanceof DomainError) return `${error.code} at ${error.facts.key}`;
    throw error;
  }
  return 'none';
}

describe('object', () => {
  it('returns what it was asked for and leaves absent keys absent', () => {
    const document = { format: 'trial/1', stages: [{ name: 'a', kind: 'heat', over: [1, 2] }] };
    expect(readDocument(document, '')).toStrictEqual(document);
  });

  it.each([
    [{ format: 'trial/1' }, 'document-missing-key at stages'],
    [{ format: 'trial/2', stages: [] }, 'document-wrong-format at format'],
    [{ format: 'trial/1', stages: [] }, 'document-wrong-value at stages'],
    [{ format: 'trial/1', stages: [{ name: 'a', kind: 'heat' }], more: 1 }, 'document-unknown-key at more'],
    [{ format: 'trial/1', stages: [{ name: 'a', kind: 'heat', Over: 1 }] }, 'document-unknown-key at stages[0].Over'],
    [{ format: 'trial/1', stages: [{ name: 'a', kind: 'warm' }] }, 'document-wrong-value at stages[0].kind'],
    [{ format: 'trial/1', stages: [{ name: ' ', kind: 'heat' }] }, 'document-wrong-value at stages[0].name'],
    [
      { format: 'trial/1', stages: [{ name: 'a', kind: 'heat', minutes: 0 }] },
      'document-wrong-value at stages[0].minutes',
    ],
    [
      { format: 'trial/1', stages: [{ name: 'a', kind: 'heat', minutes: null }] },
      'document-wrong-value at stages[0].minutes',
    ],
    [{ format: 'trial/1', stages: [{ name: 'a', kind: 'heat', over: [1] }] }, 'document-wrong-value at stages[0].over'],
    [
      { format: 'trial/1', stages: [{ name: 'a', kind: 'heat', over: [1, '2'] }] },
      'document-wrong-value at stages[0].over[1]',
    ],
    [{ format: 'trial/1', stages: [[]] }, 'document-wrong-value at stages[0]'],
    [null, 'document-wrong-value at '],
  ])('refuses by path: %j', (document, refusal) => {
    expect(refusalOf(() => readDocument(document, ''))).toBe(refusal);
  });

  it('takes no inherited key for one of the document', () => {
    const read = object((fields) => fields.required('toString', text));
    expect(refusalOf(() => read({}, ''))).toBe('document-missing-key at toString');
    expect(refusalOf(() => readStage(JSON.parse('{"name":"a","kind":"heat","__proto__":{}}'), ''))).toBe(
      'document-unknown-key at __proto__',
    );
  });
});

describe('refuseNamedTwice', () => {
  it('names the second use', () => {
    expect(refusalOf(() => refuseNamedTwice(['a', 'b', 'a'], (i) => `stages[${i}].name`))).toBe(
      'document-name-twice at stages[2].name',
    );
  });
});

describe('parseJson', () => {
  it('passes over a byte-order mark and refuses what is no JSON', () => {
    expect(parseJson('\uFEFF{"a":1}', 'x')).toEqual({ a: 1 });
    expect(() => parseJson('{a:1}', 'cycle.json')).toThrow(/cycle\.json is not JSON/);
  });
});
