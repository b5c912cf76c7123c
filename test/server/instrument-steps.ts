import type { Finding } from '../../models/evaluation/evaluation.ts';
import type { LiveApp } from './live-app.ts';
import { recordedCase } from './recorded-case.ts';
import { loadCase, recordCase } from './workshop-steps.ts';

const CASE = 'sound';

/** Part thermocouples of the recorded run of 3 March. */
export const CHANNELS = recordedCase(CASE)
  .layout.channels.filter(({ role }) => role === 'part')
  .map(({ name }) => name);

export const GOOD = {
  done: '2026-01-12',
  until: '2026-07-11',
  by: 'calibration bench',
  certificate: 'C-104',
  unit: '°C',
  points: [
    [0, 0],
    [200, -0.5],
  ],
  uncertainty: 1.1,
};

/** An instrument for every part thermocouple of the vessel, each calibrated, on its channel since January. */
export async function placeAll(app: LiveApp, calibration: (n: number) => object = () => GOOD): Promise<void> {
  for (const [n, channel] of CHANNELS.entries()) {
    const instrument = `K-${n + 1}`;
    const answers = [
      await app.post('/api/instruments', { instrument, kind: 'thermocouple', type: 'K', makerNumber: `77-${n}` }),
      await app.post(`/api/instruments/${instrument}/calibrations`, calibration(n)),
      await app.post(`/api/instruments/${instrument}/places`, {
        on: { kind: 'vessel', name: 'Autoclave 1' },
        channel,
        from: '2026-01-15T08:00:00Z',
      }),
    ];
    for (const answer of answers) if (answer.status !== 201) throw new Error(answer.text);
  }
}

/** The recorded run, not yet loaded; its vessel is there. */
export async function runAskingCalibration(app: LiveApp): Promise<number> {
  const run = await recordCase(app, CASE);
  const { cycle } = recordedCase(CASE);
  const { windows: _windows, ...alone } = cycle;
  await app.post('/api/cycles', { document: { ...alone, issue: 'I', instruments: { calibration: true } } });
  return run;
}

export async function loadAsking(app: LiveApp, run: number): Promise<void> {
  const { cycle } = recordedCase(CASE);
  const loaded = await loadCase(app, run, CASE, { cycle: { code: cycle.code, issue: 'I' } });
  if (loaded.status !== 201) throw new Error(loaded.text);
}

export async function calibrationOf(app: LiveApp, run: number) {
  const { evaluation } = (await app.get(`/api/runs/${run}`)).body;
  const findings: Finding[] = evaluation.document.parts[0].findings;
  return {
    finding: findings.find(({ limit }) => limit === 'instruments/calibration') as Finding,
    inputs: evaluation.inputs as Record<string, string>,
    assumptions: evaluation.document.assumptions as string[],
    id: evaluation.id as number,
  };
}
