import { useState } from 'preact/hooks';
import type { Materials } from '../../server/contract/materials.ts';
import { EXCURSIONS_PATH } from '../../server/contract/paths.ts';
import { postJson } from '../api.ts';
import { usePost } from '../use-post.ts';
import { instantOfWallClock } from '../words/clock.ts';
import { workshop, zone } from '../workshop.ts';
import { AreaField, TextField } from './field.tsx';
import { Problem } from './problem.tsx';

/** A freezer's own record, for everything that lay in it then. */
export function ExcursionForm({ view, onDone }: { view: Materials; onDone: () => void }) {
  const frozen = view.items.filter(({ state }) => state?.place === 'freezer').map(({ item }) => item);
  const [chosen, setChosen] = useState<readonly string[]>(frozen);
  const [text, setText] = useState('');
  const [reason, setReason] = useState('');
  const unit = workshop.value?.units.temperature ?? '°C';
  const points = pointsOf(text, zone.value);
  const isWhole = points.length >= 2 && points.every((point) => point !== null);
  const recording = usePost(async () => {
    await postJson<Materials>(EXCURSIONS_PATH, {
      items: chosen,
      points,
      unit,
      ...(reason.trim() === '' ? {} : { reason }),
    });
    setText('');
    onDone();
  });
  const record = (event: Event) => {
    event.preventDefault();
    void recording.post();
  };
  return (
    <form class="stack" onSubmit={record}>
      <AreaField
        label={`The freezer’s record, in ${zone.value} and ${unit}`}
        hint="One line each: 2026-03-05 20:00 -18. Begin and end where it was cold enough."
        rows={5}
        required
        value={text}
        wrong={text.trim() !== '' && !isWhole ? 'Two lines at least, each with day, time and temperature.' : null}
        onValue={setText}
      />
      <fieldset class="items-in-freezer">
        <legend>What lay in it</legend>
        {view.items.map(({ item }) => (
          <label key={item}>
            <input
              type="checkbox"
              checked={chosen.includes(item)}
              onChange={() =>
                setChosen(chosen.includes(item) ? chosen.filter((one) => one !== item) : [...chosen, item])
              }
            />
            {item}
          </label>
        ))}
      </fieldset>
      <TextField label="What happened" maxLength={2000} value={reason} onValue={setReason} />
      {recording.problem && <Problem problem={recording.problem} kept="What you typed is kept on this page." />}
      <button type="submit" disabled={recording.isUnderWay || !isWhole || chosen.length === 0}>
        Write it into {chosen.length === 1 ? 'its ledger' : `${chosen.length} ledgers`}
      </button>
    </form>
  );
}

function pointsOf(text: string, shopZone: string): ([string, number] | null)[] {
  return text
    .split('\n')
    .filter((line) => line.trim() !== '')
    .map((line) => {
      const [, day, time, figure] =
        /^\s*(\d{4}-\d{2}-\d{2})[ T](\d{2}:\d{2})[\s,;]+([-−]?\d+(?:[.,]\d+)?)\s*$/.exec(line) ?? [];
      if (day === undefined || time === undefined || figure === undefined) return null;
      const ms = instantOfWallClock(`${day}T${time}`, shopZone);
      return ms === null ? null : [new Date(ms).toISOString(), Number(figure.replace('−', '-').replace(',', '.'))];
    });
}
