import { INSTRUMENTS_PATH } from '../../server/contract/instrument-paths.ts';
import type { InstrumentLine, Instruments, InstrumentView } from '../../server/contract/instruments.ts';
import { postJson } from '../api.ts';
import { useKeptForm } from '../kept-form.ts';
import { usePageTitle } from '../page-title.ts';
import { ChoiceField, TextField } from '../parts/field.tsx';
import { Entry, Notebook, PageHead } from '../parts/notebook.tsx';
import { Problem } from '../parts/problem.tsx';
import { Shown } from '../parts/shown.tsx';
import { StandingMark } from '../parts/standing-mark.tsx';
import { usePost } from '../use-post.ts';
import { useRead } from '../use-read.ts';
import {
  EMPTY_INSTRUMENT,
  type InstrumentForm,
  KIND_WORDS,
  placeWords,
  requestOfInstrument,
  whatItIs,
} from '../words/instruments.ts';

/** Every instrument: what is due, the soonest first. */
export default function InstrumentsPage() {
  usePageTitle('Instruments');
  const reading = useRead<Instruments>(INSTRUMENTS_PATH);
  return (
    <Notebook>
      <PageHead title="Instruments">
        <p class="soft">
          Thermocouples and gauges with their calibrations, the one due soonest first. A run is judged with the
          corrections of the calibration that held on its day. Parts and runs are also asked for by instrument on{' '}
          <a href="/ask">the page of questions</a>.
        </p>
      </PageHead>
      <Shown reading={reading} what="Reading the instruments">
        {({ instruments }) => (
          <>
            {instruments.length === 0 && (
              <div class="empty">
                <h2>No instrument is on record yet</h2>
                <p>
                  Write down the first by the code that stands on it, then its calibration, then which channel of which
                  vessel it reads. Where a cycle asks for calibration, a run is judged by it from then on.
                </p>
              </div>
            )}
            <ul class="entries">
              {instruments.map((line) => (
                <InstrumentEntry key={line.instrument} line={line} />
              ))}
            </ul>
            <NewInstrument onKept={reading.again} />
          </>
        )}
      </Shown>
    </Notebook>
  );
}

export function InstrumentEntry({ line }: { line: InstrumentLine }) {
  return (
    <Entry when={line.due && <time dateTime={line.due}>{line.due}</time>}>
      <div class="head">
        <a href={`/instruments/${encodeURIComponent(line.instrument)}`}>{line.instrument}</a>
        <StandingMark standing={line.standing} due={line.due} />
      </div>
      <p class="soft">
        {[whatItIs(line), line.places.length === 0 ? 'sits nowhere now' : line.places.map(placeWords).join(', ')].join(
          ' · ',
        )}
      </p>
    </Entry>
  );
}

function NewInstrument({ onKept }: { onKept: () => void }) {
  const [form, setForm, { clear }] = useKeptForm<InstrumentForm>('instrument', EMPTY_INSTRUMENT);
  const change = (next: Partial<InstrumentForm>) => setForm({ ...form, ...next });
  const saving = usePost(async () => {
    await postJson<InstrumentView>(INSTRUMENTS_PATH, requestOfInstrument(form));
    clear();
    onKept();
  });
  return (
    <details class="section">
      <summary>Write down an instrument</summary>
      <form
        class="stack"
        onSubmit={(event) => {
          event.preventDefault();
          void saving.post();
        }}
      >
        <div class="fields">
          <TextField
            label="Code on it"
            required
            maxLength={120}
            value={form.instrument}
            onValue={(instrument) => change({ instrument })}
          />
          <ChoiceField
            label="What it is"
            choices={Object.entries(KIND_WORDS).map(([value, text]) => ({ value, text }))}
            value={form.kind}
            onValue={(kind) => change({ kind: kind as InstrumentForm['kind'] })}
          />
          {form.kind === 'thermocouple' && (
            <ChoiceField
              label="Type"
              choices={['K', 'J', 'T', 'N', 'E'].map((value) => ({ value, text: value }))}
              value={form.type}
              onValue={(type) => change({ type })}
            />
          )}
          <TextField
            label="Maker’s number"
            maxLength={120}
            value={form.makerNumber}
            onValue={(makerNumber) => change({ makerNumber })}
          />
        </div>
        {saving.problem && <Problem problem={saving.problem} kept="What you typed is kept on this page." />}
        <button type="submit" class="primary" disabled={saving.isUnderWay}>
          Keep the instrument
        </button>
      </form>
    </details>
  );
}
