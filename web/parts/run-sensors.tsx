import type { Evaluation } from '../../models/evaluation/evaluation.ts';
import type { RunView } from '../../server/contract/runs.ts';
import { clock, dayAndClock } from '../words/clock.ts';
import { count, listed } from '../words/figures.ts';
import { ROLE_WORDS } from '../words/layouts.ts';
import { sentence } from '../words/verdicts.ts';
import { zone } from '../workshop.ts';
import { RunInstruments } from './run-instruments.tsx';

/** Which sensors were believed, which were not, and who decided. */
export function RunSensors({ run, evaluation }: { run: RunView; evaluation: Evaluation }) {
  const doubted = evaluation.sensors.filter(({ state, faults }) => state !== 'working' || faults.length > 0);
  const working = evaluation.sensors.filter((sensor) => !doubted.includes(sensor));
  return (
    <section class="section">
      <h2>Sensors</h2>
      <p>
        {working.length === 0
          ? 'None was without doubt.'
          : `${count(working.length, 'sensor')} worked throughout: ${listed(working.map(({ channel }) => channel))}.`}
      </p>
      {doubted.length > 0 && (
        <ul class="entries section">
          {doubted.map((sensor) => (
            <li class="entry" key={sensor.channel}>
              <div class="head">
                <h3>{sensor.channel}</h3>
                <span class="soft">
                  {ROLE_WORDS[sensor.role]} · {sensor.state}
                  {sensor.exclusion && ` from ${clock(sensor.exclusion.from, zone.value)}`}
                </span>
              </div>
              {sensor.faults.map((fault) => (
                <p key={fault.kind}>{sentence(fault.because)}</p>
              ))}
            </li>
          ))}
        </ul>
      )}
      {run.decisions.map((decision) => (
        <p class="section" key={decision.channel + decision.deed.at}>
          {decision.channel} was{' '}
          {decision.decision === 'exclude'
            ? `excluded from ${decision.from ? clock(decision.from, zone.value) : 'the start'}`
            : 'kept'}{' '}
          by {decision.deed.by}, {dayAndClock(decision.deed.at, zone.value)}: {sentence(decision.reason)}
        </p>
      ))}
      <RunInstruments run={run.run} />
    </section>
  );
}
