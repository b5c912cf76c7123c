import type { LedgerEvent, LedgerItem, MaterialRecords, PartMaterial } from '../../../models/material/ledger.ts';
import type { Life } from '../../../models/material/lives.ts';
import type { Material } from '../../../models/material/material.ts';
import { materialState } from '../../../models/material/material-state.ts';

/** A product with 30 days at up to 24 °C, kept at −18 °C for a year; nothing else written. Invented but for these. */
export const TAPE: Material = {
  format: 'dwellbook-material/1',
  code: 'tape',
  issue: 'A',
  name: 'Tape',
  units: { temperature: '°C' },
  storage: { atMost: -18, lifeDays: 365, outAbove: -12 },
  out: { lifeDays: 30, atMost: 24 },
};

export const at21 = { temperature: 21, unit: '°C' } as const;

export function roll(item: string, ...later: LedgerEvent[]): LedgerItem {
  return { item, kind: 'roll', events: [receivedFrozen(), ...later] };
}

export function receivedFrozen(at = '2026-03-02T08:00:00Z'): LedgerEvent {
  return { kind: 'received', at, batch: 'B-1', as: 'frozen' };
}

export function kit(item: string, from: string, at: string, ...later: LedgerEvent[]): LedgerItem {
  return { item, kind: 'kit', events: [{ kind: 'cut', at, from }, ...later] };
}

export function recordsOf(
  items: readonly LedgerItem[],
  material: Material = TAPE,
  parts: Readonly<Record<string, readonly PartMaterial[]>> = {},
): MaterialRecords {
  const { code, issue } = material;
  return {
    format: 'dwellbook-material-records/1',
    materials: [material],
    batches: [{ batch: 'B-1', material: { code, issue }, made: '2026-02-20' }],
    items,
    parts: Object.entries(parts).map(([part, materials]) => ({ part, materials })),
  };
}

/** One of an item's lives at an instant. */
export function lifeOf(records: MaterialRecords, item: string, at: string, name: Life['name'] = 'out-life'): Life {
  const life = materialState(records, item, Date.parse(at)).lives.find((one) => one.name === name);
  if (life === undefined) throw new Error(`${item} has no ${name}`);
  return life;
}
