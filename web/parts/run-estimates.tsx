import type { CureEstimate, Evaluation } from '../../models/evaluation/evaluation.ts';
import type { RunView } from '../../server/contract/runs.ts';
import { clock } from '../words/clock.ts';
import { degreeWords, gelWords, intervalSentences, tgWords } from '../words/estimates.ts';
import { shownUnits, zone } from '../workshop.ts';
import { type EstimatesTold, EstimatesToldList } from './estimates-told.tsx';
import { ResinStanding } from './resin-status-tag.tsx';
import { Wide } from './wide.tsx';

/** Estimated cure of each judged thermocouple, said to be estimates, with the source they rest on. */
export function RunEstimates({
  run,
  evaluation,
  told,
}: {
  run: RunView;
  evaluation: Evaluation;
  told: EstimatesTold | null;
}) {
  const estimates = new Map(evaluation.parts.flatMap((part) => part.cure).map((one) => [one.channel, one]));
  const without = evaluation.parts.flatMap(({ notEstimated }) => notEstimated ?? []);
  const refused = new Map(without.map((one) => [one.channel, one]));
  if (estimates.size + refused.size === 0 || !evaluation.resin) return null;
  const status = run.resin?.document.source.status;
  const unit = shownUnits.value.temperature;
  return (
    <section class="section">
      <h2>Cure at the end, estimated</h2>
      <p>
        Worked out from the temperatures by a model, not measured. Set{' '}
        <a href={`/resins/${encodeURIComponent(evaluation.resin.code)}`}>{evaluation.resin.code}</a>,{' '}
        {evaluation.resin.citation}.
      </p>
      {status && <ResinStanding status={status} />}
      <Wide label="Cure at the end, estimated">
        <table>
          <thead>
            <tr>
              <th scope="col">Thermocouple</th>
              <th scope="col" class="figure-cell">
                Degree of cure
              </th>
              <th scope="col" class="figure-cell">
                Tg, {unit}
              </th>
              <th scope="col" class="figure-cell">
                Gels
              </th>
              <th scope="col" class="figure-cell">
                Vitrifies
              </th>
            </tr>
          </thead>
          <tbody>
            {[...estimates.values()].sort(leastFirst).map((one) => (
              <tr key={one.channel}>
                <th scope="row">{one.channel}</th>
                <td class="figure-cell">{degreeWords(one)}</td>
                <td class="figure-cell">{tgWords(one, unit)}</td>
                <td class="figure-cell">{gelWords(one, zone.value)}</td>
                <td class="figure-cell">{one.vitrifiesAt ? clock(one.vitrifiesAt, zone.value) : 'not seen'}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </Wide>
      {[...refused.values()].map(({ channel, because }) => (
        <p class="notice amber" key={channel}>
          No estimate along {channel}: {because}.
        </p>
      ))}
      {intervalSentences([...estimates.values()], run.resin?.document.covariance !== undefined).map((sentence) => (
        <p class="small soft" key={sentence}>
          {sentence}
        </p>
      ))}
      {told && <EstimatesToldList told={told} />}
    </section>
  );
}

function leastFirst(a: CureEstimate, b: CureEstimate): number {
  return a.degree - b.degree;
}
