import { Dwells } from '../evaluation/dwells.ts';
import type { Evaluation } from '../evaluation/evaluation.ts';
import { iso } from '../evaluation/finding.ts';
import { type JudgementInputs, judgementsOf, type PartJudgements } from '../evaluation/judge.ts';
import type { RunDigest } from '../run/digest.ts';
import { cureAhead } from './cure-ahead.ts';
import { dwellAhead } from './dwell-ahead.ts';
import { entryAhead } from './entry-ahead.ts';
import type { Forecast } from './forecast.ts';
import { nearingOf } from './nearing.ts';
import { needsOf } from './needs.ts';
import { runnersOf, sensorsNow } from './runners.ts';
import { stageNow } from './stage-now.ts';

/**
 * Where an open run is heading, for each part, if its programme holds.
 *
 * @param digest     What the run has shown so far.
 * @param inputs     What it is judged by; the same as of `evaluation`.
 * @param evaluation What `judge` said of both.
 * @returns One forecast a part, in the order of the evaluation's parts. Advice only.
 */
export function forecastsOf(digest: RunDigest, inputs: JudgementInputs, evaluation: Evaluation): Forecast[] {
  return judgementsOf(digest, inputs).map((judgements, i) => forecastOf(judgements, evaluation, i));
}

function forecastOf({ asIs, without }: PartJudgements, evaluation: Evaluation, i: number): Forecast {
  const part = evaluation.parts[i]!;
  const variants = [{ j: asIs, without: [] }, ...without];
  const stage = stageNow(asIs, new Dwells(asIs));
  const sensors = sensorsNow(asIs);
  const isInDwell = stage?.stage.kind === 'dwell';
  const dwell = stage !== null && isInDwell ? dwellAhead(variants, stage.dwell) : null;
  return {
    part: part.part,
    stage: stage && { name: stage.stage.name, kind: stage.stage.kind, since: iso(stage.sinceMs)! },
    ...runnersOf(sensors, stage?.stage.kind === 'cool'),
    entry: stage === null || isInDwell ? null : entryAhead(asIs, stage.dwell),
    dwell,
    cure: cureAhead(asIs, part, stage, sensors, dwell),
    nearing: nearingOf(asIs, part, stage, sensors, dwell),
    needs: needsOf(asIs, evaluation, part),
  };
}
