import { describe, expect, it } from 'vitest';
import type { Finding } from '../../../models/evaluation/evaluation.ts';
import { evaluateLog } from '../../../models/evaluation/judge.ts';
import type { LedgerItem, PartMaterial } from '../../../models/material/ledger.ts';
import type { Material } from '../../../models/material/material.ts';
import { cycleOf, dwell, instantAt, QUICK, readingsOf } from '../../support/made-run.ts';
import { at21, recordsOf, roll, TAPE } from '../material/made-ledger.ts';

// "Judged at heat-on, from the database": the rules of the cycle and verdict document, §2, the other limits. A made log
// starts on 2 March 2026 at 08:00; QUICK is 5 °C above its first reading a little later.
const cycle = cycleOf([dwell()], { material: { outLife: true } });
const OUT_AT = '2026-02-01T08:00:00Z';

function frozenUntil(item: string, out: string): LedgerItem {
  const received = { kind: 'received', at: '2026-01-10T08:00:00Z', batch: 'B-1', as: 'frozen' } as const;
  return { ...roll(item), events: [received, { kind: 'out', at: out, room: at21 }] };
}

function judged(
  items: readonly LedgerItem[],
  materials: readonly PartMaterial[],
  more: { material?: Material; open?: boolean; minutes?: number } = {},
) {
  const history = QUICK.filter(([minute]) => minute <= (more.minutes ?? Number.POSITIVE_INFINITY));
  const run = { channels: { TC1: history }, cycle };
  const evaluation = evaluateLog(readingsOf(run), {
    cycle,
    load: { format: 'dwellbook-load/1', parts: [{ part: 'A' }], sensors: [] },
    resin: null,
    materials: { ...recordsOf(items, more.material, { A: materials }), batches: [BATCH] },
    exclusions: [],
    believed: ['TC1'],
    barometer: null,
    open: more.open ?? false,
  });
  const [part] = evaluation.parts;
  return {
    heatOn: part!.heatOn,
    finding: part!.findings.find(({ limit }) => limit === 'material/out-life') as Finding,
  };
}

const BATCH = { batch: 'B-1', material: { code: 'tape', issue: 'A' }, made: '2026-01-05' };
const LIFE_MIN = 30 * 1440;

describe('material/out-life', () => {
  it('is the age at heat-on, in days, and the sentence says whose', () => {
    const { heatOn, finding } = judged(
      [frozenUntil('K-1', OUT_AT)],
      [{ item: 'K-1', laidUpFrom: '2026-02-27T08:00:00Z' }],
    );
    const days = (Date.parse(heatOn!) - Date.parse(OUT_AT)) / 86_400_000;
    expect(finding).toMatchObject({ outcome: 'met', unit: 'd', atMost: 30, from: heatOn });
    expect(finding.observed).toBeCloseTo(days, 6);
    expect(finding.because).toContain('K-1 was out for 29 d');
  });

  it('is met where the out-life ends during heat-up, and not met where it ended a minute before heat-on', () => {
    const { heatOn } = judged([frozenUntil('K-1', OUT_AT)], [{ item: 'K-1' }]);
    const outSo = (minutesLeft: number) =>
      new Date(Date.parse(heatOn!) - (LIFE_MIN - minutesLeft) * 60_000).toISOString();
    const outcomes = [5, 0, -1].map(
      (left) => judged([frozenUntil('K-1', outSo(left))], [{ item: 'K-1' }]).finding.outcome,
    );
    expect(outcomes).toEqual(['met', 'met', 'not-met']);
  });

  it('is the worst of all materials in the part', () => {
    const old = frozenUntil('K-2', '2026-01-20T08:00:00Z');
    const unknown: LedgerItem = {
      ...frozenUntil('K-3', OUT_AT),
      events: [frozenUntil('K-3', OUT_AT).events[0]!, { kind: 'out', at: OUT_AT }],
    };
    const items = [frozenUntil('K-1', OUT_AT), old, unknown];
    const worst = (...codes: string[]) =>
      judged(
        items,
        codes.map((item) => ({ item })),
      ).finding;
    expect(worst('K-1', 'K-2', 'K-3')).toMatchObject({ outcome: 'not-met' });
    expect(worst('K-1', 'K-2', 'K-3').because).toContain('K-2 was out for');
    expect(worst('K-3', 'K-1')).toMatchObject({ outcome: 'cannot-tell', possible: null });
    expect(worst('K-3', 'K-1').because).toContain('the temperature of the room is not on record');
  });

  it('of a roll that went back is open while nobody wrote down when it was laid up', () => {
    const back: LedgerItem = {
      ...frozenUntil('K-1', OUT_AT),
      events: [...frozenUntil('K-1', OUT_AT).events, { kind: 'in', at: '2026-02-03T08:00:00Z' }],
    };
    const open = judged([back], [{ item: 'K-1' }]).finding;
    expect(open).toMatchObject({ outcome: 'cannot-tell', observed: 2 });
    expect(open.because).toContain('when K-1 was laid up into A is not on record');
    const told = judged([back], [{ item: 'K-1', laidUpFrom: '2026-02-02T08:00:00Z' }]).finding;
    expect(told.observed).toBeGreaterThan(29);
  });

  it('looks at nothing that was written of later times', () => {
    const at = instantAt(100_000);
    const later: LedgerItem = {
      ...frozenUntil('K-1', OUT_AT),
      events: [...frozenUntil('K-1', OUT_AT).events, { kind: 'in', at }],
    };
    const use = [{ item: 'K-1', laidUpFrom: '2026-02-27T08:00:00Z' }];
    expect(judged([later], use).finding).toEqual(judged([frozenUntil('K-1', OUT_AT)], use).finding);
  });

  it('holds the shelf life too, and a tack life to when the part was laid', () => {
    const material: Material = { ...TAPE, storage: { ...TAPE.storage, lifeDays: 50 }, tack: { lifeDays: 10 } };
    expect(judged([frozenUntil('K-1', OUT_AT)], [{ item: 'K-1' }], { material }).finding.because).toContain(
      'shelf life',
    );
    const tacky: Material = { ...TAPE, tack: { lifeDays: 10 } };
    const opened: LedgerItem = {
      ...frozenUntil('K-1', OUT_AT),
      events: [...frozenUntil('K-1', OUT_AT).events, { kind: 'opened', at: OUT_AT }],
    };
    const laid = (from: string, until: string) =>
      judged([opened], [{ item: 'K-1', laidUpFrom: from, laidUpUntil: until }], { material: tacky }).finding;
    expect(laid('2026-02-10T08:00:00Z', '2026-02-11T08:00:00Z').outcome).toBe('met');
    expect(laid('2026-02-10T08:00:00Z', '2026-02-11T09:00:00Z')).toMatchObject({
      outcome: 'not-met',
      atMost: 10,
      unit: 'd',
    });
  });

  it('cannot be told where all that is on record was cured before', () => {
    const { finding } = judged([frozenUntil('K-1', OUT_AT)], []);
    expect(finding).toMatchObject({ outcome: 'cannot-tell' });
    expect(finding.because).toBe('All material on record was cured in an earlier run.');
  });

  it('cannot be told where the ledger contradicts the run', () => {
    const late: LedgerItem = {
      ...roll('K-1'),
      events: [{ kind: 'received', at: '2026-03-05T08:00:00Z', batch: 'B-1', as: 'out' }],
    };
    const { finding } = judged([late], [{ item: 'K-1' }]);
    expect(finding).toMatchObject({ outcome: 'cannot-tell' });
    expect(finding.because).toContain('K-1 was used on 2026-03-02, before it was received on 2026-03-05');
  });

  it('waits for the heat while the run goes on, and cannot be told where it never came', () => {
    const use = [{ item: 'K-1' }];
    const items = [frozenUntil('K-1', OUT_AT)];
    expect(judged(items, use, { minutes: 0, open: true }).finding).toMatchObject({ outcome: 'pending' });
    expect(judged(items, use, { minutes: 0 }).finding).toMatchObject({ outcome: 'cannot-tell' });
  });
});
