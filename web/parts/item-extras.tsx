import { useState } from 'preact/hooks';
import type { ExtendLifeRequest, ItemView } from '../../server/contract/materials.ts';
import { itemEventsPath, itemExtensionsPath } from '../../server/contract/paths.ts';
import { postJson } from '../api.ts';
import { usePost } from '../use-post.ts';
import { instantOfWallClock } from '../words/clock.ts';
import { zone } from '../workshop.ts';
import { ChoiceField, TextField } from './field.tsx';
import { Problem } from './problem.tsx';

/** What is seldom done to a roll or kit, and is not undone by a tap. */
export function ItemExtras({ view, onDone }: { view: ItemView; onDone: () => void }) {
  return (
    <section class="section no-print">
      <details>
        <summary>Extend a life after re-test</summary>
        <ExtendForm item={view.item} onDone={onDone} />
      </details>
      <details>
        <summary>Scrap what is left of it</summary>
        <ScrapForm item={view.item} onDone={onDone} />
      </details>
    </section>
  );
}

const EMPTY = { life: 'out-life', lifeDays: '', until: '', authority: '', tests: '', reason: '' };

function ExtendForm({ item, onDone }: { item: string; onDone: () => void }) {
  const [form, setForm] = useState(EMPTY);
  const change = (next: Partial<typeof EMPTY>) => setForm({ ...form, ...next });
  const untilMs = instantOfWallClock(form.until, zone.value);
  const extending = usePost(async () => {
    const isOut = form.life === 'out-life';
    const request: ExtendLifeRequest = {
      life: isOut ? 'out-life' : 'shelf-life',
      ...(isOut ? { lifeDays: Number(form.lifeDays.replace(',', '.')) } : {}),
      until: new Date(untilMs ?? 0).toISOString(),
      authority: form.authority,
      tests: form.tests,
      reason: form.reason,
    };
    await postJson<ItemView>(itemExtensionsPath(item), request);
    setForm(EMPTY);
    onDone();
  });
  const extend = (event: Event) => {
    event.preventDefault();
    if (untilMs !== null) void extending.post();
  };
  return (
    <form class="stack" onSubmit={extend}>
      <div class="fields">
        <ChoiceField
          label="Which life"
          choices={[
            { value: 'out-life', text: 'out-life' },
            { value: 'shelf-life', text: 'shelf life' },
          ]}
          value={form.life}
          onValue={(life) => change({ life })}
        />
        {form.life === 'out-life' && (
          <TextField
            label="New limit, days"
            required
            inputMode="decimal"
            pattern="[0-9]+([.,][0-9]+)?"
            value={form.lifeDays}
            onValue={(lifeDays) => change({ lifeDays })}
          />
        )}
        <TextField
          label={`Holds until, in ${zone.value}`}
          type="datetime-local"
          required
          value={form.until}
          onValue={(until) => change({ until })}
        />
        <TextField
          label="Who answers for it"
          required
          maxLength={120}
          value={form.authority}
          onValue={(authority) => change({ authority })}
        />
        <TextField
          label="What was tested"
          hint="DSC, gel time, tack"
          required
          maxLength={2000}
          value={form.tests}
          onValue={(tests) => change({ tests })}
        />
        <TextField label="Why" required maxLength={2000} value={form.reason} onValue={(reason) => change({ reason })} />
      </div>
      {extending.problem && <Problem problem={extending.problem} kept="What you typed is kept on this page." />}
      <button type="submit" disabled={extending.isUnderWay}>
        Write the extension down
      </button>
    </form>
  );
}

function ScrapForm({ item, onDone }: { item: string; onDone: () => void }) {
  const [reason, setReason] = useState('');
  const scrapping = usePost(async () => {
    await postJson<ItemView>(itemEventsPath(item), { kind: 'scrapped', reason });
    onDone();
  });
  const scrap = (event: Event) => {
    event.preventDefault();
    void scrapping.post();
  };
  return (
    <form class="stack" onSubmit={scrap}>
      <TextField label="Why" required maxLength={2000} value={reason} onValue={setReason} />
      {scrapping.problem && <Problem problem={scrapping.problem} kept="Nothing was written." />}
      <button type="submit" class="grave" disabled={scrapping.isUnderWay}>
        Scrap {item}
      </button>
    </form>
  );
}
