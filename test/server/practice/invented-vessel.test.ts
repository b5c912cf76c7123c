import { describe, expect, it } from 'vitest';
import type { Cycle } from '../../../models/cycle/cycle.ts';
import { evaluateLog } from '../../../models/evaluation/judge.ts';
import type { ChannelLayout } from '../../../models/log/layout.ts';
import type { Load } from '../../../models/run/load.ts';
import { inventVesselBy } from '../../../server/practice/invented-vessel.ts';
import { PRACTICES } from '../../../server/practice/plan-practices.ts';
import { SKERRY_120, SKERRY_180 } from '../../../server/practice/plan-resins.ts';
import { insertCycle, insertCycleStatus } from '../../../server/store/cycles.ts';
import type { Db } from '../../../server/store/database.ts';
import { insertResin } from '../../../server/store/resins.ts';
import { freshDatabase } from '../fresh-database.ts';

const AT = '2026-03-02T08:00:00.000Z';

const channels: readonly ChannelLayout[] = [
  ...['TC1', 'TC2', 'TC3', 'TC4'].map((name): ChannelLayout => ({ column: name, name, role: 'part', unit: '°C' })),
  { column: 'air', name: 'air', role: 'air', unit: '°F' },
  { column: 'SP', name: 'setpoint', role: 'setpoint', unit: '°C' },
  { column: 'P', name: 'vessel pressure', role: 'pressure', unit: 'bar', scale: 0.01 },
  { column: 'V1', name: 'V1', role: 'vacuum', unit: 'bar' },
];

function workshopWith(...cycles: readonly Cycle[]): Db {
  const db = freshDatabase();
  for (const resin of [SKERRY_120, SKERRY_180]) insertResin(db, resin, AT, 'engineer 1');
  for (const cycle of cycles) {
    const id = insertCycle(db, cycle, AT, 'engineer 1');
    insertCycleStatus(db, id, 'draft', null, AT, 'engineer 1');
    insertCycleStatus(db, id, 'released', 'practice', AT, 'engineer 2');
  }
  return db;
}

/** A cycle Skerry Row does not have, so that its programme is made of the document alone. */
const OWN: Cycle = { ...PRACTICES['struts-b'].cycle, code: 'OWN-180', issue: '1' };

/** Judged from what is on record of a run, not from what its vessel shows. */
const ON_RECORD = ['leak-test', 'material/out-life', 'instruments/calibration'];

describe('an invented vessel', () => {
  const cycles = [...Object.values(PRACTICES).map(({ cycle }) => cycle), OWN];

  it.each(cycles.map((cycle) => [`${cycle.code} ${cycle.issue}`, cycle] as const))(
    'heats and holds a load as %s asks',
    (_, cycle) => {
      const invent = inventVesselBy(workshopWith(cycle));
      const intervalS = 10;
      const run = invent({ cycle, channels, intervalS, seed: 7 });
      const scans = Array.from({ length: run.scans }, (_, n) => run.figures(n, 0));
      const readings = {
        timeMs: Float64Array.from(scans, (_, n) => Date.parse(AT) + n * intervalS * 1000),
        channels: channels.map((channel, c) => ({ channel, value: Float64Array.from(scans, (scan) => scan[c]!) })),
      };
      const load: Load = {
        format: 'dwellbook-load/1',
        barometer: '1013 mbar',
        parts: [{ part: 'SR-1', bagLine: 'V1', startDegree: 0.02 }],
        sensors: ['TC1', 'TC2', 'TC3', 'TC4'].map((channel) => ({ channel, parts: ['SR-1'], place: 'lag' })),
      };
      const resin = [SKERRY_120, SKERRY_180].find(({ code }) => code === cycle.cure?.resin) ?? null;
      const inputs = { cycle, load, resin, exclusions: [], barometer: null, open: false };
      const evaluation = evaluateLog({ readings, repairs: [], passedOver: [] }, inputs);
      const { findings } = evaluation.parts[0]!;
      const broken = findings.filter(({ limit, outcome }) => outcome !== 'met' && !ON_RECORD.includes(limit));
      expect(broken.map(({ limit, because }) => [limit, because])).toEqual([]);
    },
  );

  const cycle = PRACTICES['struts-b'].cycle;

  it('shows the same for the same seed, and other noise in the next round', () => {
    const db = workshopWith(cycle);
    const [one, same, other] = [7, 7, 8].map((seed) => inventVesselBy(db)({ cycle, channels, intervalS: 1, seed }));
    expect(one!.scans).toBeGreaterThan(6 * 3600);
    for (const scan of [0, 1, 7000]) expect(one!.figures(scan, 0)).toEqual(same!.figures(scan, 0));
    expect(one!.figures(7000, 0)).not.toEqual(other!.figures(7000, 0));
    const [first, next] = [one!.figures(7000, 0), one!.figures(7000, 1)];
    expect(next).not.toEqual(first);
    for (const [c, figure] of first.entries()) expect(Math.abs(next[c]! - figure)).toBeLessThan(c === 4 ? 4 : 3);
  });

  it('writes figures before the scale of their channel', () => {
    const run = inventVesselBy(workshopWith(cycle))({ cycle, channels, intervalS: 10, seed: 7 });
    const pressures = Array.from({ length: run.scans }, (_, n) => run.figures(n, 0)[6]!);
    expect(Math.max(...pressures)).toBeGreaterThan(680);
    expect(Math.max(...pressures)).toBeLessThan(720);
  });

  it('plays nothing that is not released, nor what a vessel has no channel for', () => {
    const db = workshopWith(cycle);
    insertCycleStatus(db, 1, 'withdrawn', 'replaced', AT, 'engineer 2');
    const asked = { cycle, channels, intervalS: 10, seed: 7 };
    expect(() => inventVesselBy(db)(asked)).toThrow('SR-180 issue B is not released');
    expect(() => inventVesselBy(db)({ ...asked, cycle: { code: 'SR-180', issue: 'Z' } })).toThrow('no cycle SR-180');
    const strange: ChannelLayout = { column: 'n', name: 'counter', role: 'other', unit: '1' };
    const invent = inventVesselBy(workshopWith(cycle));
    expect(() => invent({ ...asked, channels: [...channels, strange] })).toThrow('counter');
  });
});
