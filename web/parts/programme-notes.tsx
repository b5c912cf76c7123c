import { asWritten } from '../words/figures.ts';
import type { Trial } from '../words/trial.ts';
import { minutesWords } from '../words/trial-words.ts';
import { ResinStanding } from './resin-status-tag.tsx';

/** What the figures rest on, what is not in them, and why two sets are not to be held against each other. */
export function ProgrammeNotes({
  trials,
  uncertainty,
}: {
  trials: readonly Trial[];
  /** Of the thermocouple, with its unit. */
  uncertainty: string;
}) {
  const isCompared = trials.length > 1;
  return (
    <div class="stack trial-notes">
      {trials.map(
        ({ resin, cure }) =>
          cure.stopped && (
            <div class="notice amber" key={resin.code}>
              <p>
                <b>
                  {resin.code} stops after {minutesWords(cure.stopped.timeS)}.
                </b>{' '}
                {cure.stopped.because}. What is shown is as far as it came; nothing beyond is made up.
              </p>
            </div>
          ),
      )}
      {isCompared && (
        <p class="notice amber">
          Degrees of cure of two sets are not comparable across studies: each set’s gel, Tg and viscosity belong to its
          own degree, and to no other. Sets that contradict one another stay apart and are never mixed; which of them
          fits the material is told by a measurement, not by this page.
        </p>
      )}
      {isCompared && <p class="small soft">Drawn: {trials.map(keyOf).join('; ')}.</p>}
      {trials.map(({ resin }) => (
        <ResinStanding key={resin.code} status={resin.source.status} name={isCompared ? resin.code : undefined} />
      ))}
      <p class="small soft">
        Dot: gel. Diamond: vitrification, Tg has come up to the temperature while it holds or rises. Triangle: least
        viscosity. Square: the law changes its form. Cross: the set cannot go on.
        {trials.some(({ cure }) => cure.outside !== null) &&
          ' Hatched along the foot: temperature outside the range the set was fitted in; the estimate goes on there.'}
      </p>
      <p class="small soft">
        Intervals: {reckonedWords(trials, uncertainty)} What the model leaves out (the batch, heat of reaction in a
        thick part, where the thermocouple sits) is not in them; for vitrification and viscosity none is worked out.
      </p>
      {trials.map(({ resin }) => (
        <p class="small soft" key={resin.code}>
          Source of {resin.code}: {resin.source.citation}.
        </p>
      ))}
    </div>
  );
}

function keyOf({ resin, startDegree }: Trial, n: number): string {
  const start = `from degree ${asWritten(startDegree)}`;
  return n === 0
    ? `A ${resin.code}, heavy line and filled marks, ${start}`
    : `B ${resin.code}, dashed and hollow, ${start}`;
}

function reckonedWords(trials: readonly Trial[], uncertainty: string): string {
  const sources = new Set(trials.flatMap(({ uncertainty }) => uncertainty?.reckonedWith ?? []));
  if (sources.size === 0) return 'none, no uncertainty is typed and the set gives no covariance.';
  const names = [
    ...(sources.has('temperature') ? [`the thermocouple’s ${uncertainty} as one offset for the whole programme`] : []),
    ...(sources.has('kinetics') ? ['the covariance of the fit where a set gives it'] : []),
  ];
  return `expanded, k = 2, by propagation of ${names.join(' and ')} (JCGM 100).`;
}
