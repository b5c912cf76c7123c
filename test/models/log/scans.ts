import type { ReadLog } from '../../../models/log/readings.ts';
import { fileOf, layoutOf } from './logs.ts';

const channels = [{ column: 'v', name: 'TC1', role: 'part', unit: '°C' }];

/** One file of `HH:mm:ss value` words on 25 October 2026 (or the day of `day`), the day clocks go back in Lisbon. */
export function fileOfScans(scans: string, day = '2026-10-25', name = 'run.csv') {
  const lines = scans.split(/\s*,\s*/).map((scan) => {
    const [time, value] = scan.trim().split(/\s+/);
    return `${day} ${time},${value}`;
  });
  return fileOf(`Stamp,v\n${lines.join('\n')}\n`, name);
}

export function layout(zone = 'UTC', pattern = 'yyyy-MM-dd HH:mm:ss') {
  return layoutOf({ channels, time: { columns: ['Stamp'], pattern, zone } });
}

export function times({ readings }: ReadLog): string[] {
  return [...readings.timeMs].map((timeMs) => new Date(timeMs).toISOString().slice(11).replace('.000Z', 'Z'));
}

export function values({ readings }: ReadLog): number[] {
  return [...readings.channels[0]!.value];
}

export function listed({ repairs }: ReadLog): string[] {
  return repairs.map(({ kind, file, lines, scans }) => `${kind} ${file}:${lines[0]}-${lines[1]} ${scans}`);
}
