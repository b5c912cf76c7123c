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

describe('a practice source', () => {
  it('goes through its programme over and over, by a time that runs faster than the clock', async () => {
    const heard = await listenTo(document, { inventVessel: counting });
    const began = performance.timeOrigin + performance.now();
    await until(() => heard.scans.length >= 20);
    const passedMs = performance.timeOrigin + performance.now() - began;
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
    expect(times.every((timeMs, i) => i === 0 || timeMs - times[i - 1]! === 10_000)).toBe(true);
    expect(Math.abs(times[0]! - began)).toBeLessThan(2000);
    expect(heard.scans.length).toBeLessThan((passedMs * 600) / 10_000 + 10);
  });

  it('shows a gap where nobody listened, and goes on in its programme', async () => {
    const now = Date.parse('2026-03-02T08:00:00Z');
    // One second of ours ago: ten minutes of the vessel's, so 60 scans of 10 s; a programme has 100.
    const kept = { firstMs: now, lastMs: now + 50_000, lastArrivedMs: now + 20_000 };
    const heard = await listenTo(document, {
      inventVessel: () => ({ scans: 100, figures: (scan, round) => Float64Array.of(scan, round) }),
      kept,
      now: () => now + 21_000,
    });
    await until(() => heard.scans.length >= 2);
    expect(heard.scans[0]!.timeMs).toBe(now + 650_000);
    expect(heard.figures()[0]).toEqual([65, 0]);
  });

  it('begins after the last scan that is kept, whatever settings it is of', async () => {
    const now = Date.parse('2026-03-02T08:00:00Z');
    const kept = { firstMs: null, lastMs: now + 3_600_000, lastArrivedMs: now };
    const heard = await listenTo(document, { inventVessel: counting, kept, now: () => now });
    await until(() => heard.scans.length >= 1);
    expect([heard.scans[0]!.timeMs - now, heard.figures()[0]]).toEqual([3_610_000, [0, 0]]);
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
