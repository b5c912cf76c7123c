import type { Touched } from '../../server/contract/ask.ts';
import { askVerdictsPath, instrumentTouchedPath } from '../../server/contract/instrument-paths.ts';
import type { CalibrationLine } from '../../server/contract/instruments.ts';
import { useRead } from '../use-read.ts';
import { count } from '../words/figures.ts';
import { pointsWords } from '../words/instruments.ts';
import { RunEntry } from './run-entry.tsx';
import { Shown } from './shown.tsx';
import { VerdictQuestion } from './verdict-question.tsx';

const FIRST = 8;

/** The runs a calibration casts doubt on, and which of them would be judged otherwise with what it found. */
export function FoundOut({ instrument, calibration }: { instrument: string; calibration: CalibrationLine }) {
  const { id, done, unit, asFound } = calibration;
  const reading = useRead<Touched>(instrumentTouchedPath(instrument, id));
  return (
    <section class="section">
      <h2>Found out of tolerance on {done}</h2>
      <p>
        As it came in it would have needed {pointsWords(asFound?.points ?? [], unit)}. Nobody knows since when: every
        run it read since the calibration before is listed.
      </p>
      <Shown reading={reading} what="Reading the runs it read">
        {({ since, until, runs }) => (
          <>
            <p>
              <b>{count(runs.length, 'run')}</b> {since === null ? `until ${until}` : `from ${since} to ${until}`}.
            </p>
            <VerdictQuestion
              path={askVerdictsPath({ by: 'calibration', instrument, calibration: id })}
              ask="Judge them with what was found"
            />
            <ul class="entries">
              {runs.slice(0, FIRST).map((run) => (
                <RunEntry key={run.run} line={run} />
              ))}
            </ul>
            {runs.length > FIRST && (
              <details>
                <summary>{count(runs.length - FIRST, 'more run')}</summary>
                <ul class="entries">
                  {runs.slice(FIRST).map((run) => (
                    <RunEntry key={run.run} line={run} />
                  ))}
                </ul>
              </details>
            )}
          </>
        )}
      </Shown>
    </section>
  );
}
