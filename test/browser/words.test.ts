import { describe, expect, it } from 'vitest';
import type { Evaluation, Finding, PartEvaluation } from '../../models/evaluation/evaluation.ts';
import type { Layout } from '../../models/log/layout.ts';
import type { RunView } from '../../server/contract/runs.ts';
import { instantOfWallClock, lasting, stretch, wallClock } from '../../web/words/clock.ts';
import { band, figure, figureAgainst, listed } from '../../web/words/figures.ts';
import { answerAt, withAnswer, withMissing } from '../../web/words/layout-edits.ts';
import { formOfRun, newPart, requestOfForm } from '../../web/words/load-form.ts';
import { marginOf } from '../../web/words/margin.ts';
import { verdictSentences } from '../../web/words/verdicts.ts';

const plainSpaces = (text: string) => text.replaceAll('\u00a0', ' ');

describe('clock', () => {
  // Portugal's clocks: IANA time zone database, Europe/Lisbon, EU rule: last Sundays of March and October at 01:00 UTC.
  it('knows an hour that does not exist, and takes the first of one that comes twice', () => {
    expect(instantOfWallClock('2026-03-29T01:30:00', 'Europe/Lisbon')).toBeNull();
    expect(instantOfWallClock('2026-10-25T01:30:00', 'Europe/Lisbon')).toBe(Date.parse('2026-10-25T00:30:00Z'));
    expect(instantOfWallClock('2026-07-01T08:14', 'Europe/Lisbon')).toBe(Date.parse('2026-07-01T07:14:00Z'));
  });

  it('turns an instant into a wall clock and back', () => {
    for (const zone of ['Europe/Lisbon', 'America/Denver', 'Asia/Kolkata', 'UTC']) {
      const at = Date.parse('2026-05-05T23:59:07Z');
      expect(instantOfWallClock(wallClock(at, zone), zone)).toBe(at);
    }
  });

  it('names the day of an end only where it is another', () => {
    expect(stretch('2026-03-03T08:14:00Z', '2026-03-03T14:59:00Z', 'UTC')).toBe('08:14 to 14:59');
    expect(stretch('2026-03-03T22:00:00Z', '2026-03-04T01:00:00Z', 'UTC')).toBe('22:00 to 4 March 2026, 01:00');
    expect([30_000, 59 * 60_000, 7_200_000, 24_300_000].map(lasting)).toEqual(['30 s', '59 min', '2 h', '6 h 45 min']);
  });
});

describe('figures', () => {
  it('have the digits of their unit, a true minus sign and no negative nothing', () => {
    expect(plainSpaces(figure(-0.04, '°C'))).toBe('0.0 °C');
    expect(plainSpaces(figure(-12.34, '°C'))).toBe('−12.3 °C');
    expect(figure(null, 'bar')).toBe('–');
  });

  it('never show a broken limit as kept: digits are added until they differ', () => {
    expect(plainSpaces(figureAgainst(119.996, 'min', [120, 165]))).toBe('119.996 min');
    expect(plainSpaces(figureAgainst(120, 'min', [120, 165]))).toBe('120.0 min');
    expect(plainSpaces(figureAgainst(4, '', [2, null]))).toBe('4');
  });

  it('write tolerances as a band', () => {
    expect(plainSpaces(band(60, 100, 'min'))).toBe('60 to 100 min');
    expect(plainSpaces(band(null, 190, '°C'))).toBe('at most 190 °C');
    expect(band(null, null, '')).toBe('');
    expect(listed(['TC1', 'TC2', 'TC3'])).toBe('TC1, TC2 and TC3');
  });
});

describe('layout edits', () => {
  const layout: Layout = {
    format: 'dwellbook-layout/1',
    name: 'recorder',
    header: 2,
    time: { columns: ['Time'], pattern: '', zone: '' },
    channels: [
      { column: 'T1', name: 'T1', role: 'part', unit: '°C' },
      { column: 'P', name: 'P', role: 'other', unit: '' },
    ],
  };

  it('reach any place a statement names, and change nothing else', () => {
    const next = withAnswer(withAnswer(layout, 'channels/1/unit', 'bar'), 'time.zone', 'Europe/Lisbon');
    expect(next.channels[1]).toEqual({ column: 'P', name: 'P', role: 'other', unit: 'bar' });
    expect(next.channels[0]).toEqual(layout.channels[0]);
    expect(answerAt(next, 'time.zone')).toBe('Europe/Lisbon');
    expect(answerAt(layout, 'time.zone')).toBe('');
  });

  it('keep a line a number, and take a key out where nothing is said', () => {
    expect(withAnswer(layout, 'units', '3').units).toBe(3);
    expect('units' in withAnswer(withAnswer(layout, 'units', '3'), 'units', '')).toBe(false);
    expect(withMissing(withMissing(layout, 'NO DATA'), 'NO DATA').missing).toEqual(['NO DATA']);
  });
});

describe('the load form', () => {
  const run = {
    run: 3,
    vessel: null,
    cycle: null,
    channels: [
      { name: 'TC1', role: 'part', unit: '°C', source: 1 },
      { name: 'vessel pressure', role: 'pressure', unit: 'bar', source: 1 },
    ],
    load: {
      format: 'dwellbook-load/1',
      workOrder: 'W-1',
      parts: [{ part: 'A', leakTest: { start: 0.88, end: 0.85, minutes: 5 } }],
      sensors: [
        { channel: 'TC1', parts: ['A'], place: 'lag', corrections: [[100, -0.4]] },
        { channel: 'vessel pressure', uncertainty: 0.05 },
      ],
    },
  } as unknown as RunView;

  it('gives back the load it was made from', () => {
    expect(requestOfForm(formOfRun(run), run.load).load).toEqual(run.load);
  });

  it('keeps a thermocouple on its part when the serial is mended', () => {
    const form = formOfRun(run);
    const mended = { ...form, parts: form.parts.map((part) => ({ ...part, part: ' A-2 ' })) };
    expect(requestOfForm(mended, null).load.sensors[0]).toMatchObject({ channel: 'TC1', parts: ['A-2'] });
  });

  it('sends a decimal comma as the figure it is', () => {
    const form = { ...formOfRun(run), parts: [{ ...newPart(1, 'A'), startDegree: '0,012', humidity: '45,5' }] };
    expect(requestOfForm(form, null).load.parts).toEqual([{ part: 'A', startDegree: 0.012, humidity: 45.5 }]);
  });
});

describe('verdict sentences', () => {
  const finding = (limit: string, outcome: Finding['outcome'], more: Partial<Finding> = {}) =>
    ({ limit, outcome, because: `${limit} says so`, ...more }) as Finding;
  const part = (name: string, verdict: PartEvaluation['verdict'], findings: Finding[]) =>
    ({ part: name, verdict, findings }) as unknown as PartEvaluation;
  const evaluation = (verdict: Evaluation['verdict'], ...parts: PartEvaluation[]) =>
    ({ verdict, parts }) as unknown as Evaluation;

  it('begin with the worst of the worst part, and say how the others came out', () => {
    const bad = part('A', 'does-not-conform', [finding('ceiling', 'met'), finding('dwell 2/time', 'not-met')]);
    expect(verdictSentences(evaluation('does-not-conform', part('B', 'conforms', []), bad))).toEqual([
      'A, dwell 2, time: Dwell 2/time says so.',
      'Everything else was met.',
      'B conforms.',
    ]);
  });

  it('name the open decision where everything hangs on it', () => {
    const awaiting = part('A', 'cannot-tell', [
      finding('ceiling', 'cannot-tell', { awaits: 'TC3' }),
      finding('spread', 'met'),
    ]);
    expect(plainSpaces(verdictSentences(evaluation('cannot-tell', awaiting)).join(' '))).toBe(
      'Nobody has decided yet whether TC3 can be believed; 1 limit hangs on it. Everything else was met.',
    );
  });
});

describe('the margin', () => {
  it('leaves out what belongs to other parts, and does not repeat whose page it is', () => {
    const margin = ['logging began', 'dwell 1 opens, TC2 (A)', 'dwell 1 opens, TC4 (B)'].map((text) => ({
      at: '2026-03-03T08:14:00Z',
      kind: 'dwell' as const,
      text,
    }));
    expect(marginOf(margin, ['A', 'B'], 'B').map(({ text }) => text)).toEqual(['logging began', 'dwell 1 opens, TC4']);
    expect(marginOf(margin, ['A', 'B'], null)).toEqual(margin);
  });
});
