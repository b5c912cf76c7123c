import { describe, expect, it } from 'vitest';
import { reactionHeatJM3 } from '../../../models/cure/heat/layer.ts';
import { throughPart } from '../../../models/cure/heat/through-part.ts';
import { evaluateLog } from '../../../models/evaluation/judge.ts';
import { partView } from '../../../server/http/part-view.ts';
import { readThickness } from '../../../server/http/read-thickness.ts';
import { PLANNED_RUNS } from '../../../server/practice/plan-runs.ts';
import { simulationOf } from '../../../server/practice/simulation-of-run.ts';
import { seedFrom } from '../../../server/practice/simulator/random.ts';
import { simulateRun } from '../../../server/practice/simulator/simulate-run.ts';
import { writePracticeWorkshop } from '../../../server/practice/write-workshop.ts';
import { freshDatabase } from '../fresh-database.ts';

const planned = PLANNED_RUNS.find(({ run }) => run === 'A2-0110');
if (planned === undefined) throw new Error('the plan has no heavy stock');

describe('the heavy rudder stock', () => {
  it('keeps its cycle at both surfaces, and its middle is estimated to have passed the ceiling', async () => {
    const db = freshDatabase();
    await writePracticeWorkshop({ db, evaluate: async (log, inputs) => evaluateLog(log, inputs), runs: [planned] });
    const part = partView(db, 'RS-0218');
    expect(part.verdict).toBe('conforms');
    expect(part.layup).toMatchObject({ tool: 'RT-03', thicknessMm: 46, plies: 230 });
    const run = part.runs[0]?.line.run ?? 0;
    const answer = await readThickness(
      { db, cureThroughPart: async (asked) => throughPart(asked) },
      'RS-0218',
      run,
      {},
    );
    expect(answer.cases.map(({ name }) => name)).toEqual(['TC1 on the bag side, TC2 on the tool side']);
    expect(Math.max(...answer.measured.flatMap(({ temperatureC }) => temperatureC))).toBeLessThan(183);
    expect(answer.peakC[0]).toBeGreaterThan(191);
    expect(answer.ceiling).toEqual({ atMost: 190, unit: '°C', stayed: 'above' });
    const [only] = answer.cases;
    expect(only?.peak.depthMm).toBeGreaterThan(15);
    expect(only?.peak.depthMm).toBeLessThan(31);
    expect(answer.reached).toEqual([
      { what: 'degree', atLeast: 0.88, unit: '', middle: 'reached', throughout: 'reached' },
    ]);
  });

  it('is as hot in its middle as the simulator, which steps finite volumes of its own, has it', () => {
    const plan = simulationOf(planned);
    const [bag, tool] = plan.sensors;
    if (bag === undefined || tool === undefined) throw new Error('the heavy stock has two thermocouples');
    // One column of the simulator, looked at in its top, bottom and middle cell.
    const cell = (channel: string, junction: number) => ({ ...bag, channel, point: { ...bag.point, junction } });
    const sensors = [cell('TC1', 11), cell('TC2', 0), cell('TC3', 5), cell('TC4', 6)];
    const { truth } = simulateRun({ ...plan, sensors, faults: [] }, seedFrom('any'));
    const { history } = truth;
    const kelvin = (i: number) =>
      Float64Array.from(history.junctionC[i] ?? [], (temperatureC) => temperatureC + 273.15);
    const laminate = { densityKgM3: 1570, resinDensityKgM3: 1270, fibreFraction: 0.58 };
    const [one] = throughPart({
      laminate: {
        // From the middle of the bottom cell to that of the top one.
        thicknessM: (bag.point.laminateM * 11) / 12,
        densityKgM3: laminate.densityKgM3,
        specificHeatJKgK: 1000,
        conductivityWMK: 0.62,
        reactionHeatJM3: reactionHeatJM3(plan.resin, laminate),
      },
      tool: null,
      resin: plan.resin,
      startDegree: bag.point.startDegree,
      timeS: Float64Array.from({ length: history.count }, (_, i) => i * history.stepS),
      cases: [
        {
          bag: { meets: 'thermocouple', temperatureK: kelvin(0) },
          tool: { meets: 'thermocouple', temperatureK: kelvin(1) },
          withTool: false,
        },
      ],
    });
    const middleC = (one?.middlePeak.temperatureK ?? 0) - 273.15;
    const simulatedC = Math.max(truth.sensors[2]?.highestC ?? 0, truth.sensors[3]?.highestC ?? 0);
    expect(Math.abs(middleC - simulatedC)).toBeLessThan(0.5);
    expect(Math.abs((one?.alpha[40] ?? 0) - (truth.sensors[3]?.degree ?? 0))).toBeLessThan(2e-3);
  });
});
