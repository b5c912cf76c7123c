import { addRecorder } from '../actions/add-recorder.ts';
import { addVessel } from '../actions/add-vessel.ts';
import { importCycle } from '../actions/import-cycle.ts';
import { importResin } from '../actions/import-resin.ts';
import type { JudgingParts } from '../actions/judge-run.ts';
import { releaseCycle } from '../actions/release-cycle.ts';
import { setWorkshop } from '../actions/set-workshop.ts';
import { withdrawCycle } from '../actions/withdraw-cycle.ts';
import { RS_175_A, SR_180_A, SR_180_B } from './plan-cycles-autoclave.ts';
import { HB_200_A, PC_190_A, RD_130_B, RD_250_A } from './plan-cycles-others.ts';
import { RECORDERS } from './plan-recorders.ts';
import { RESINS } from './plan-resins.ts';
import { VESSELS } from './plan-vessels.ts';
import type { PracticeDeed } from './practice-deed.ts';

export const PRACTICE_SENTENCE =
  'Skerry Row is invented, for practice: every name, part, figure and cycle here is made up.';

const OPENED_MS = Date.parse('2025-10-20T08:00:00Z');
const ENGINEER = 'process engineer 1';

/** The empty workshop: its name, vessels, recorders, resins and the cycles that held when the year began. */
export function openWorkshop(partsFor: (deed: { atMs: number; by: string }) => JudgingParts): void {
  const parts = partsFor({ atMs: OPENED_MS, by: ENGINEER });
  setWorkshop(
    parts,
    {
      name: 'Skerry Row',
      zone: 'Europe/London',
      units: { temperature: '°C', pressure: 'bar', vacuum: 'bar' },
    },
    PRACTICE_SENTENCE,
  );
  for (const { name, kind } of VESSELS) addVessel(parts, { name, kind });
  for (const { name, vessel, layout } of RECORDERS) addRecorder(parts, { name, vessel, layout });
  for (const resin of RESINS) importResin(parts, resin);
  for (const cycle of [SR_180_A, RS_175_A, RD_250_A, PC_190_A, RD_130_B, HB_200_A]) {
    importCycle(parts, cycle);
    releaseCycle(parts, cycle.code, cycle.issue, `As ${cycle.origin?.document} issue ${cycle.origin?.issue} has it`);
  }
}

/** The strut cycle changes its issue in February. */
export function documentDeeds(): PracticeDeed[] {
  const { code, issue } = SR_180_B;
  return [
    {
      atMs: Date.parse('2026-02-12T13:05:00Z'),
      by: ENGINEER,
      does: (parts) => importCycle(parts, SR_180_B),
    },
    {
      atMs: Date.parse('2026-02-16T09:40:00Z'),
      by: ENGINEER,
      does: (parts) =>
        releaseCycle(parts, code, issue, 'SR-PS-014 issue 4: longest stay, rate below, the lag must work'),
    },
    {
      atMs: Date.parse('2026-02-20T16:10:00Z'),
      by: ENGINEER,
      does: (parts) => withdrawCycle(parts, code, SR_180_A.issue, 'Issue B holds from here on'),
    },
  ];
}
