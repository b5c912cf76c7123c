import { vesselAccuracyTestsPath, vesselRangePath, vesselSurveysPath } from '../../server/contract/instrument-paths.ts';
import type { VesselSurveys } from '../../server/contract/surveys.ts';
import { postJson } from '../api.ts';
import { useKeptForm } from '../kept-form.ts';
import { usePost } from '../use-post.ts';
import { EMPTY_SURVEY, requestOfSurvey, type SurveyText } from '../words/surveys.ts';
import { ChoiceField, TextField } from './field.tsx';
import { FigureField } from './figure-field.tsx';
import { Problem } from './problem.tsx';

const DAY = { pattern: '\\d{4}-\\d{2}-\\d{2}', title: 'A day, such as 2026-03-02', maxLength: 10 };
const PATHS = { survey: vesselSurveysPath, accuracy: vesselAccuracyTestsPath, range: vesselRangePath };

/** A survey, a test or the range of a vessel; a wrong survey or test is written again with why. */
export function SurveyForm({ view, onKept }: { view: VesselSurveys; onKept: () => void }) {
  const [form, setForm, { clear }] = useKeptForm<SurveyText>(`survey.${view.vessel}`, EMPTY_SURVEY);
  const change = (next: Partial<SurveyText>) => setForm({ ...form, ...next });
  const saving = usePost(async () => {
    await postJson<VesselSurveys>(PATHS[form.what](view.vessel), requestOfSurvey(form));
    clear();
    onKept();
  });
  const isRange = form.what === 'range';
  const rows = (form.what === 'survey' ? view.surveys : view.accuracyTests).filter(
    ({ replacedBy }) => replacedBy === null,
  );
  const asksWhy = isRange ? view.ranges.length > 0 : form.replaces !== '';
  return (
    <form
      class="stack"
      onSubmit={(event) => {
        event.preventDefault();
        void saving.post();
      }}
    >
      <div class="fields">
        <ChoiceField
          label="What"
          choices={[
            { value: 'survey', text: 'uniformity survey' },
            { value: 'accuracy', text: 'system accuracy test' },
            { value: 'range', text: 'qualified range' },
          ]}
          value={form.what}
          onValue={(what) => change({ what: what as SurveyText['what'], replaces: '' })}
        />
        {!isRange && (
          <>
            <TextField label="Done on" required {...DAY} value={form.done} onValue={(done) => change({ done })} />
            <TextField
              label="Holds until"
              hint="The last day it holds."
              required
              {...DAY}
              value={form.until}
              onValue={(until) => change({ until })}
            />
          </>
        )}
        <ChoiceField
          label="Unit"
          choices={['°C', '°F'].map((value) => ({ value, text: value }))}
          value={form.unit}
          onValue={(unit) => change({ unit: unit as SurveyText['unit'] })}
        />
        {form.what !== 'accuracy' && (
          <>
            <FigureField
              label={`From, ${form.unit}`}
              required
              value={form.lowest}
              onValue={(lowest) => change({ lowest })}
            />
            <FigureField
              label={`To, ${form.unit}`}
              required
              value={form.highest}
              onValue={(highest) => change({ highest })}
            />
          </>
        )}
        {form.what === 'survey' && (
          <TextField label="Zone" required maxLength={120} value={form.zone} onValue={(zone) => change({ zone })} />
        )}
        {!isRange && (
          <FigureField
            label={
              form.what === 'survey' ? `Uniformity ±, ${form.unit}` : `Its sensor less the test sensor, ${form.unit}`
            }
            required
            value={form.figure}
            onValue={(figure) => change({ figure })}
          />
        )}
        {form.what === 'accuracy' && (
          <TextField label="Channel" maxLength={120} value={form.channel} onValue={(channel) => change({ channel })} />
        )}
        {isRange ? (
          <TextField
            label="By which document"
            required
            maxLength={120}
            value={form.document}
            onValue={(document) => change({ document })}
          />
        ) : (
          <TextField
            label="Certificate"
            maxLength={400}
            value={form.certificate}
            onValue={(certificate) => change({ certificate })}
          />
        )}
        {!isRange && rows.length > 0 && (
          <ChoiceField
            label="Written"
            choices={[
              { value: '', text: 'as a new one' },
              ...rows.map(({ id, done }) => ({ value: String(id), text: `in the place of that of ${done}` })),
            ]}
            value={form.replaces}
            onValue={(replaces) => change({ replaces })}
          />
        )}
        {asksWhy && (
          <TextField
            label="Why it is written again"
            required
            maxLength={2000}
            value={form.reason}
            onValue={(reason) => change({ reason })}
          />
        )}
      </div>
      {saving.problem && <Problem problem={saving.problem} kept="What you typed is kept on this page." />}
      <button type="submit" class="primary" disabled={saving.isUnderWay}>
        Keep it
      </button>
    </form>
  );
}
