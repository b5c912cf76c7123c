import { describe, expect, it } from 'vitest';
import { driverOf } from '../../../server/live/sources/source.ts';
import { listenTo, sleep, until } from './listening.ts';

const channels = [
  { column: 'TC1', name: 'TC1', role: 'part', unit: '°C' },
  { column: 'P', name: 'vessel pressure', role: 'pressure', unit: 'bar' },
];
const document = {
  format: 'dwellbook-source/1',
  name: 'Autoclave 9',
  intervalS: 10,
  reads: { kind: 'practice', speed: 600, cycle: { code: 'SR-180', issue: 'B' } },
  channels,
};

/** A vessel of three scans a programme that counts, so that each scan says which it is. */
const counting = () => ({ scans: 3, figures: (scan: number, round: number) => Float64Array.of(scan, round) });

/** A clock that goes 600 times as fast, from an instant on; it starts when it is first looked at. */
function fast(fromMs: number): () => number {
  let began: number | null = null;
  return () => {
    began ??= performance.now();
    return fromMs + (performance.now() - began) * 600;
  };
}

const AT = Date.parse('2026-03-02T08:00:00Z');

describe('a practice source', () => {
  it('goes through its programme over and over, by its vessel’s time', async () => {
    const heard = await listenTo(document, { inventVessel: counting, now: fast(AT) });
    await until(() => heard.scans.length >= 20);
    expect(heard.figures().slice(0, 7)).toEqual([
      [0, 0],
      [1, 0],
      [2, 0],
      [0, 1],
      [1, 1],
      [2, 1],
      [0, 2],
    ]);
    const times = heard.scans.map(({ timeMs }) => timeMs);
    expect(Math.abs(times[0]! - AT)).toBeLessThan(600);
    expect(times.every((timeMs, i) => i === 0 || timeMs - times[i - 1]! === 10_000)).toBe(true);
  });

  it('goes on in its programme after the last scan of its settings', async () => {
    const kept = { firstMs: AT, lastMs: AT + 650_000 };
    const inventVessel = () => ({ scans: 100, figures: (scan: number, round: number) => Float64Array.of(scan, round) });
    const heard = await listenTo(document, { inventVessel, kept, now: fast(AT + 600_000) });
    await until(() => heard.scans.length >= 1);
    expect([heard.scans[0]!.timeMs - AT, heard.figures()[0]]).toEqual([660_000, [66, 0]]);
  });

  it('begins its programme after the last scan of other settings', async () => {
    const kept = { firstMs: null, lastMs: AT + 3_600_000 };
    const heard = await listenTo(document, { inventVessel: counting, kept, now: fast(AT + 3_605_000) });
    await until(() => heard.scans.length >= 1);
    expect([heard.scans[0]!.timeMs - AT, heard.figures()[0]]).toEqual([3_610_000, [0, 0]]);
  });

  it('is refused where no vessels are invented', async () => {
    const heard = await listenTo(document);
    await sleep(100);
    expect(heard.scans).toEqual([]);
    expect(heard.told).toEqual([['cannot-be-reached', 'Only a practice workshop has invented vessels']]);
    const { readOnce } = (await driverOf('practice'))!;
    await expect(readOnce({ document: document as never, now: Date.now, inventVessel: null })).rejects.toThrow(
      'Only a practice workshop',
    );
  });
});
