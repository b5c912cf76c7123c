import { useState } from 'preact/hooks';
import { withQuery } from '../../server/contract/paths.ts';
import type { PartDanger, SetWhereaboutsRequest } from '../../server/contract/trace.ts';
import { partWhereaboutsPath } from '../../server/contract/trace-paths.ts';
import { postJson } from '../api.ts';
import { usePost } from '../use-post.ts';
import { useRead } from '../use-read.ts';
import { wallClock } from '../words/clock.ts';
import { whereWords } from '../words/trace.ts';
import { zone } from '../workshop.ts';
import { ChoiceField, TextField } from './field.tsx';
import { Problem } from './problem.tsx';
import { Shown } from './shown.tsx';

/** Where a part is, the hold lists it is on, and the way from a failed part to everything else in danger. */
export function PartDangerSection({ serial, hasFailed }: { serial: string; hasFailed: boolean }) {
  const reading = useRead<PartDanger>(partWhereaboutsPath(serial));
  return (
    <section class="section">
      <h2>Where it is</h2>
      {hasFailed && (
        <p>
          <a class="button" href={withQuery('/trace', { failed: serial })}>
            This part failed: what else is in danger
          </a>
        </p>
      )}
      <Shown reading={reading} what="Reading where it is">
        {({ whereabouts, earlier, holds }) => (
          <>
            <p>{whereWords(whereabouts)}.</p>
            {earlier.map((where) => (
              <p class="soft" key={where.deed.at}>
                Before: {whereWords(where)}.
              </p>
            ))}
            {holds.map(({ hold, why }) => (
              <p key={hold}>
                On <a href={`/trace/holds/${hold}`}>hold list {hold}</a>: {why}
              </p>
            ))}
            <details class="section">
              <summary>Write down where it is</summary>
              <WhereForm serial={serial} onKept={reading.again} />
            </details>
          </>
        )}
      </Shown>
    </section>
  );
}

function WhereForm({ serial, onKept }: { serial: string; onKept: () => void }) {
  const [place, setPlace] = useState<SetWhereaboutsRequest['place']>('shipped');
  const [customer, setCustomer] = useState('');
  const [since, setSince] = useState(() => wallClock(Date.now(), zone.value).slice(0, 10));
  const keeping = usePost(async () => {
    const request: SetWhereaboutsRequest = { place, since, customer: place === 'shipped' ? customer : null };
    await postJson<PartDanger>(partWhereaboutsPath(serial), request);
    onKept();
  });
  const keep = (event: Event) => {
    event.preventDefault();
    void keeping.post();
  };
  return (
    <form class="stack section" onSubmit={keep}>
      <div class="fields">
        <ChoiceField
          label="Place"
          choices={[
            { value: 'shipped', text: 'Shipped' },
            { value: 'in-shop', text: 'In the shop' },
          ]}
          value={place}
          onValue={(value) => setPlace(value as SetWhereaboutsRequest['place'])}
        />
        {place === 'shipped' && (
          <TextField label="To whom" required maxLength={120} value={customer} onValue={setCustomer} />
        )}
        <TextField
          label="Since"
          hint="2026-03-01"
          pattern="\d{4}-\d{2}-\d{2}"
          required
          value={since}
          onValue={setSince}
        />
      </div>
      {keeping.problem && <Problem problem={keeping.problem} kept="What you typed is kept on this page." />}
      <button type="submit" disabled={keeping.isUnderWay}>
        Write it down
      </button>
    </form>
  );
}
