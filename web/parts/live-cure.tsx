import type { Evaluation } from '../../models/evaluation/evaluation.ts';
import type { Forecast } from '../../models/forecast/forecast.ts';
import type { RunView } from '../../server/contract/runs.ts';
import { plain } from '../words/figures.ts';
import { clockRoundedUp, temperatureWords } from '../words/live.ts';
import { shownUnits, zone } from '../workshop.ts';
import { LiveFigure } from './live-figure.tsx';
import { ResinStanding } from './resin-status-tag.tsx';

/** Estimated cure now, and at the end if the programme holds; said to be estimates, with what they rest on. */
export function LiveCure({
  cure,
  run,
  evaluation,
  nowMs,
  isOld,
}: {
  cure: Forecast['cure'];
  run: RunView;
  evaluation: Evaluation;
  /** By the server's clock. */
  nowMs: number;
  isOld: boolean;
}) {
  if (cure === null || !evaluation.resin) return null;
  const unit = shownUnits.value.temperature;
  const status = run.resin?.document.source.status;
  const figures = [
    ['degree of cure now', cure.degreeNow === null ? null : plain(cure.degreeNow, 2)],
    ['degree at the end', cure.degreeAtEnd === null ? null : plain(cure.degreeAtEnd, 2)],
    ['Tg now', cure.tgNowC === null ? null : temperatureWords(cure.tgNowC, unit)],
    ['Tg at the end', cure.tgAtEndC === null ? null : temperatureWords(cure.tgAtEndC, unit)],
    [isGelled(cure, nowMs) ? 'gelled' : 'gel expected', gelClock(cure)],
  ] as const;
  return (
    <section class="section">
      <h2>Cure, estimated</h2>
      <dl class="live-figures">
        {figures.map(([name, text]) =>
          text === null ? null : <LiveFigure key={name} large name={name} text={text} ageMs={null} isStale={isOld} />,
        )}
      </dl>
      <p class="section">
        Worked out from the temperatures by a model, not measured; the end as it would be if the programme holds. The
        least of the judged thermocouples, {cure.by}. Set{' '}
        <a href={`/resins/${encodeURIComponent(evaluation.resin.code)}`}>{evaluation.resin.code}</a>,{' '}
        {evaluation.resin.citation}.
      </p>
      {status && <ResinStanding status={status} />}
    </section>
  );
}

type Cure = NonNullable<Forecast['cure']>;

function isGelled({ gelExpectedAt }: Cure, nowMs: number): boolean {
  return gelExpectedAt !== null && Date.parse(gelExpectedAt) <= nowMs;
}

function gelClock({ gelExpectedAt }: Cure): string | null {
  return gelExpectedAt === null ? null : clockRoundedUp(gelExpectedAt, zone.value);
}
