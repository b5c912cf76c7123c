import { useLocation } from 'preact-iso';
import type { Cycles, CycleView } from '../../server/contract/cycles.ts';
import { CYCLES_PATH, cyclePath, runLoadPath, VESSELS_PATH } from '../../server/contract/paths.ts';
import type { RunView } from '../../server/contract/runs.ts';
import type { Vessels } from '../../server/contract/workshop.ts';
import { postJson } from '../api.ts';
import { useKeptForm } from '../kept-form.ts';
import { usePost } from '../use-post.ts';
import { useRead } from '../use-read.ts';
import { formOfRun, type LoadForm, requestOfForm } from '../words/load-form.ts';
import { ChoiceField, TextField } from './field.tsx';
import { LoadParts } from './load-parts.tsx';
import { LoadSensors } from './load-sensors.tsx';
import { Problem } from './problem.tsx';

/** The load of a run as one form, top to bottom in the order it is known at the vessel. */
export function LoadFormView({ run }: { run: RunView }) {
  const { route } = useLocation();
  const [form, setForm, { clear, found }] = useKeptForm<LoadForm>(`load.${run.run}`, formOfRun(run));
  const vessels = useRead<Vessels>(VESSELS_PATH).value?.vessels ?? [];
  const cycles = useRead<Cycles>(CYCLES_PATH).value?.cycles ?? [];
  const [code = '', issue = ''] = form.cycle.split('\t');
  const cycle = useRead<CycleView>(code === '' ? null : cyclePath(code, issue)).value?.document ?? null;
  const change = (next: Partial<LoadForm>) => setForm({ ...form, ...next });
  const saving = usePost(async () => {
    await postJson<RunView>(runLoadPath(run.run), requestOfForm(form, run.load));
    clear();
    route(`/runs/${run.run}`);
  });
  const offered = cycles.filter((line) => line.status !== 'withdrawn' || (line.code === code && line.issue === issue));
  const save = (event: Event) => {
    event.preventDefault();
    void saving.post();
  };
  return (
    <form class="load" onSubmit={save}>
      {found && (
        <div class="notice">
          <p>What you typed here before is still here.</p>
          <button type="button" class="link" onClick={clear}>
            Start again from what is on record
          </button>
        </div>
      )}
      <section>
        <h2>Run</h2>
        <div class="fields">
          <ChoiceField
            label="Cycle it was cured to"
            choices={[
              { value: '', text: 'not known yet' },
              ...offered.map((line) => ({
                value: `${line.code}\t${line.issue}`,
                text: `${line.code} issue ${line.issue}${line.status === 'released' ? '' : ` (${line.status})`}: ${line.title}`,
              })),
            ]}
            value={form.cycle}
            onValue={(value) => change({ cycle: value })}
            hint={
              cycles.length === 0 ? (
                <>
                  None is on record; <a href="/cycles/import">bring one in</a>.
                </>
              ) : undefined
            }
          />
          <ChoiceField
            label="Vessel"
            choices={[{ value: '', text: 'not said' }, ...vessels.map(({ name }) => ({ value: name, text: name }))]}
            value={form.vessel}
            onValue={(vessel) => change({ vessel })}
          />
          <TextField label="Work order" value={form.workOrder} onValue={(workOrder) => change({ workOrder })} />
          <TextField
            label="Barometer"
            hint="With its unit, as read: 1009 mbar. Needed where gauge and absolute figures are compared."
            value={form.barometer}
            onValue={(barometer) => change({ barometer })}
          />
        </div>
      </section>
      <LoadParts form={form} run={run} cycle={cycle} onChange={change} />
      <LoadSensors form={form} run={run} cycle={cycle} onChange={change} />
      <section class="section stack">
        {run.load && (
          <TextField
            label="Why the load is set again"
            required
            maxLength={2000}
            value={form.reason}
            onValue={(reason) => change({ reason })}
          />
        )}
        {saving.problem && <Problem problem={saving.problem} kept="What you typed is kept on this page." />}
        <button type="submit" class="primary" disabled={saving.isUnderWay || form.parts.length === 0}>
          {saving.isUnderWay ? 'Judging the run …' : 'Keep the load and judge the run'}
        </button>
        {form.parts.length === 0 && <p class="soft">Name at least one part.</p>}
      </section>
    </form>
  );
}
