import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { LedgerEvent, LedgerItem, MaterialRecords } from '../../../models/material/ledger.ts';
import { materialState } from '../../../models/material/material-state.ts';
import { refuseImpossible } from '../../../models/material/refuse-impossible.ts';
import { at21, kit, lifeOf, receivedFrozen, recordsOf, roll } from './made-ledger.ts';

const NOW = Date.parse('2026-06-01T00:00:00Z');
const out = (at: string): LedgerEvent => ({ kind: 'out', at, room: at21 });
const back = (at: string): LedgerEvent => ({ kind: 'in', at });

describe('a ledger that cannot be true is refused by name', () => {
  it.each<[string, LedgerItem[], string]>([
    [
      'out while out',
      [roll('K-1', out('2026-03-03T08:00:00Z'), out('2026-03-04T08:00:00Z'))],
      'taken out of the freezer on 2026-03-04, but it has been out since 2026-03-03',
    ],
    [
      'back in before out',
      [roll('K-1', back('2026-03-03T08:00:00Z'))],
      'put back in the freezer on 2026-03-03, but it has been in the freezer since 2026-03-02',
    ],
    ['out before received', [roll('K-1', out('2026-03-01T08:00:00Z'))], 'K-1 was used before it was received or cut'],
    ['in the future', [roll('K-1', out('2026-06-01T00:00:01Z'))], 'lies in the future'],
    ['received twice', [roll('K-1', receivedFrozen('2026-03-04T08:00:00Z'))], 'it was there already'],
    ['cut from itself', [kit('K-1A', 'K-1A', '2026-03-03T08:00:00Z')], 'K-1A is cut from itself'],
    [
      'cut from itself by way of another',
      [kit('A', 'B', '2026-03-03T08:00:00Z'), kit('B', 'A', '2026-03-03T08:00:00Z')],
      'is cut from itself, by way of',
    ],
    [
      'cut from a kit that was cut later',
      [roll('K-1'), kit('A', 'B', '2026-03-03T08:00:00Z'), kit('B', 'K-1', '2026-03-04T08:00:00Z')],
      'B was used on 2026-03-03, before it was cut on 2026-03-04',
    ],
    [
      'cut from a scrapped roll',
      [roll('K-1', { kind: 'scrapped', at: '2026-03-03T08:00:00Z' }), kit('A', 'K-1', '2026-03-04T08:00:00Z')],
      'A is cut from K-1, which was scrapped on 2026-03-03',
    ],
    [
      'used before received',
      [{ ...roll('K-1'), uses: [{ at: '2026-03-01T08:00:00Z', what: 'P-1 was laid up from it' }] }],
      'K-1 was used before it was there: P-1 was laid up from it on 2026-03-01',
    ],
    [
      'taken out after it was scrapped',
      [roll('K-1', { kind: 'scrapped', at: '2026-03-03T08:00:00Z' }, out('2026-03-04T08:00:00Z'))],
      'after it was scrapped on 2026-03-03',
    ],
    [
      'measured in a room while in the freezer',
      [roll('K-1', { kind: 'room', at: '2026-03-03T08:00:00Z', room: at21 })],
      'it has been in the freezer',
    ],
    ['of a batch nobody recorded', [roll('K-1')], 'batch B-1, of which nothing is on record'],
  ])('%s', (what, items, message) => {
    const records = recordsOf(items);
    const checked = what.startsWith('of a batch') ? { ...records, batches: [] } : records;
    const look = () => {
      refuseImpossible(checked, NOW);
      materialState(checked, items[0]!.item, NOW);
    };
    expect(look).toThrow(
      expect.objectContaining({ code: 'event-impossible', message: expect.stringContaining(message) }),
    );
  });

  it('but a kit cut the minute its roll was put back is true, and was out until then', () => {
    const at = '2026-03-03T12:00:00Z';
    const parent = roll('K-1', out('2026-03-03T08:00:00Z'), back(at));
    const records = recordsOf([{ ...parent, uses: [{ at, what: 'A was cut from it' }] }, kit('A', 'K-1', at)]);
    refuseImpossible(records, NOW);
    expect(lifeOf(records, 'A', '2026-03-03T13:00:00Z')).toMatchObject({ outcome: 'met', used: 300 });
    expect(lifeOf(records, 'K-1', '2026-03-03T13:00:00Z')).toMatchObject({ outcome: 'met', used: 240 });
  });

  it('but a kit cut the minute its roll came out, and a roll scrapped the minute its last kit was cut, are true', () => {
    const at = '2026-03-03T08:00:00Z';
    const records = recordsOf([roll('K-1', out(at), { kind: 'scrapped', at }), kit('A', 'K-1', at)]);
    refuseImpossible(records, NOW);
    expect(lifeOf(records, 'A', '2026-03-03T09:00:00Z')).toMatchObject({ outcome: 'met', used: 60 });
  });
});

/** A roll that goes in and out every few hours or days, and kits cut from it or from each other while it is out. */
const family = fc
  .record({
    gaps: fc.array(fc.integer({ min: 1, max: 5000 }), { minLength: 2, maxLength: 12 }),
    cuts: fc.array(
      fc.record({
        at: fc.double({ min: 0, max: 1, noNaN: true }),
        of: fc.nat(),
        stays: fc.integer({ min: 1, max: 3000 }),
      }),
      {
        maxLength: 6,
      },
    ),
    temperature: fc.integer({ min: 15, max: 24 }),
  })
  .map(({ gaps, cuts, temperature }) => {
    const bornMs = Date.parse('2026-03-02T08:00:00Z');
    let ms = bornMs;
    const turns = gaps.map((minutes, i): LedgerEvent => {
      ms += minutes * 60_000;
      const at = new Date(ms).toISOString();
      return i % 2 === 0 ? { kind: 'out', at, room: { temperature, unit: '°C' } } : { kind: 'in', at };
    });
    const endMs = ms + 10 * 86_400_000;
    const items: LedgerItem[] = [roll('R', ...turns)];
    const born = [bornMs];
    for (const [n, { at, of, stays }] of cuts.entries()) {
      const parent = of % items.length;
      const cutMs = Math.round(born[parent]! + at * (endMs - born[parent]!));
      const frozenAgain: LedgerEvent = {
        kind: 'in',
        at: new Date(Math.min(cutMs + stays * 60_000, endMs)).toISOString(),
      };
      items.push(kit(`K${n}`, items[parent]!.item, new Date(cutMs).toISOString(), frozenAgain));
      born.push(cutMs);
    }
    return { records: recordsOf(items), born, endMs };
  });

describe('whatever a roll and its kits went through', () => {
  it('a child is never younger than its parent was at the cut, and nothing ever grows younger', () => {
    fc.assert(
      fc.property(family, ({ records, born, endMs }) => {
        for (const [n, { item, events }] of records.items.entries()) {
          const birth = events[0]!;
          const [atBirth, later] = [born[n]!, endMs].map((ms) => lifeOf(records, item, new Date(ms).toISOString()));
          expect(later!.used).toBeGreaterThanOrEqual(atBirth!.used);
          if (birth.kind !== 'cut') continue;
          const parent = lifeOf(records, birth.from, birth.at);
          expect(atBirth!.used).toBe(parent.used);
          expect(atBirth!.usedAtMost === null || atBirth!.usedAtMost >= (parent.usedAtMost ?? 0)).toBe(true);
        }
      }),
    );
  });

  it('the order in which lines were entered does not matter', () => {
    fc.assert(
      fc.property(family, fc.infiniteStream(fc.nat()), ({ records, endMs }, dice) => {
        const shuffled: MaterialRecords = {
          ...records,
          items: shuffle(records.items, dice).map((item) => ({ ...item, events: shuffle(item.events, dice) })),
        };
        for (const { item } of records.items) {
          expect(materialState(shuffled, item, endMs)).toEqual(materialState(records, item, endMs));
        }
      }),
    );
  });

  it('is bounded from both sides, and passes only where the greater bound does', () => {
    fc.assert(
      fc.property(family, ({ records, endMs }) => {
        for (const { item } of records.items) {
          const { outcome, used, usedAtMost, atMost } = lifeOf(records, item, new Date(endMs).toISOString());
          expect(usedAtMost === null || usedAtMost >= used).toBe(true);
          if (outcome === 'met') expect(usedAtMost !== null && usedAtMost <= atMost! + 1e-6).toBe(true);
        }
      }),
    );
  });
});

function shuffle<T>(list: readonly T[], dice: Iterator<number>): T[] {
  return list
    .map((value) => ({ value, key: dice.next().value as number }))
    .sort((a, b) => a.key - b.key)
    .map(({ value }) => value);
}
