import { useState } from 'preact/hooks';
import { SOURCE_KINDS, type SourceKind } from '../../models/log/live-source.ts';
import type { SetSourceRequest, SourceView, Tried } from '../../server/contract/live.ts';
import { vesselSourcesTryPath } from '../../server/contract/paths.ts';
import { postJson } from '../api.ts';
import { usePost } from '../use-post.ts';
import { asWritten, figure } from '../words/figures.ts';
import { SOURCE_KIND_WORDS } from '../words/live.ts';
import { documentOfForm, type SourceForm } from '../words/source-form.ts';
import { workshop } from '../workshop.ts';
import { ChoiceField, TextField } from './field.tsx';
import { Problem } from './problem.tsx';
import { SourceChannels } from './source-channels.tsx';
import { SourcePlaces } from './source-fields.tsx';
import { Wide } from './wide.tsx';

const UNITS = [
  '°C',
  '°F',
  'bar',
  'mbar',
  'kPa',
  'MPa',
  'psi',
  'inHg',
  'mmHg',
  'torr',
  'bar abs',
  'mbar abs',
  'kPa abs',
];

/** Sets up a source on screen; "read it now" shows what would come before anything is saved. */
export function SourceFormView({
  vessel,
  start,
  path,
  onSaved,
}: {
  vessel: string;
  start: SourceForm;
  /** Where the settings are posted. */
  path: string;
  onSaved: (source: SourceView) => void;
}) {
  const [form, setForm] = useState(start);
  const [tried, setTried] = useState<Tried | null>(null);
  const change = (next: Partial<SourceForm>) => {
    setTried(null);
    setForm({ ...form, ...next });
  };
  const request = (): SetSourceRequest =>
    ({
      document: documentOfForm(form),
      ...(form.kind === 'mqtt' && form.password !== '' ? { password: form.password } : {}),
    }) as SetSourceRequest;
  const trying = usePost(async () => setTried(await postJson<Tried>(vesselSourcesTryPath(vessel), request())));
  const saving = usePost(async () => onSaved(await postJson<SourceView>(path, request())));
  const kinds = SOURCE_KINDS.filter((kind) => kind !== 'practice' || workshop.value?.practice);
  const isPolled = form.kind !== 'push' && form.kind !== 'gauge';
  return (
    <form
      class="stack source-form"
      onSubmit={(event) => {
        event.preventDefault();
        void saving.post();
      }}
    >
      <div class="fields">
        <ChoiceField
          label="How readings come"
          choices={kinds.map((kind) => ({ value: kind, text: SOURCE_KIND_WORDS[kind] }))}
          value={form.kind}
          onValue={(kind) => change({ kind: kind as SourceKind })}
        />
        <TextField
          label="Name of the source"
          required
          maxLength={120}
          value={form.name}
          onValue={(name) => change({ name })}
        />
        <TextField
          label="Seconds between scans"
          hint="Silent for longer than five of them is told"
          required
          inputMode="decimal"
          value={form.intervalS}
          onValue={(intervalS) => change({ intervalS })}
        />
        <SourcePlaces form={form} onChange={change} />
      </div>
      <section>
        <h3>Channels</h3>
        <SourceChannels form={form} onChange={change} />
        <datalist id="source-units">
          {UNITS.map((unit) => (
            <option key={unit} value={unit} />
          ))}
        </datalist>
      </section>
      {trying.problem && <Problem problem={trying.problem} kept="Nothing was saved." />}
      {tried && <WhatCame tried={tried} />}
      {saving.problem && <Problem problem={saving.problem} kept="What you typed is kept on this page." />}
      <div class="row">
        {isPolled && (
          <button type="button" disabled={trying.isUnderWay} onClick={() => void trying.post()}>
            {trying.isUnderWay ? 'Reading …' : 'Read it now'}
          </button>
        )}
        <button type="submit" class="primary" disabled={saving.isUnderWay}>
          Save and listen
        </button>
      </div>
      {form.kind === 'push' && (
        <p class="soft">A sender posts to /api/push with a key of this vessel; keys are made below.</p>
      )}
    </form>
  );
}

/** One reading, raw beside scaled. */
function WhatCame({ tried }: { tried: Tried }) {
  return (
    <section aria-live="polite">
      <h3>What came</h3>
      <Wide label="What came, raw beside scaled">
        <table>
          <thead>
            <tr>
              <th scope="col">Channel</th>
              <th scope="col" class="figure-cell">
                Raw
              </th>
              <th scope="col" class="figure-cell">
                Scaled
              </th>
              <th scope="col">Why not</th>
            </tr>
          </thead>
          <tbody>
            {tried.channels.map((one) => (
              <tr key={one.channel}>
                <th scope="row">{one.channel}</th>
                <td class="figure-cell">{one.raw === null ? '–' : asWritten(Number(one.raw.toPrecision(8)))}</td>
                <td class="figure-cell">{figure(one.value, one.unit)}</td>
                <td>{one.because ?? ''}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </Wide>
    </section>
  );
}
