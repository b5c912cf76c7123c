import { describe, expect, it } from 'vitest';
import type { ActionParts } from '../../server/actions/action-parts.ts';
import { addCalibration } from '../../server/actions/add-calibration.ts';
import { addAccuracyTest, addSurvey, setQualifiedRange } from '../../server/actions/add-survey.ts';
import { addVessel } from '../../server/actions/add-vessel.ts';
import { placeInstrument, takeOff } from '../../server/actions/place-instrument.ts';
import { setInstrument } from '../../server/actions/set-instrument.ts';
import { verifyChains } from '../../server/actions/verify-chains.ts';
import { ROLES } from '../../server/contract/roles.ts';
import { sha256Of } from '../../server/store/canonical.ts';
import type { Db } from '../../server/store/database.ts';
import { failNthInsert } from './fail-nth-insert.ts';
import { freshDatabase } from './fresh-database.ts';

const on = { kind: 'vessel', name: 'Oven 2' } as const;
const calibration = { done: '2026-01-12', until: '2026-07-11', by: 'bench', unit: '°C', points: [[0, 0.1]] } as const;
const survey = { done: '2026-01-20', until: '2026-07-19', unit: '°C', lowest: 120, highest: 200 } as const;

/** Every action of instruments and surveys, each after those it needs. */
const DEEDS: readonly [string, (parts: ActionParts) => unknown][] = [
  ['add-vessel', (parts) => addVessel(parts, { name: 'Oven 2', kind: 'oven' })],
  ['set-instrument', (parts) => setInstrument(parts, { instrument: 'K-1', kind: 'thermocouple', type: 'K' })],
  ['another', (parts) => setInstrument(parts, { instrument: 'K-2', kind: 'thermocouple', type: 'K' })],
  ['add-calibration', (parts) => addCalibration(parts, 'K-1', { ...calibration, points: [[0, 0.1]] })],
  ['place', (parts) => placeInstrument(parts, 'K-1', { on, channel: 'TC1', from: '2026-01-15T08:00:00Z' })],
  ['place another', (parts) => placeInstrument(parts, 'K-2', { on, channel: 'TC1', from: '2026-02-15T08:00:00Z' })],
  ['take off', (parts) => takeOff(parts, 'K-2', 3, { at: '2026-03-01T08:00:00Z', reason: 'lead crushed' })],
  ['add-survey', (parts) => addSurvey(parts, 'Oven 2', { ...survey, zone: 'whole', uniformity: 3 })],
  [
    'add-accuracy-test',
    (parts) =>
      addAccuracyTest(parts, 'Oven 2', { done: '2026-01-20', until: '2026-02-20', unit: '°C', difference: 0.4 }),
  ],
  [
    'set-qualified-range',
    (parts) => setQualifiedRange(parts, 'Oven 2', { unit: '°C', lowest: 60, highest: 220, document: 'SR-Q-12' }),
  ],
];

const TABLES = [
  'instruments',
  'instrument_particulars',
  'calibrations',
  'instrument_places',
  'vessel_surveys',
  'vessel_accuracy_tests',
  'vessel_ranges',
];

describe('an action on instruments whose n-th insert fails', () => {
  it('leaves everything as it was, for every action and every n', () => {
    const db = freshDatabase();
    const parts: ActionParts = {
      db,
      clock: () => Date.parse('2026-03-10T08:00:00Z'),
      actor: { name: 'inspector 2', roles: ROLES },
    };
    for (const [verb, does] of DEEDS) {
      let failures = 0;
      for (let n = 1; ; n += 1) {
        const before = contentOf(db);
        const fault = failNthInsert(db, n);
        const outcome = attempt(() => does(parts));
        fault.end();
        expect(db.inTransaction, `${verb}, insert ${n}`).toBe(false);
        if (outcome === null) break;
        expect(outcome, `${verb}, insert ${n}`).toMatch(/injected fault/);
        expect(contentOf(db), `${verb}, insert ${n}`).toEqual(before);
        failures = n;
      }
      expect(failures, verb).toBeGreaterThan(0);
    }
    expect(db.pragma('integrity_check', { simple: true })).toBe('ok');
    expect(db.pragma('foreign_key_check')).toEqual([]);
    expect(verifyChains(db)).toMatchObject({ holds: true, firstBroken: null });
  });

  it.each(TABLES)('rows of %s are never changed nor taken away', (table) => {
    const db = freshDatabase();
    const triggers = db
      .prepare<[string], string>("SELECT sql FROM sqlite_schema WHERE type = 'trigger' AND tbl_name = ?")
      .pluck()
      .all(table);
    expect(triggers.filter((sql) => /BEFORE UPDATE ON/.test(sql))).toHaveLength(1);
    expect(triggers.filter((sql) => /BEFORE DELETE ON/.test(sql))).toHaveLength(1);
  });
});

function attempt(does: () => unknown): string | null {
  try {
    does();
    return null;
  } catch (error) {
    return String(error);
  }
}

/** Every row of every table, as text. */
function contentOf(db: Db): Record<string, string> {
  const tables = db
    .prepare<[], string>("SELECT name FROM sqlite_schema WHERE type = 'table' AND name <> 'sqlite_sequence'")
    .pluck()
    .all();
  return Object.fromEntries(
    tables.map((table) => [table, sha256Of(JSON.stringify(db.prepare(`SELECT * FROM ${table}`).all()))]),
  );
}
