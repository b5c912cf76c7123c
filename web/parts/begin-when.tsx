import type { SourceLine } from '../../server/contract/live.ts';
import type { BeginForm } from '../words/begin-form.ts';
import { dayAndClock, wallClock } from '../words/clock.ts';
import { instantIn } from '../words/typed.ts';
import { zone } from '../workshop.ts';
import { TextField } from './field.tsx';

/** Since when the run counts: from now, or from an earlier instant whose scans are still kept. */
export function BeginWhen({
  form,
  sources,
  onForm,
}: {
  form: BeginForm;
  sources: readonly SourceLine[];
  onForm: (next: BeginForm) => void;
}) {
  const kept = sources.flatMap(({ keptFrom }) => (keptFrom === null ? [] : [keptFrom])).toSorted()[0];
  const isWrong = form.fromEarlier && instantIn(form.from, zone.value) === null;
  const earlier = () =>
    onForm({ ...form, fromEarlier: true, from: form.from || wallClock(Date.now() - 60 * 60_000, zone.value) });
  return (
    <section class="section">
      <h2>From when it counts</h2>
      <fieldset class="taps">
        <legend class="unseen">From when it counts</legend>
        <button
          type="button"
          class="quiet"
          aria-pressed={!form.fromEarlier}
          onClick={() => onForm({ ...form, fromEarlier: false })}
        >
          From now
        </button>
        <button type="button" class="quiet" aria-pressed={form.fromEarlier} onClick={earlier}>
          From earlier
        </button>
      </fieldset>
      {form.fromEarlier && (
        <div class="fields section">
          <TextField
            label="Began at"
            type="datetime-local"
            step={1}
            value={form.from}
            wrong={isWrong ? 'This time does not exist in the shop’s zone.' : null}
            hint={kept ? `Scans are kept since ${dayAndClock(kept, zone.value)}.` : 'No scan is kept yet.'}
            onValue={(from) => onForm({ ...form, from })}
          />
        </div>
      )}
    </section>
  );
}
