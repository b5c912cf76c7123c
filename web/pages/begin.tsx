import { useLocation, useRoute } from 'preact-iso';
import type { Cycles, CycleView } from '../../server/contract/cycles.ts';
import type { LiveVessel } from '../../server/contract/live.ts';
import { CYCLES_PATH, cyclePath, vesselRunsPath } from '../../server/contract/paths.ts';
import type { RunView } from '../../server/contract/runs.ts';
import { postJson } from '../api.ts';
import { useKeptForm } from '../kept-form.ts';
import { usePageTitle } from '../page-title.ts';
import { Advisory } from '../parts/advisory.tsx';
import { BeginChecks } from '../parts/begin-checks.tsx';
import { BeginCycle } from '../parts/begin-cycle.tsx';
import { BeginParts } from '../parts/begin-parts.tsx';
import { BeginSensors } from '../parts/begin-sensors.tsx';
import { BeginWhen } from '../parts/begin-when.tsx';
import { TextField } from '../parts/field.tsx';
import { isNewsOld } from '../parts/line-state.tsx';
import { PageHead } from '../parts/notebook.tsx';
import { Problem } from '../parts/problem.tsx';
import { Waiting } from '../parts/waiting.tsx';
import { useLiveVessels } from '../use-live-vessels.ts';
import { useNow } from '../use-now.ts';
import { usePost } from '../use-post.ts';
import { useRead } from '../use-read.ts';
import { type BeginForm, beginRequest, EMPTY_BEGIN } from '../words/begin-form.ts';
import { isAttachable } from '../words/load-form.ts';
import { zone } from '../workshop.ts';

/** Loading a vessel and beginning its run: top to bottom in the order it is done at the door, with gloves on. */
export default function BeginPage() {
  const { params } = useRoute();
  const name = params.vessel ?? '';
  usePageTitle(`Begin a run in ${name}`);
  const heard = useLiveVessels();
  const vessel = heard.value?.vessels.find((one) => one.vessel === name);
  const isOld = isNewsOld(heard.isHeard, heard.heardMs, useNow(5000));
  return (
    <div class="live begin">
      <PageHead
        title={
          <>
            Begin a run in <a href={`/vessels/${encodeURIComponent(name)}`}>{name}</a>
          </>
        }
      >
        <Advisory />
      </PageHead>
      {heard.problem && <Problem problem={heard.problem} />}
      {!heard.value && !heard.problem && <Waiting what="Reading the vessel" />}
      {heard.value && !vessel && <p>No vessel of that name is on record.</p>}
      {vessel && <Body key={name} vessel={vessel} isOld={isOld} />}
    </div>
  );
}

function Body({ vessel, isOld }: { vessel: LiveVessel; isOld: boolean }) {
  if (vessel.run) {
    return (
      <div class="notice amber">
        <h2>A run is open in it</h2>
        <p>One vessel logs one run at a time. End and close this one first.</p>
        <a class="button primary" href={`/runs/${vessel.run.run}`}>
          To run {vessel.run.run}
        </a>
      </div>
    );
  }
  if (vessel.sources.length === 0) {
    return (
      <div class="empty">
        <h2>Nothing sends readings of it yet</h2>
        <p>Say first what it is read by: a recorder that pushes, Modbus, MQTT, a folder, or a gauge.</p>
        <a class="button" href={`/vessels/${encodeURIComponent(vessel.vessel)}`}>
          Add a source
        </a>
      </div>
    );
  }
  return <Loading vessel={vessel} isOld={isOld} />;
}

function Loading({ vessel, isOld }: { vessel: LiveVessel; isOld: boolean }) {
  const { route } = useLocation();
  const [form, setForm, { clear, found }] = useKeptForm<BeginForm>(`begin.${vessel.vessel}`, EMPTY_BEGIN);
  const cycles = useRead<Cycles>(CYCLES_PATH).value?.cycles ?? [];
  const [code = '', issue = ''] = form.cycle.split('\t');
  const cycle = useRead<CycleView>(code === '' ? null : cyclePath(code, issue)).value?.document ?? null;
  const judgedBy = cycle?.judgedBy ?? 'part';
  const sensors = vessel.readings.filter((reading) => isAttachable(reading, judgedBy));
  const bagLines = vessel.readings.filter(({ role }) => role === 'vacuum').map(({ channel }) => channel);
  const request = beginRequest(form, zone.value);
  const isWrong = form.fromEarlier && request.from === undefined;
  const beginning = usePost(async () => {
    const { run } = await postJson<RunView>(vesselRunsPath(vessel.vessel), request);
    clear();
    route(`/runs/${run}`);
  });
  return (
    <form
      onSubmit={(event) => {
        event.preventDefault();
        if (!isWrong) void beginning.post();
      }}
    >
      {found && (
        <div class="notice">
          <p>What was entered here before is still here.</p>
          <button type="button" class="link" onClick={clear}>
            Start again with nothing
          </button>
        </div>
      )}
      <BeginCycle cycles={cycles} value={form.cycle} onValue={(value) => setForm({ ...form, cycle: value })} />
      <BeginParts form={form} cycle={cycle} bagLines={bagLines} onForm={setForm} />
      <BeginSensors form={form} sensors={sensors} isOld={isOld} onForm={setForm} />
      <details class="section">
        <summary>Work order, barometer</summary>
        <div class="fields">
          <TextField
            label="Work order"
            maxLength={120}
            value={form.workOrder}
            onValue={(workOrder) => setForm({ ...form, workOrder })}
          />
          <TextField
            label="Barometer"
            hint="With its unit: 1009 mbar. Needed where gauge and absolute figures are compared."
            value={form.barometer}
            onValue={(barometer) => setForm({ ...form, barometer })}
          />
        </div>
      </details>
      <BeginWhen form={form} sources={vessel.sources} onForm={setForm} />
      <BeginChecks vessel={vessel.vessel} request={request} />
      <section class="section stack">
        {beginning.problem && <Problem problem={beginning.problem} kept="What was entered is kept on this page." />}
        {form.parts.length === 0 && (
          <p class="soft">Without a part it begins all the same; the load can be said later, and it is judged then.</p>
        )}
        <button type="submit" class="primary begin-button" disabled={beginning.isUnderWay || isWrong}>
          {beginning.isUnderWay ? 'Beginning …' : 'Begin the run'}
        </button>
      </section>
    </form>
  );
}
