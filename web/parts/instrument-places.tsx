import { instrumentPlacesPath, instrumentTakeOffPath } from '../../server/contract/instrument-paths.ts';
import type { InstrumentPlace, InstrumentView } from '../../server/contract/instruments.ts';
import { postJson } from '../api.ts';
import { useKeptForm } from '../kept-form.ts';
import { usePost } from '../use-post.ts';
import { type PlaceForm, placeWords, requestOfPlace } from '../words/instruments.ts';
import { ChoiceField, TextField } from './field.tsx';
import { Entry } from './notebook.tsx';
import { Problem } from './problem.tsx';
import { When } from './when.tsx';

/** Which channel it sits on and sat on; one tap takes it off, a line places it. */
export function InstrumentPlaces({ view, onKept }: { view: InstrumentView; onKept: () => void }) {
  const standing = view.allPlaces.filter((place) => place.replacedBy === null && !place.void);
  return (
    <section class="section">
      <h2>Where it sits</h2>
      {standing.length === 0 && <p class="soft">On no channel yet. Until it does, no run rests on its calibration.</p>}
      <ul class="entries">
        {standing.map((place) => (
          <PlaceEntry key={place.id} instrument={view.instrument} place={place} onKept={onKept} />
        ))}
      </ul>
      <PlaceNow instrument={view.instrument} onKept={onKept} />
    </section>
  );
}

function PlaceEntry({ instrument, place, onKept }: { instrument: string; place: InstrumentPlace; onKept: () => void }) {
  const taking = usePost(async () => {
    const request = { at: new Date().toISOString(), reason: 'taken off' };
    await postJson<InstrumentView>(instrumentTakeOffPath(instrument, place.id), request);
    onKept();
  });
  return (
    <Entry when={<When at={place.from} />}>
      <div class="head">
        <span>{placeWords(place)}</span>
        {place.until === null ? (
          <button type="button" class="quiet" disabled={taking.isUnderWay} onClick={() => void taking.post()}>
            Taken off now
          </button>
        ) : (
          <span class="soft">
            until <When at={place.until} />
          </span>
        )}
      </div>
      {place.reason && <p class="soft">{place.reason}</p>}
      {taking.problem && <Problem problem={taking.problem} />}
    </Entry>
  );
}

const EMPTY: PlaceForm = { kind: 'vessel', name: '', channel: '' };

function PlaceNow({ instrument, onKept }: { instrument: string; onKept: () => void }) {
  const [form, setForm, { clear }] = useKeptForm<PlaceForm>(`place.${instrument}`, EMPTY);
  const change = (next: Partial<PlaceForm>) => setForm({ ...form, ...next });
  const saving = usePost(async () => {
    await postJson<InstrumentView>(instrumentPlacesPath(instrument), requestOfPlace(form, Date.now()));
    clear();
    onKept();
  });
  return (
    <details>
      <summary>It sits somewhere from now on</summary>
      <form
        class="stack"
        onSubmit={(event) => {
          event.preventDefault();
          void saving.post();
        }}
      >
        <div class="fields">
          <ChoiceField
            label="On a channel of"
            choices={[
              { value: 'vessel', text: 'a vessel, whatever records it' },
              { value: 'recorder', text: 'a recorder' },
              { value: 'source', text: 'a live source' },
            ]}
            value={form.kind}
            onValue={(kind) => change({ kind: kind as PlaceForm['kind'] })}
          />
          <TextField label="Its name" required maxLength={120} value={form.name} onValue={(name) => change({ name })} />
          <TextField
            label="Channel"
            hint="What sat there until now is taken off."
            required
            maxLength={120}
            value={form.channel}
            onValue={(channel) => change({ channel })}
          />
        </div>
        {saving.problem && <Problem problem={saving.problem} kept="What you typed is kept on this page." />}
        <button type="submit" class="primary" disabled={saving.isUnderWay}>
          It sits there now
        </button>
      </form>
    </details>
  );
}
