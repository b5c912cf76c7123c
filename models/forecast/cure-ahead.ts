import { beginCure } from '../cure/cure-progress.ts';
import { nominalProgramme } from '../cycle/nominal-programme.ts';
import { type Programme, type ProgrammeStep, programmeCorners } from '../cycle/programme.ts';
import { DomainError } from '../errors.ts';
import type { PartEvaluation } from '../evaluation/evaluation.ts';
import { iso } from '../evaluation/finding.ts';
import type { Judgement } from '../evaluation/judgement.ts';
import { celsiusFromKelvin, temperatureDifferenceFromCelsius, temperatureFromCelsius } from '../units.ts';
import type { Forecast } from './forecast.ts';
import type { SensorNow } from './runners.ts';
import type { StageNow } from './stage-now.ts';

/**
 * Estimated cure of the sensor that has cured least, now and at the end of the last dwell, if the programme holds.
 *
 * From now on: at the present rate to the next dwell, or at its present temperature for what the dwell still lasts; after
 * that each rate at the middle of its band and each dwell at its target for its least time.
 */
export function cureAhead(
  j: Judgement,
  part: PartEvaluation,
  stage: StageNow | null,
  sensors: readonly SensorNow[],
  dwell: Forecast['dwell'],
): Forecast['cure'] {
  const { resin } = j;
  const least = [...part.cure].sort((a, b) => a.degree - b.degree)[0];
  if (resin === null || least === undefined) return null;
  const now = {
    degreeNow: least.degree,
    tgNowC: least.tgC,
    degreeAtEnd: null,
    tgAtEndC: null,
    gelExpectedAt: least.gelAt,
    by: least.channel,
  };
  const sensor = sensors.find(({ channel }) => channel === least.channel);
  const programme = sensor === undefined || stage === null ? null : whatIsLeft(j, stage, sensor, dwell);
  if (programme === null) return now;
  try {
    const progress = beginCure(resin, { startDegree: least.degree });
    const { timeS, temperatureK } = programmeCorners(programme);
    for (let i = 0; i < timeS.length; i++) progress.accept(timeS[i]!, temperatureK[i]!);
    const tgK = progress.tgK();
    const { gelS } = progress;
    return {
      ...now,
      degreeAtEnd: progress.alpha(),
      tgAtEndC: tgK === null ? null : celsiusFromKelvin(tgK),
      gelExpectedAt: now.gelExpectedAt ?? (gelS === null ? null : iso(j.log.until + gelS * 1000)),
    };
  } catch (error) {
    // A set that cannot be integrated so far foretells nothing; what is known now is told all the same.
    if (error instanceof DomainError) return now;
    throw error;
  }
}

/** The programme from now to the end of the last dwell; null where the part is not on its way. */
function whatIsLeft(
  j: Judgement,
  { stage, index }: StageNow,
  { valueC, rateCPerMin }: SensorNow,
  dwell: Forecast['dwell'],
): Programme | null {
  const unit = j.cycle.units.temperature;
  const nominal = nominalProgramme({ ...j.cycle, stages: j.cycle.stages.slice(index) }).programme.steps;
  const last = nominal.findLastIndex(({ kind }) => kind === 'hold');
  if (last < 0) return null;
  const steps = nominal.slice(0, last + 1);
  const start = temperatureFromCelsius(valueC, unit);
  const [first, ...rest] = steps[0]?.kind === 'ramp' && stage.kind === 'dwell' ? steps.slice(1) : steps;
  if (first === undefined) return null;
  if (stage.kind === 'dwell') {
    if (dwell === null) return null;
    const begun: ProgrammeStep[] = dwell.minutesLeft > 0 ? [{ kind: 'hold', minutes: dwell.minutesLeft }] : [];
    return begun.length + rest.length === 0 ? null : { unit, start, steps: [...begun, ...moving(start, rest)] };
  }
  if (first.kind !== 'ramp' || rateCPerMin === null) return null;
  const rate = temperatureDifferenceFromCelsius(Math.abs(rateCPerMin), unit);
  const goesThere = Math.sign(first.to - start) === Math.sign(rateCPerMin) && Math.abs(rateCPerMin) > 0.1;
  return goesThere ? { unit, start, steps: [{ ...first, rate }, ...rest] } : null;
}

/** Steps without a ramp to where it stands already. */
function moving(start: number, steps: readonly ProgrammeStep[]): readonly ProgrammeStep[] {
  const [first, ...rest] = steps;
  return first?.kind === 'ramp' && first.to === start ? rest : steps;
}
