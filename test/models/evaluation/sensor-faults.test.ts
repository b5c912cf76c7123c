import { describe, expect, it } from 'vitest';
import type { FaultKind } from '../../../models/run/fault-kinds.ts';
import {
  air,
  cycleOf,
  dwell,
  judged,
  type MadeChannel,
  type MadeRun,
  minutesTo,
  part,
  QUICK,
  type Vertex,
} from '../../support/made-run.ts';

// The table of the cycle and verdict document (§2, Sensors that lie), just beyond each threshold and just short of it.
// TC1 and TC2 are the neighbours of TC3 and run 2 °C/min; a scan every minute.

const CYCLE = cycleOf([dwell()]);

function faultsOf(run: Omit<MadeRun, 'cycle'>, channel = 'TC3') {
  const state = judged({ ...run, cycle: CYCLE }).sensors.find((one) => one.channel === channel)!;
  return state.faults;
}

/** The minute a fault of this kind holds from on TC3; null where none is proposed. */
function since(kind: FaultKind, third: MadeChannel | readonly Vertex[], more: Partial<MadeRun> = {}): number | null {
  const run = { channels: { TC1: QUICK, TC2: QUICK, TC3: third }, ...more };
  return minutesTo(faultsOf(run).find((fault) => fault.kind === kind)?.from ?? null);
}

function quickAt(minute: number): number {
  return minute <= 80 ? 20 + 2 * minute : minute <= 200 ? 180 : 180 - 2 * (minute - 200);
}

/** As its neighbours, but read so from one minute to another, where it is back with them at once. */
function instead(from: number, until: number, figure: (minute: number) => number): Vertex[] {
  return Array.from(
    { length: 281 },
    (_, minute): Vertex => [minute, from <= minute && minute <= until ? figure(minute) : quickAt(minute)],
  );
}

describe('a sensor is proposed as', () => {
  it('open: absent for 8 min while the recorder went on, where over 5 is a gap', () => {
    expect(since('open', part(QUICK, { absent: [[120, 128]] }))).toBe(121);
    expect(since('open', part(QUICK, { absent: [[120, 125]] }))).toBeNull();
  });

  it('open: to its end, and from its start', () => {
    expect(since('open', part(QUICK, { absent: [[150, 999]] }))).toBe(151);
    expect(since('open', part(QUICK, { absent: [[-1, 30]] }))).toBe(0);
  });

  it('but not because the recorder was silent', () => {
    expect(since('open', QUICK, { silent: [[120, 140]] })).toBeNull();
  });

  it('stuck: 60 °C from 20 to 28 min while its neighbours went from 60 to 76 °C', () => {
    expect(
      since(
        'stuck',
        instead(20, 28, () => 60),
      ),
    ).toBe(20);
  });

  it('and not stuck at 7.5 min and 15 °C, nor with five equal readings, nor through an absent one', () => {
    // Seven readings at 1.25 min: 15 °C. Five at 2 min in steps of 4 °C: 16 °C.
    const slow = (until: number) =>
      [[0, 20], [20, 60], [until, 60], [until + 1e-6, 20 + 2 * until], ...QUICK.slice(1)] as Vertex[];
    expect(since('stuck', slow(27.5), { every: 1.25 })).toBeNull();
    expect(since('stuck', slow(30), { every: 1.25 })).toBe(20);
    expect(since('stuck', slow(28), { every: 2 })).toBeNull();
    expect(since('stuck', slow(30), { every: 2 })).toBe(20);
    expect(since('stuck', part(slow(30), { absent: [[24.5, 25.5]] }))).toBeNull();
  });

  it.each([
    [14.9, 0],
    [15, null],
  ])('reversed: from 20 to %d °C while its neighbours rose over 20 °C: from minute %s', (low, from) => {
    const falls: Vertex[] = [
      [0, 20],
      [10, low],
      [280, low],
    ];
    expect(since('reversed', falls)).toBe(from);
  });

  it('reversed: on most of the scans only', () => {
    // Its neighbours are over 20 °C above their start from 11 to 269 min: 259 scans.
    expect(
      since(
        'reversed',
        instead(11, 140, () => 10),
      ),
    ).toBe(0); // 130 of them
    expect(
      since(
        'reversed',
        instead(11, 139, () => 10),
      ),
    ).toBeNull(); // 129
  });

  it.each([
    [1.5, 10, 21],
    [1.6, 10, null],
    [0, 9, null],
  ])(
    'follows-air: off the air by %d °C on %d scans where the neighbours are over 4 °C away: from minute %s',
    (off, scans, from) => {
      // The air is with the parts but for so many scans from 21 min on, where it is 30 °C ahead and TC3 goes with it.
      const away = (more: number) => instead(21, 20 + scans, (minute) => 20 + 2 * minute + 30 + more);
      const run = { channels: { TC1: QUICK, TC2: QUICK, TC3: away(off), air: air(away(0)) } };
      expect(minutesTo(faultsOf(run).find(({ kind }) => kind === 'follows-air')?.from ?? null)).toBe(from);
    },
  );

  it('follows-air: not where the neighbours are 4 °C from the air themselves', () => {
    const warm = (more: number) => instead(0, 280, (minute) => quickAt(minute) + more);
    const follows = (ahead: number) =>
      faultsOf({ channels: { TC1: QUICK, TC2: QUICK, TC3: warm(ahead), air: air(warm(ahead)) } }).some(
        ({ kind }) => kind === 'follows-air',
      );
    expect([follows(4), follows(4.1)]).toEqual([false, true]);
  });

  it.each([
    [3, 10.1, 1, 120],
    [2, 10.1, 1, null],
    [3, 10, 1, null],
    [3, 10.1, 3, 120],
    [3, 10.1, 4, null],
  ])('jumping: %d steps of %d °C at a scan every %d min: from minute %s', (steps, size, every, from) => {
    // Steps up and down by turns from 120 min on; the last one holds.
    const jumps = Array.from({ length: steps }, (_, i): Vertex[] => {
      const at = 120 + 12 * i;
      return [
        [at - 1e-6, i % 2 === 0 ? 180 : 180 + size],
        [at, i % 2 === 0 ? 180 + size : 180],
      ];
    }).flat();
    const history = [...QUICK.slice(0, 2), ...jumps, [280, jumps.at(-1)![1]]] as Vertex[];
    expect(since('jumping', history, { every })).toBe(from);
  });

  it('and not jumping where its neighbours jump too', () => {
    const jump = instead(120, 120, () => 195);
    const again = jump.map(([at, c]): Vertex => [at, at === 140 || at === 160 ? 195 : c]);
    expect(since('jumping', again)).toBe(120);
    expect(since('jumping', again, { channels: { TC1: again, TC2: again, TC3: again } })).toBeNull();
  });

  it.each([
    [25.1, 0],
    [25, null],
    [14.9, 0],
    [15, null],
  ])('offset: %d °C beside 20 °C before heat-on: from minute %s', (start, from) => {
    const cold = (c: number): Vertex[] => [
      [0, c],
      [10, c],
      [90, c + 160],
      [200, c + 160],
      [280, c],
    ];
    const channels = { TC1: cold(20), TC2: cold(20), TC3: cold(start) };
    expect(since('offset', cold(start), { channels })).toBe(from);
    // With one neighbour nobody knows which of the two is off.
    const two = { channels: { TC1: cold(20), TC3: cold(start) } };
    expect(faultsOf(two).some(({ kind }) => kind === 'offset')).toBe(false);
  });

  it.each([
    [3, 0],
    [3.1, null],
  ])('wrong-unit: °F taken for °C and %d °C off after conversion: from minute %s', (off, from) => {
    const fahrenheit = QUICK.map(([at, c]): Vertex => [at, 1.8 * (c + off) + 32]);
    expect(since('wrong-unit', fahrenheit)).toBe(from);
  });

  it('wrong-unit: °C taken for °F, and not where it is within 10 °C as it stands', () => {
    const celsius = QUICK.map(([at, c]): Vertex => [at, (c - 32) / 1.8]);
    expect(since('wrong-unit', celsius)).toBe(0);
    // At −40 both scales agree.
    const freezer: Vertex[] = [
      [0, -40],
      [280, -36],
    ];
    const channels = { TC1: freezer, TC2: freezer, TC3: freezer.map(([at, c]): Vertex => [at, 1.8 * c + 32]) };
    expect(since('wrong-unit', channels.TC3, { channels })).toBeNull();
  });

  it.each([
    [25, 51, 0],
    [25.1, 51, null],
    [15, 51, 0],
    [25, 50, null],
  ])('unused: from 20 to %d °C while its neighbours come to %d °C: from minute %s', (end, peak, from) => {
    const top: Vertex[] = [
      [0, 20],
      [100, peak],
      [280, 20],
    ];
    const still: Vertex[] = [
      [0, 20],
      [100, end],
      [280, 20],
    ];
    expect(since('unused', still, { channels: { TC1: top, TC2: top, TC3: still } })).toBe(from);
  });

  it('nothing, where it runs as its neighbours do', () => {
    expect(faultsOf({ channels: { TC1: QUICK, TC2: QUICK, TC3: QUICK } })).toEqual([]);
  });
});

describe('neighbours', () => {
  it('are the channels of the same role: a stuck air channel has the other air beside it, not the parts', () => {
    const stuck = instead(20, 60, () => 60);
    const channels = { TC1: QUICK, TC2: QUICK, 'air 1': air(stuck), 'air 2': air(QUICK) };
    expect(faultsOf({ channels }, 'air 1').map(({ kind }) => kind)).toContain('stuck');
    expect(faultsOf({ channels: { TC1: QUICK, TC2: QUICK, 'air 1': air(stuck) } }, 'air 1')).toEqual([]);
  });

  it('are looked at by their median: one of three gone astray accuses nobody else', () => {
    const astray: Vertex[] = [
      [0, 20],
      [80, 60],
      [280, 20],
    ];
    const channels = { TC1: QUICK, TC2: QUICK, TC3: QUICK, TC4: astray };
    expect(faultsOf({ channels })).toEqual([]);
  });
});
