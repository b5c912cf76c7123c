import { instrumentCalibrationsPath } from '../../server/contract/instrument-paths.ts';
import type { InstrumentView } from '../../server/contract/instruments.ts';
import { postJson } from '../api.ts';
import { useKeptForm } from '../kept-form.ts';
import { usePost } from '../use-post.ts';
import { type CalibrationForm, emptyCalibration, requestOfCalibration } from '../words/instruments.ts';
import { AreaField, ChoiceField, TextField } from './field.tsx';
import { FigureField } from './figure-field.tsx';
import { Problem } from './problem.tsx';

const DAY = { pattern: '\\d{4}-\\d{2}-\\d{2}', title: 'A day, such as 2026-03-02', maxLength: 10 };
const UNITS = {
  thermocouple: ['°C', '°F'],
  pressure: ['bar', 'kPa', 'MPa', 'psi', 'bar abs', 'kPa abs', 'psi abs'],
  vacuum: ['bar', 'kPa', 'mbar', 'inHg', 'mmHg', 'mbar abs', 'kPa abs', 'torr abs'],
} as const;

/** A calibration as its certificate says it; or one written in the place of a wrong one. */
export function CalibrationFormView({ view, onKept }: { view: InstrumentView; onKept: () => void }) {
  const { instrument, kind } = view;
  const units = UNITS[kind];
  const [form, setForm, { clear }] = useKeptForm<CalibrationForm>(
    `calibration.${instrument}`,
    emptyCalibration(units[0]),
  );
  const change = (next: Partial<CalibrationForm>) => setForm({ ...form, ...next });
  const saving = usePost(async () => {
    await postJson<InstrumentView>(instrumentCalibrationsPath(instrument), requestOfCalibration(form));
    clear();
    onKept();
  });
  const standing = view.calibrations.filter(({ replacedBy }) => replacedBy === null);
  return (
    <form
      class="stack"
      onSubmit={(event) => {
        event.preventDefault();
        void saving.post();
      }}
    >
      <div class="fields">
        <TextField label="Done on" required {...DAY} value={form.done} onValue={(done) => change({ done })} />
        <TextField
          label="Holds until"
          hint="The last day it holds."
          required
          {...DAY}
          value={form.until}
          onValue={(until) => change({ until })}
        />
        <TextField label="Done by" required maxLength={120} value={form.by} onValue={(by) => change({ by })} />
        <TextField
          label="Certificate"
          maxLength={400}
          value={form.certificate}
          onValue={(certificate) => change({ certificate })}
        />
        <ChoiceField
          label="Unit"
          choices={units.map((value) => ({ value, text: value }))}
          value={form.unit}
          onValue={(unit) => change({ unit })}
        />
        <FigureField
          label={`Expanded uncertainty U (k = 2), ${form.unit}`}
          value={form.uncertainty}
          onValue={(uncertainty) => change({ uncertainty })}
        />
        <AreaField
          label="Corrections"
          hint="A reading and what is added to it on each line: 180 −0.6. Empty: it needs none."
          rows={4}
          value={form.points}
          onValue={(points) => change({ points })}
        />
        <ChoiceField
          label="As it came in"
          choices={[
            { value: '', text: 'nobody looked' },
            { value: 'in', text: 'within its tolerance' },
            { value: 'out', text: 'out of tolerance' },
          ]}
          value={form.found}
          onValue={(found) => change({ found: found as CalibrationForm['found'] })}
        />
        {form.found === 'out' && (
          <AreaField
            label="What would have corrected it as it came in"
            hint="A reading and what would have been added on each line: 180 −4.2. Runs are judged again with it, if asked."
            rows={3}
            required
            value={form.foundPoints}
            onValue={(foundPoints) => change({ foundPoints })}
          />
        )}
        {standing.length > 0 && (
          <ChoiceField
            label="Written"
            choices={[
              { value: '', text: 'as a new calibration' },
              ...standing.map(({ id, done }) => ({ value: String(id), text: `in the place of that of ${done}` })),
            ]}
            value={form.replaces}
            onValue={(replaces) => change({ replaces })}
          />
        )}
        {form.replaces !== '' && (
          <TextField
            label="Why it is corrected"
            required
            maxLength={2000}
            value={form.reason}
            onValue={(reason) => change({ reason })}
          />
        )}
      </div>
      {saving.problem && <Problem problem={saving.problem} kept="What you typed is kept on this page." />}
      <button type="submit" class="primary" disabled={saving.isUnderWay}>
        Keep the calibration
      </button>
    </form>
  );
}
