import { useState } from 'preact/hooks';
import type { ItemEvent, ItemView } from '../../server/contract/materials.ts';
import { itemEventsPath, itemKitsPath } from '../../server/contract/paths.ts';
import { postJson } from '../api.ts';
import { usePost } from '../use-post.ts';
import { instantOfWallClock } from '../words/clock.ts';
import { zone } from '../workshop.ts';
import { TextField } from './field.tsx';
import { Problem } from './problem.tsx';
import { keepRoom, lastRoom, RoomFields, roomOf } from './room-fields.tsx';

/** What one does to a roll or kit, one tap each: the likely one first. */
export function ItemActs({ view, onDone }: { view: ItemView; onDone: () => void }) {
  const today = view.now.slice(0, 10);
  const [room, setRoom] = useState(() => lastRoom(today));
  const [wall, setWall] = useState('');
  const [kit, setKit] = useState(() => nextKit(view));
  const [length, setLength] = useState('');
  const atMs = wall === '' ? null : instantOfWallClock(wall, zone.value);
  const at = atMs === null ? {} : { at: new Date(atMs).toISOString() };
  const isWrongTime = wall !== '' && atMs === null;
  const doing = usePost(async (path: string, body: object) => {
    await postJson<ItemView>(path, body);
    keepRoom(today, room);
    setWall('');
    onDone();
  });
  const write = (event: ItemEvent) => doing.post(itemEventsPath(view.item), { ...event, ...at });
  const cut = async () => {
    const lengthM = length.trim() === '' ? null : Number(length.replace(',', '.'));
    const body = { kit: kit.trim(), lengthM, room: roomOf(room), ...at };
    if (await doing.post(itemKitsPath(view.item), body)) {
      setKit('');
      setLength('');
    }
  };
  const isOut = view.state?.place === 'room';
  const isBusy = doing.isUnderWay || isWrongTime;
  return (
    <section class="acts no-print" aria-label="Write a line">
      <div class="fields">
        <RoomFields room={room} onRoom={setRoom} />
        <TextField
          label={`When, in ${zone.value}`}
          hint="Left out: now."
          type="datetime-local"
          value={wall}
          wrong={isWrongTime ? 'This time does not exist in the shop’s zone.' : null}
          onValue={setWall}
        />
      </div>
      <div class="row taps">
        {isOut ? (
          <>
            <button type="button" class="primary" disabled={isBusy} onClick={() => write({ kind: 'in' })}>
              Back in the freezer
            </button>
            <button
              type="button"
              disabled={isBusy || room.temperature.trim() === ''}
              onClick={() => write({ kind: 'room', room: roomOf(room) ?? { unit: '°C' } })}
            >
              The room is as above
            </button>
            <button type="button" disabled={isBusy} onClick={() => write({ kind: 'thawed' })}>
              Warmed through
            </button>
            <button type="button" disabled={isBusy} onClick={() => write({ kind: 'opened' })}>
              Wrapping opened
            </button>
          </>
        ) : (
          <button
            type="button"
            class="primary"
            disabled={isBusy}
            onClick={() => write({ kind: 'out', room: roomOf(room) })}
          >
            Out of the freezer
          </button>
        )}
      </div>
      <div class="row taps">
        <TextField label="Code of the kit" maxLength={120} value={kit} onValue={setKit} />
        <TextField label="Length, m" inputMode="decimal" value={length} onValue={setLength} />
        <button type="button" disabled={isBusy || kit.trim() === ''} onClick={() => void cut()}>
          Cut a kit
        </button>
      </div>
      {doing.problem && <Problem problem={doing.problem} kept="Nothing was written." />}
    </section>
  );
}

/** The next code of a kit that is free, as the shop has counted them so far. */
function nextKit({ item, children }: ItemView): string {
  const taken = new Set(children.map((child) => child.item));
  let n = children.length + 1;
  while (taken.has(`${item}-${n}`)) n += 1;
  return `${item}-${n}`;
}
