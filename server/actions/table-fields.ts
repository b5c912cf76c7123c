import { findZone, offsetFromText, type Zone } from '../../models/log/time-zone.ts';
import type { TableField } from '../contract/tables.ts';

/** What a cell says, as it is kept; or why it cannot. */
export type Cell = { readonly value: string | number } | { readonly because: string };

/** Reads one cell of a table. `zone` is that of the shop, for times written without one. */
export function readCell(field: TableField, text: string, zone: string): Cell {
  if (field === 'thickness-mm') return figure(text, 0.05, 1000, 'mm');
  if (field === 'length-m') return figure(text, 1e-3, 1e5, 'm');
  if (field === 'out-minutes') return figure(text, 0, 1e7, 'min');
  if (field === 'plies') {
    const plies = Number(text);
    const isCount = /^\d+$/.test(text) && plies >= 1 && plies <= 10_000;
    return isCount ? { value: plies } : { because: 'expected a whole number from 1 to 10000' };
  }
  if (field === 'as') {
    const as = text.toLowerCase();
    return as === 'frozen' || as === 'out' ? { value: as } : { because: 'expected "frozen" or "out"' };
  }
  if (field === 'received') return instant(text, zone);
  return words(text, LONGEST[field] ?? 120);
}

const LONGEST: Partial<Record<TableField, number>> = { title: 200, customer: 200, 'drawing-issue': 40 };

function words(text: string, most: number): Cell {
  if (text.length > most) return { because: `longer than ${most} letters` };
  // biome-ignore lint/suspicious/noControlCharactersInRegex: such characters are what is looked for
  return /[\u0000-\u001f\u007f\ufffd]/.test(text) ? { because: 'a character that cannot be printed' } : { value: text };
}

function figure(text: string, least: number, most: number, unit: string): Cell {
  if (/^\d+([.,]\d+)?$/.test(text)) {
    const value = Number(text.replace(',', '.'));
    if (value >= least && value <= most) return { value };
  }
  return { because: `expected ${least} to ${most} ${unit}` };
}

/** A day, or a day and a time, as ISO 8601 writes them; without an offset as the shop's clocks show it. */
const STAMP = /^(\d{4})-(\d{2})-(\d{2})(?:[T ](\d{2}):(\d{2})(?::(\d{2}))?(Z|[+-]\d{2}:?\d{2})?)?$/;

function instant(text: string, zoneName: string): Cell {
  const [, year, month, day, hour = '0', minute = '0', second = '0', offset] = STAMP.exec(text) ?? [];
  const numbers = [year, month, day, hour, minute, second].map(Number) as [
    number,
    number,
    number,
    number,
    number,
    number,
  ];
  const [y, mo, d, h, mi, s] = numbers;
  const localMs = Date.UTC(y, mo - 1, d, h, mi, s);
  if (!Number.isFinite(localMs) || new Date(localMs).getUTCDate() !== d || mo > 12 || h > 23 || mi > 59 || s > 59) {
    return { because: 'expected a day such as 2026-03-02, or with its time 2026-03-02 08:15' };
  }
  if (offset !== undefined) return { value: new Date(localMs - (offsetFromText(offset) ?? 0)).toISOString() };
  const zone = zoneOf(zoneName);
  const atMs = zone.instantOf(localMs);
  if (Number.isNaN(atMs)) return { because: `${zoneName} skips this time` };
  if (!Number.isNaN(zone.secondInstantOf(localMs)))
    return { because: `${zoneName} has this time twice; add the offset` };
  return { value: new Date(atMs).toISOString() };
}

let known: Zone | null = null;

function zoneOf(name: string): Zone {
  if (known?.name !== name) known = findZone(name);
  return known;
}
