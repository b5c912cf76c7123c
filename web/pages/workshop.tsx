import { useState } from 'preact/hooks';
import { VESSELS_PATH, WORKSHOP_PATH } from '../../server/contract/paths.ts';
import type { AddVesselRequest, SetWorkshopRequest, Vessels, Workshop } from '../../server/contract/workshop.ts';
import { postJson } from '../api.ts';
import { usePageTitle } from '../page-title.ts';
import { ChoiceField, TextField } from '../parts/field.tsx';
import { Notebook, PageHead } from '../parts/notebook.tsx';
import { Problem } from '../parts/problem.tsx';
import { Shown } from '../parts/shown.tsx';
import { ShownToYou } from '../parts/shown-to-you.tsx';
import { Zones } from '../parts/zones.tsx';
import { usePost } from '../use-post.ts';
import { type Reading, useRead } from '../use-read.ts';
import { count } from '../words/figures.ts';
import { readWorkshop, workshop, workshopProblem } from '../workshop.ts';

/** What the workshop is called, its vessels, and how this person wants to see things. */
export function WorkshopPage() {
  usePageTitle('Workshop');
  const shop = workshop.value;
  const vessels = useRead<Vessels>(VESSELS_PATH);
  return (
    <Notebook>
      <PageHead title="Workshop" />
      <ShownToYou />
      {workshopProblem.value && <Problem problem={workshopProblem.value} again={() => void readWorkshop()} />}
      {shop && <About shop={shop} />}
      <VesselsSection vessels={vessels} />
      {shop && (
        <section class="section">
          <h2>Where files come in</h2>
          <p>
            {shop.watchedFolder
              ? `Finished files put into ${shop.watchedFolder} are taken in by themselves.`
              : 'No folder is watched. Files come in by hand, on the import page, or from the command line.'}
          </p>
          <p class="soft">
            What a program can ask for is described at <a href="/api/openapi.json">/api/openapi.json</a>.
          </p>
        </section>
      )}
    </Notebook>
  );
}

function About({ shop }: { shop: Workshop }) {
  const [form, setForm] = useState<SetWorkshopRequest>({ name: shop.name, zone: shop.zone, units: shop.units });
  const [isKept, setIsKept] = useState(false);
  const saving = usePost(async () => {
    workshop.value = await postJson<Workshop>(WORKSHOP_PATH, form);
    setIsKept(true);
  });
  const change = (next: Partial<SetWorkshopRequest>) => {
    setIsKept(false);
    setForm({ ...form, ...next });
  };
  const units = (key: keyof SetWorkshopRequest['units'], names: readonly string[]) => ({
    choices: names.map((name) => ({ value: name, text: name })),
    value: form.units[key],
    onValue: (value: string) => change({ units: { ...form.units, [key]: value } }),
  });
  const save = (event: Event) => {
    event.preventDefault();
    void saving.post();
  };
  return (
    <section class="section">
      <h2>The workshop</h2>
      <form class="stack" onSubmit={save}>
        <div class="fields">
          <TextField label="Name" required maxLength={120} value={form.name} onValue={(name) => change({ name })} />
          <TextField
            label="Zone of its clock"
            hint="As in the IANA list: Europe/Lisbon, America/Chicago"
            required
            list="zones"
            value={form.zone}
            onValue={(zone) => change({ zone })}
          />
          <ChoiceField label="Temperature" {...units('temperature', ['°C', '°F'])} />
          <ChoiceField label="Pressure" {...units('pressure', ['bar', 'kPa', 'MPa', 'psi'])} />
          <ChoiceField label="Vacuum" {...units('vacuum', ['bar', 'kPa', 'mbar', 'inHg', 'mmHg'])} />
        </div>
        <Zones />
        {saving.problem && <Problem problem={saving.problem} />}
        <div class="row">
          <button type="submit" disabled={saving.isUnderWay}>
            Keep
          </button>
          <span role="status">{isKept ? 'Kept.' : ''}</span>
        </div>
      </form>
    </section>
  );
}

const KINDS = ['autoclave', 'oven', 'press', 'heated-tool', 'heat-blanket'] as const;

function VesselsSection({ vessels }: { vessels: Reading<Vessels> }) {
  const [name, setName] = useState('');
  const [kind, setKind] = useState<AddVesselRequest['kind']>('oven');
  const adding = usePost(async () => {
    await postJson<Vessels>(VESSELS_PATH, { name: name.trim(), kind } satisfies AddVesselRequest);
    setName('');
    vessels.again();
    await readWorkshop();
  });
  const add = (event: Event) => {
    event.preventDefault();
    void adding.post();
  };
  return (
    <section class="section">
      <h2>Vessels</h2>
      <Shown reading={vessels} what="Reading the vessels">
        {({ vessels: list }) =>
          list.length === 0 ? (
            <p>None yet. Add the oven or autoclave your runs are cured in.</p>
          ) : (
            <ul class="entries">
              {list.map((vessel) => (
                <li class="entry" key={vessel.name}>
                  <div class="head">
                    <h3>{vessel.name}</h3>
                    <span class="soft">{vessel.kind.replace('-', ' ')}</span>
                    <a href={`/runs?${new URLSearchParams({ vessel: vessel.name })}`}>{count(vessel.runs, 'run')}</a>
                  </div>
                </li>
              ))}
            </ul>
          )
        }
      </Shown>
      <form class="stack section" onSubmit={add}>
        <div class="fields">
          <TextField label="Name of another vessel" required maxLength={120} value={name} onValue={setName} />
          <ChoiceField
            label="Kind"
            choices={KINDS.map((word) => ({ value: word, text: word.replace('-', ' ') }))}
            value={kind}
            onValue={(value) => setKind(value as AddVesselRequest['kind'])}
          />
        </div>
        {adding.problem && <Problem problem={adding.problem} />}
        <button type="submit" disabled={adding.isUnderWay}>
          Add vessel
        </button>
      </form>
    </section>
  );
}
