import { vesselSurveysPath } from '../../server/contract/instrument-paths.ts';
import type { Survey, VesselSurveys as View } from '../../server/contract/surveys.ts';
import { useRead } from '../use-read.ts';
import { asWritten } from '../words/figures.ts';
import { Entry } from './notebook.tsx';
import { Shown } from './shown.tsx';
import { StandingMark } from './standing-mark.tsx';
import { SurveyForm } from './survey-form.tsx';

/** How evenly a vessel heats, how true its own sensor is, and where it may be used: what is on record and until when. */
export function VesselSurveys({ vessel }: { vessel: string }) {
  const reading = useRead<View>(vesselSurveysPath(vessel));
  return (
    <section class="section">
      <h2>Surveys</h2>
      <Shown reading={reading} what="Reading the surveys">
        {(view) => <Body view={view} again={reading.again} />}
      </Shown>
    </section>
  );
}

function Body({ view, again }: { view: View; again: () => void }) {
  const { survey, accuracy, surveys, accuracyTests, ranges } = view;
  const [range] = ranges;
  return (
    <>
      <p>
        Uniformity survey: <StandingMark standing={survey.standing} due={survey.due} />
      </p>
      <p>
        System accuracy test: <StandingMark standing={accuracy.standing} due={accuracy.due} />
      </p>
      <p>
        {range
          ? `Qualified from ${range.lowest} to ${range.highest} ${range.unit} (${range.document}).`
          : 'No qualified range is on record.'}
      </p>
      <ul class="entries">
        {surveys.map((one) => (
          <SurveyEntry key={one.id} survey={one} />
        ))}
        {accuracyTests.map((test) => (
          <Entry key={`test ${test.id}`} when={<time dateTime={test.done}>{test.done}</time>}>
            <div class="head">
              <b>Accuracy test, until {test.until}</b>
              {test.replacedBy !== null && <span class="soft">replaced by a later line</span>}
            </div>
            <p>
              {test.channel ?? 'Its sensor'} read {asWritten(test.difference)} {test.unit} from the test sensor
              {test.temperature !== null && ` at ${asWritten(test.temperature)} ${test.unit}`}.
            </p>
          </Entry>
        ))}
      </ul>
      <details>
        <summary>Write down a survey, a test or the range</summary>
        <SurveyForm view={view} onKept={again} />
      </details>
    </>
  );
}

function SurveyEntry({ survey }: { survey: Survey }) {
  const { done, until, zone, lowest, highest, uniformity, unit, certificate, replacedBy, reason } = survey;
  return (
    <Entry when={<time dateTime={done}>{done}</time>}>
      <div class="head">
        <b>Uniformity survey, until {until}</b>
        {replacedBy !== null && <span class="soft">replaced by a later line</span>}
      </div>
      <p>
        Within ±{asWritten(uniformity)} {unit} from {lowest} to {highest} {unit}. Zone: {zone}.
      </p>
      {(certificate || reason) && (
        <p class="soft">{[certificate && `certificate ${certificate}`, reason].filter(Boolean).join(' · ')}</p>
      )}
    </Entry>
  );
}
