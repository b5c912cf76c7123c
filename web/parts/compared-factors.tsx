import type { ComparedFactor, Comparison, FactorGroup, Standing } from '../../models/trace/comparison.ts';
import { raised } from '../words/figures.ts';

const STANDING_WORDS: Readonly<Record<Standing, string>> = {
  'stands-out': 'Goes with failure',
  'may-be-chance': 'May be chance',
  'nothing-shown': 'Nothing shown',
  'too-few': 'Too few to tell',
};

/** Factors as they rank, those that move together in one place. */
export function ComparedFactors({ comparison }: { comparison: Comparison }) {
  const { groups, factors, untested, words } = comparison;
  const factorOf = new Map(factors.map((factor) => [factor.name, factor]));
  const telling = groups.filter(({ first }) => isTelling(factorOf.get(first)));
  const others = groups.filter(({ first }) => !isTelling(factorOf.get(first)));
  return (
    <section class="section">
      <h2>What they share</h2>
      {words.map((sentence) => (
        <p key={sentence} class="soft">
          {sentence}
        </p>
      ))}
      {telling.length === 0 && <p>Nothing on record tells the failed parts from the sound ones.</p>}
      <ol class="factors">
        {telling.map((group) => (
          <Group key={group.first} group={group} factorOf={factorOf} />
        ))}
      </ol>
      {others.length > 0 && (
        <details class="section">
          <summary>Not shown to go with failure</summary>
          <ul class="factors">
            {others.map((group) => (
              <Group key={group.first} group={group} factorOf={factorOf} />
            ))}
          </ul>
        </details>
      )}
      {untested.length > 0 && (
        <details class="section">
          <summary>Not tested</summary>
          <ul>
            {untested.map(({ name, sentence }) => (
              <li key={name}>{sentence}</li>
            ))}
          </ul>
        </details>
      )}
    </section>
  );
}

function isTelling(factor: ComparedFactor | undefined): boolean {
  return factor?.standing === 'stands-out' || factor?.standing === 'may-be-chance';
}

function Group({ group, factorOf }: { group: FactorGroup; factorOf: ReadonlyMap<string, ComparedFactor> }) {
  const first = factorOf.get(group.first);
  if (first === undefined) return null;
  return (
    <li class="factor">
      <Factor factor={first} />
      {group.tied.length > 0 && (
        <details>
          <summary>Moves with it: {group.tied.map(({ name }) => name).join(', ')}</summary>
          <ul>
            {group.tied.map((tie) => (
              <li key={tie.name}>
                <b>{raised(tie.name)}</b>: {factorOf.get(tie.name)?.sentence} {tie.sentence}
              </li>
            ))}
          </ul>
        </details>
      )}
    </li>
  );
}

function Factor({ factor }: { factor: ComparedFactor }) {
  return (
    <>
      <div class="head">
        <h3>{raised(factor.name)}</h3>
        <span class={`standing standing-${factor.standing}`}>{STANDING_WORDS[factor.standing]}</span>
      </div>
      <p>{factor.sentence}</p>
      {factor.kind === 'level' && <Effect factor={factor} />}
      <p class="soft small">{factor.evidence}</p>
    </>
  );
}

/** How much more often parts with the first level failed, with its interval. */
function Effect({ factor }: { factor: ComparedFactor & { kind: 'level' } }) {
  const [level] = factor.levels;
  if (level === undefined || level.test === null) return null;
  const { failedWith, soundWith, failedWithout, soundWithout } = level.table;
  const { estimate, interval } = level.test.riskDifference;
  const percent = (share: number) => `${Math.round(100 * share)} %`.replace('-', '−');
  const span =
    interval.low === null || interval.high === null
      ? 'too few for an interval'
      : `${Math.round(100 * interval.confidence)} % interval ${percent(interval.low)} to ${percent(interval.high)}`;
  return (
    <p>
      With {level.level} {failedWith} of {failedWith + soundWith} failed, without it {failedWithout} of{' '}
      {failedWithout + soundWithout}: {percent(estimate)} more ({span}).
    </p>
  );
}
