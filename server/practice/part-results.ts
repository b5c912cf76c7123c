import type { AddPartResultRequest } from '../contract/results.ts';
import { BROKEN_AT_KN, PROOF_LOAD_KN } from './plan-failures.ts';
import type { PlannedPart, PlannedRun } from './plan-run.ts';
import { beginRandom, seedFrom } from './simulator/random.ts';
import type { Truth } from './simulator/truth.ts';

/** A test or inspection of a part, days after its run. */
export interface PlannedResult {
  readonly part: string;
  readonly afterDays: number;
  readonly by: string;
  readonly result: Omit<AddPartResultRequest, 'at'>;
}

/** What was measured on the parts of a run. A run that did not conform goes no further than the first look. */
export function resultsOf(run: PlannedRun, truth: Truth): PlannedResult[] {
  return run.parts.flatMap((part) => [
    ...ultrasonic(part),
    ...(run.expected.verdict === 'conforms' ? [...proofLoad(part), ...residualCure(part, run, truth)] : []),
  ]);
}

function ultrasonic({ part, kind }: PlannedPart): PlannedResult[] {
  if (kind !== 'strut' && kind !== 'rudder-stock') return [];
  const text = 'Through transmission, no indication above 6 mm';
  const afterDays = 2 + draw(part, 'ultrasonic') * 4;
  return [{ part, afterDays, by: 'inspector 2', result: { test: 'ultrasonic', outcome: 'passed', text } }];
}

function proofLoad({ part, kind }: PlannedPart): PlannedResult[] {
  if (kind !== 'strut') return [];
  const brokenAtKn = BROKEN_AT_KN[part];
  const afterDays = 12 + draw(part, 'proof load') * 25;
  const test = 'proof load';
  if (brokenAtKn !== undefined) {
    const text = `Broke at ${brokenAtKn.toFixed(1)} kN of ${PROOF_LOAD_KN.toFixed(1)} kN asked`;
    const result = { test, outcome: 'failed', figure: brokenAtKn, unit: 'kN', text } as const;
    return [{ part, afterDays, by: 'test engineer 1', result }];
  }
  const text = `Held ${PROOF_LOAD_KN.toFixed(1)} kN for one minute`;
  const result = { test, outcome: 'passed', figure: PROOF_LOAD_KN, unit: 'kN', text } as const;
  return [{ part, afterDays, by: 'test engineer 1', result }];
}

/** One coupon a load is scanned in the calorimeter; it reads the true degree of cure within half a per cent or so. */
function residualCure(part: PlannedPart, run: PlannedRun, truth: Truth): PlannedResult[] {
  if (part !== run.parts[0] || (part.kind !== 'strut' && part.kind !== 'rudder-stock')) return [];
  const sensor = truth.sensors.find(({ channel }) => channel === part.channels[0]);
  if (sensor === undefined) return [];
  const random = beginRandom(seedFrom(`${part.part} DSC`));
  const figure = Number((100 * sensor.degree + 0.5 * random.normal()).toFixed(1));
  const text = 'Coupon cured beside the part, 10 °C/min';
  const result = { test: 'DSC degree of cure', outcome: 'noted', figure, unit: '%', text } as const;
  return [{ part: part.part, afterDays: 3 + 5 * random.next(), by: 'process engineer 1', result }];
}

function draw(part: string, what: string): number {
  return beginRandom(seedFrom(`${part} ${what}`)).next();
}
