import type { LeakTestRecord } from '../../models/run/load.ts';
import type { Zone } from './plan-kinds.ts';
import type { PlannedPart } from './plan-run.ts';
import { beginRandom, seedFrom } from './simulator/random.ts';

/** Loads as the workshop usually makes them up: which part lies where, on which tool, line and thermocouples. */

const STRUT_PLACES: readonly { line: string; tool: string; zone: Zone }[] = [
  { line: 'V1', tool: 'ST-01', zone: 'door' },
  { line: 'V2', tool: 'ST-02', zone: 'front' },
  { line: 'V3', tool: 'ST-03', zone: 'middle' },
  { line: 'V4', tool: 'ST-04', zone: 'back' },
];

/** Struts with running serials, one on each line of Autoclave 1. Two of them have three thermocouples each. */
export function struts(first: number, count: 2 | 3 | 4, roll: string): PlannedPart[] {
  const each = count === 2 ? 3 : 2;
  return STRUT_PLACES.slice(0, count).map(({ line, tool, zone }, i) => {
    const part = serial('SR', first + i);
    const channels = thermocouples(i * each, each);
    const leakTest = soundLeakTest(part, 0.9, 0.015);
    return { part, kind: 'strut', tool, zone, bagLine: line, channels, roll, leakTest };
  });
}

export function stocks(first: number, count: 1 | 2, roll: string): PlannedPart[] {
  return Array.from({ length: count }, (_, i) => ({
    part: serial('RS', first + i),
    kind: 'rudder-stock',
    tool: `RT-0${i + 1}`,
    zone: i === 0 ? 'front' : 'back',
    bagLine: `bag ${i + 1}`,
    channels: thermocouples(3 * i, 3),
    roll,
  }));
}

/** A stock thicker than any before it, its two thermocouples on its surfaces. */
export function heavyStock(n: number, roll: string): PlannedPart[] {
  const part = serial('RS', n);
  return [
    { part, kind: 'heavy-stock', tool: 'RT-03', zone: 'middle', bagLine: 'bag 1', channels: thermocouples(0, 2), roll },
  ];
}

/** Radomes in Oven 2: the first under one bag, the others together under the second. */
export function radomes(first: number, count: 2 | 3, roll: string): PlannedPart[] {
  const each = count === 2 ? 3 : 2;
  return (['front', 'middle', 'back'] as const).slice(0, count).map((zone, i) => {
    const part = serial('RD', first + i);
    return {
      part,
      kind: 'radome',
      tool: `DT-0${i + 1}`,
      zone,
      bagLine: i === 0 ? 'VAC 1' : 'VAC 2',
      channels: thermocouples(i * each, each),
      roll,
      leakTest: soundLeakTest(part, 26.6, 0.5),
    };
  });
}

/** Struts standing free in Oven 2 after their cure. */
export function postCured(serials: readonly number[], roll: string): PlannedPart[] {
  return serials.map((n, i) => ({
    part: serial('SR', n),
    kind: 'post-cured-strut',
    zone: (['front', 'middle', 'back'] as const)[i] ?? 'middle',
    channels: thermocouples(2 * i, 2),
    roll,
  }));
}

/** Lots of radome skins in the press: one part record with a quantity. */
export function skins(first: number, quantity: number, roll: string): PlannedPart[] {
  return (['front', 'back'] as const).map((zone, i) => ({
    part: serial('RD-L', first + i),
    kind: 'radome-skin',
    quantity,
    tool: `press plate ${i + 1}`,
    zone,
    channels: thermocouples(2 * i, 2),
    roll,
  }));
}

export function repair(part: string, roll: string): PlannedPart[] {
  return [{ part, kind: 'repair', zone: 'middle', bagLine: 'vacuum', channels: thermocouples(0, 3), roll }];
}

/** The same load with one part changed. */
export function withPart(parts: readonly PlannedPart[], part: string, change: Partial<PlannedPart>): PlannedPart[] {
  return parts.map((one) => (one.part === part ? { ...one, ...change } : one));
}

/** The same load, one part's leak test not written down. */
export function withoutLeakTest(parts: readonly PlannedPart[], part: string): PlannedPart[] {
  return parts.map((one) => {
    if (one.part !== part) return one;
    const { leakTest: _lost, ...rest } = one;
    return rest;
  });
}

function serial(prefix: string, n: number): string {
  return prefix.endsWith('L') ? `${prefix}${String(n).padStart(3, '0')}` : `${prefix}-${String(n).padStart(4, '0')}`;
}

function thermocouples(after: number, count: number): string[] {
  return Array.from({ length: count }, (_, i) => `TC${after + i + 1}`);
}

/** A sound bag: starts near `start`, loses up to twice `loss` in five minutes; figures peculiar to the part. */
function soundLeakTest(part: string, start: number, loss: number): LeakTestRecord {
  const random = beginRandom(seedFrom(part));
  const decimals = start > 2 ? 1 : 3;
  const from = start * (1 + 0.01 * (random.next() - 0.5));
  return {
    start: Number(from.toFixed(decimals)),
    end: Number((from - loss * (0.4 + 1.4 * random.next())).toFixed(decimals)),
    minutes: 5,
  };
}
