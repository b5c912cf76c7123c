import { useState } from 'preact/hooks';
import { useLocation } from 'preact-iso';
import type { LayupView } from '../../server/contract/layups.ts';
import { partLayupPath, TOOLS_PATH } from '../../server/contract/paths.ts';
import type { Tools } from '../../server/contract/tools.ts';
import { postJson } from '../api.ts';
import { useKeptForm } from '../kept-form.ts';
import { usePost } from '../use-post.ts';
import { useRead } from '../use-read.ts';
import { formLike, formOfLayup, hasTimes, type LayupForm, needsFraction, requestOfLayup } from '../words/layup-form.ts';
import { shownUnits, zone } from '../workshop.ts';
import { TextField } from './field.tsx';
import { FigureField } from './figure-field.tsx';
import { LayupDebulks } from './layup-debulks.tsx';
import { LayupLaminate } from './layup-laminate.tsx';
import { Problem } from './problem.tsx';

/** A part's lay-up as one form; what is left empty is not on record, and says so. */
export function LayupFormView({ view }: { view: LayupView }) {
  const { route } = useLocation();
  const units = shownUnits.value;
  const [form, setForm, { clear, found }] = useKeptForm<LayupForm>(
    `layup.${view.serial}`,
    formOfLayup(view, zone.value, units.temperature),
  );
  const tools = useRead<Tools>(TOOLS_PATH).value?.tools ?? [];
  const change = (next: Partial<LayupForm>) => setForm({ ...form, ...next });
  const saving = usePost(async () => {
    await postJson<LayupView>(partLayupPath(view.serial), requestOfLayup(form, zone.value, units));
    clear();
    route(`/parts/${encodeURIComponent(view.serial)}`);
  });
  const areTimesSound = hasTimes(form, zone.value);
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
      <Similar view={view} form={form} onTake={(like) => setForm(like)} />
      <section>
        <h2>Part</h2>
        <div class="fields">
          <TextField label="What it is" maxLength={200} value={form.title} onValue={(title) => change({ title })} />
          <TextField label="Drawing" maxLength={120} value={form.drawing} onValue={(drawing) => change({ drawing })} />
          <TextField
            label="Issue of the drawing"
            maxLength={40}
            value={form.drawingIssue}
            onValue={(drawingIssue) => change({ drawingIssue })}
          />
          <TextField label="Tool" maxLength={120} list="tools" value={form.tool} onValue={(tool) => change({ tool })} />
          <datalist id="tools">
            {tools.map(({ code, record }) => (
              <option key={code} value={code} label={record?.title ?? code} />
            ))}
          </datalist>
          <FigureField
            label="Thickness when cured, mm"
            hint="At the thickest place that is cured in one go"
            value={form.thicknessMm}
            onValue={(thicknessMm) => change({ thicknessMm })}
          />
          <FigureField label="Plies" value={form.plies} onValue={(plies) => change({ plies })} />
          <TextField
            label="Work order"
            maxLength={120}
            value={form.workOrder}
            onValue={(workOrder) => change({ workOrder })}
          />
          <TextField
            label="Customer"
            maxLength={200}
            value={form.customer}
            onValue={(customer) => change({ customer })}
          />
        </div>
      </section>
      <LayupLaminate form={form} onChange={change} />
      <section class="section">
        <h2>Room</h2>
        <div class="fields">
          <TextField
            label={`Lay-up began, in ${zone.value}`}
            type="datetime-local"
            value={form.beganAt}
            onValue={(beganAt) => change({ beganAt })}
          />
          <TextField
            label={`Lay-up ended, in ${zone.value}`}
            type="datetime-local"
            value={form.endedAt}
            onValue={(endedAt) => change({ endedAt })}
          />
          <FigureField
            label={`Temperature of the room, ${units.temperature}`}
            value={form.room}
            onValue={(room) => change({ room })}
          />
          <FigureField
            label="Relative humidity, %"
            value={form.humidity}
            onValue={(humidity) => change({ humidity })}
          />
        </div>
      </section>
      <LayupDebulks form={form} vacuumUnit={units.vacuum} onChange={change} />
      <section class="section stack">
        {view.layup && (
          <TextField
            label="Why the lay-up is written again"
            required
            maxLength={2000}
            value={form.reason}
            onValue={(reason) => change({ reason })}
          />
        )}
        {!areTimesSound && <p class="wrong">One of the times does not exist in the shop’s zone.</p>}
        {saving.problem && <Problem problem={saving.problem} kept="What you typed is kept on this page." />}
        <button type="submit" class="primary" disabled={saving.isUnderWay || !areTimesSound || needsFraction(form)}>
          Keep the lay-up
        </button>
      </section>
    </form>
  );
}

/** The last part like this one, by the drawing and tool that stand in the form now. */
function Similar({ view, form, onTake }: { view: LayupView; form: LayupForm; onTake: (form: LayupForm) => void }) {
  const [taken, setTaken] = useState<string | null>(null);
  const { drawing, tool } = form;
  const isAsRead = drawing === (view.drawing ?? '') && tool === (view.tool ?? '');
  const asked = useRead<LayupView>(isAsRead ? null : partLayupPath(view.serial, { drawing, tool })).value;
  const similar = (isAsRead ? view : asked)?.similar ?? null;
  if (taken !== null) {
    return <p class="notice">Filled in as {taken} was. Look through it: times and room are this part’s own.</p>;
  }
  if (similar === null) return null;
  const take = () => {
    onTake(formLike(form, similar, shownUnits.value.temperature));
    setTaken(similar.serial);
  };
  return (
    <div class="notice row">
      <p>
        <a href={`/parts/${encodeURIComponent(similar.serial)}`}>{similar.serial}</a> was laid up last{' '}
        {similar.shares.includes('drawing') ? 'by the same drawing' : ''}
        {similar.shares.length === 2 ? ' and ' : ''}
        {similar.shares.includes('tool') ? 'on the same tool' : ''}.
      </p>
      <button type="button" onClick={take}>
        Fill in as {similar.serial}
      </button>
    </div>
  );
}
