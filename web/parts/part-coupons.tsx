import type { SetCouponRequest } from '../../server/contract/layups.ts';
import type { PartView } from '../../server/contract/parts.ts';
import { partCouponsPath } from '../../server/contract/paths.ts';
import { postJson } from '../api.ts';
import { useKeptForm } from '../kept-form.ts';
import { usePost } from '../use-post.ts';
import { ChoiceField, TextField } from './field.tsx';
import { Problem } from './problem.tsx';

const EMPTY = { code: '', run: '', position: '', reason: '' };

/** Witness coupons of a part: what is tested in its place. */
export function PartCoupons({ view, onChanged }: { view: PartView; onChanged: () => void }) {
  return (
    <section class="section">
      <h2>Witness coupons</h2>
      {view.coupons.length === 0 ? (
        <p class="soft">None on record.</p>
      ) : (
        <ul>
          {view.coupons.map(({ code, run, position, deed }) => (
            <li key={code}>
              <b>{code}</b>
              {position && `, ${position}`}
              {run !== null && (
                <>
                  , cured in <a href={`/runs/${run}`}>run {run}</a>
                </>
              )}{' '}
              <span class="soft small">written by {deed.by}</span>
            </li>
          ))}
        </ul>
      )}
      <details>
        <summary>Write down a coupon</summary>
        <CouponForm view={view} onChanged={onChanged} />
      </details>
    </section>
  );
}

function CouponForm({ view, onChanged }: { view: PartView; onChanged: () => void }) {
  const [form, setForm, { clear }] = useKeptForm(`coupon.${view.serial}`, EMPTY);
  const change = (next: Partial<typeof EMPTY>) => setForm({ ...form, ...next });
  const isKnown = view.coupons.some(({ code }) => code === form.code.trim());
  const adding = usePost(async () => {
    const request: SetCouponRequest = {
      code: form.code.trim(),
      run: form.run === '' ? null : Number(form.run),
      position: form.position.trim() || null,
      ...(form.reason.trim() === '' ? {} : { reason: form.reason.trim() }),
    };
    await postJson<PartView>(partCouponsPath(view.serial), request);
    clear();
    onChanged();
  });
  const add = (event: Event) => {
    event.preventDefault();
    void adding.post();
  };
  return (
    <form class="stack" onSubmit={add}>
      <div class="fields">
        <TextField
          label="Code of the coupon"
          required
          maxLength={120}
          value={form.code}
          onValue={(code) => change({ code })}
        />
        <ChoiceField
          label="Cured in"
          choices={[
            { value: '', text: 'not said' },
            ...view.runs.map(({ line }) => ({ value: String(line.run), text: `run ${line.run}` })),
          ]}
          value={form.run}
          onValue={(run) => change({ run })}
        />
        <TextField
          label="Where it lay"
          hint="Beside which place of the part"
          maxLength={200}
          value={form.position}
          onValue={(position) => change({ position })}
        />
        <TextField
          label="Why it is written again"
          hint="Where this code is on record already"
          required={isKnown}
          maxLength={2000}
          value={form.reason}
          onValue={(reason) => change({ reason })}
        />
      </div>
      {adding.problem && <Problem problem={adding.problem} kept="What you typed is kept on this page." />}
      <button type="submit" disabled={adding.isUnderWay}>
        Write the coupon down
      </button>
    </form>
  );
}
