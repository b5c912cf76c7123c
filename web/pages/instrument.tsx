import { useRoute } from 'preact-iso';
import { askVerdictsPath, instrumentPath } from '../../server/contract/instrument-paths.ts';
import type { CalibrationLine, InstrumentView } from '../../server/contract/instruments.ts';
import { usePageTitle } from '../page-title.ts';
import { CalibrationFormView } from '../parts/calibration-form.tsx';
import { FoundOut } from '../parts/found-out.tsx';
import { InstrumentPlaces } from '../parts/instrument-places.tsx';
import { Entry, Notebook, PageHead } from '../parts/notebook.tsx';
import { Shown } from '../parts/shown.tsx';
import { StandingMark } from '../parts/standing-mark.tsx';
import { VerdictQuestion } from '../parts/verdict-question.tsx';
import { useRead } from '../use-read.ts';
import { asWritten } from '../words/figures.ts';
import { pointsWords, whatItIs } from '../words/instruments.ts';

/** One instrument: its calibrations, where it sits, and the runs a bad one casts doubt on. */
export default function InstrumentPage() {
  const { params } = useRoute();
  const code = params.instrument ?? '';
  usePageTitle(`Instrument ${code}`);
  const reading = useRead<InstrumentView>(instrumentPath(code));
  return (
    <Notebook>
      <PageHead title={`Instrument ${code}`}>
        {reading.value && (
          <>
            <p class="soft">
              {[whatItIs(reading.value), reading.value.makerNumber && `maker’s number ${reading.value.makerNumber}`]
                .filter(Boolean)
                .join(' · ')}
            </p>
            <p>
              <StandingMark standing={reading.value.standing} due={reading.value.due} />
            </p>
          </>
        )}
      </PageHead>
      <Shown reading={reading} what="Reading the instrument">
        {(view) => <Body view={view} again={reading.again} />}
      </Shown>
    </Notebook>
  );
}

function Body({ view, again }: { view: InstrumentView; again: () => void }) {
  const { instrument, newWire, calibrations } = view;
  const standing = calibrations.filter(({ replacedBy }) => replacedBy === null);
  return (
    <>
      {newWire && (
        <p class="soft">
          New wire of its type may be off by ±{asWritten(newWire.standardC)} °C at {newWire.atC} °C, special limits ±
          {asWritten(newWire.specialC)} °C ({newWire.source}; unused wire only).
        </p>
      )}
      {standing
        .filter(({ asFound }) => asFound?.outOfTolerance)
        .map((calibration) => (
          <FoundOut key={calibration.id} instrument={instrument} calibration={calibration} />
        ))}
      <section class="section">
        <h2>Calibrations</h2>
        {calibrations.length === 0 && <p class="soft">None on record. A run that asks for one cannot be told.</p>}
        <ul class="entries">
          {calibrations.map((calibration) => (
            <CalibrationEntry key={calibration.id} calibration={calibration} />
          ))}
        </ul>
        <details open={calibrations.length === 0}>
          <summary>Write down a calibration</summary>
          <CalibrationFormView key={calibrations.length} view={view} onKept={again} />
        </details>
      </section>
      <InstrumentPlaces view={view} onKept={again} />
      <section class="section">
        <h2>Runs it read</h2>
        <p>A run keeps the judgement it was given. What is on record now may judge it otherwise.</p>
        <VerdictQuestion
          path={askVerdictsPath({ by: 'records', instrument })}
          ask="Judge its runs by what is on record now"
        />
      </section>
    </>
  );
}

function CalibrationEntry({ calibration }: { calibration: CalibrationLine }) {
  const { done, from, until, by, certificate, unit, points, uncertainty, asFound, replacedBy, reason } = calibration;
  return (
    <Entry when={<time dateTime={done}>{done}</time>}>
      <div class="head">
        <b>
          {from} to {until}
        </b>
        {replacedBy !== null && <span class="soft">replaced by a later line</span>}
      </div>
      <p>
        {pointsWords(points, unit)}
        {uncertainty !== null && `; U = ${asWritten(uncertainty)} ${unit} (k = 2)`}
      </p>
      <p class="soft">
        {[
          by,
          certificate && `certificate ${certificate}`,
          asFound === null
            ? 'nobody looked at it as it came in'
            : asFound.outOfTolerance
              ? 'out of tolerance as it came in'
              : 'within tolerance as it came in',
          reason,
        ]
          .filter(Boolean)
          .join(' · ')}
      </p>
    </Entry>
  );
}
