import { useState } from 'preact/hooks';
import type { ItemView, LedgerLine } from '../../server/contract/materials.ts';
import { itemCorrectionPath } from '../../server/contract/paths.ts';
import { postJson } from '../api.ts';
import { usePost } from '../use-post.ts';
import { instantOfWallClock, wallClock } from '../words/clock.ts';
import { eventWords } from '../words/materials.ts';
import { zone } from '../workshop.ts';
import { TextField } from './field.tsx';
import { Entry } from './notebook.tsx';
import { Problem } from './problem.tsx';
import { RoomFields, roomOf } from './room-fields.tsx';
import { When } from './when.tsx';

/** The ledger as a notebook: what happened, latest first; a line that was wrong stays, struck through. */
export function ItemLedger({ view, onDone }: { view: ItemView; onDone: () => void }) {
  const lines = view.ledger
    .filter(({ event }) => event !== null)
    .sort((a, b) => Date.parse(b.event?.at ?? '') - Date.parse(a.event?.at ?? '') || b.id - a.id);
  return (
    <section class="section">
      <h2>Ledger</h2>
      <ul class="entries">
        {lines.map((line) => (
          <Line key={line.id} item={view.item} line={line} all={view.ledger} onDone={onDone} />
        ))}
      </ul>
    </section>
  );
}

function Line({
  item,
  line,
  all,
  onDone,
}: {
  item: string;
  line: LedgerLine;
  all: readonly LedgerLine[];
  onDone: () => void;
}) {
  if (line.event === null) return null;
  const words = eventWords(line.event, zone.value);
  const by = all.find(({ id }) => id === line.replacedBy);
  return (
    <Entry when={<When at={line.event.at} />}>
      {by ? (
        <p>
          <s>{words}</s> {by.event === null ? 'Taken back' : 'Corrected'} by {by.deed.by}: {by.reason}
        </p>
      ) : (
        <p>{words}</p>
      )}
      <p class="soft small">
        written by {line.deed.by}
        {line.reason && `: ${line.reason}`}
      </p>
      {!by && (
        <details class="no-print">
          <summary>This is wrong</summary>
          <Correction item={item} line={line} onDone={onDone} />
        </details>
      )}
    </Entry>
  );
}

function Correction({ item, line, onDone }: { item: string; line: LedgerLine; onDone: () => void }) {
  const event = line.event;
  const before = event !== null && 'room' in event ? event.room : undefined;
  const [wall, setWall] = useState(event === null ? '' : wallClock(event.at, zone.value).slice(0, 16));
  const [room, setRoom] = useState({
    temperature: before?.temperature === undefined ? '' : String(before.temperature),
    humidity: before?.humidity === undefined ? '' : String(before.humidity),
  });
  const [reason, setReason] = useState('');
  const atMs = instantOfWallClock(wall, zone.value);
  const correcting = usePost(async (body: object) => {
    await postJson<ItemView>(itemCorrectionPath(item, line.id), body);
    onDone();
  });
  if (event === null) return null;
  const hasRoom = event.kind === 'out' || event.kind === 'cut' || event.kind === 'room';
  const correct = (submit: Event) => {
    submit.preventDefault();
    if (atMs === null) return;
    const at = new Date(atMs).toISOString();
    const measured = hasRoom ? { room: roomOf(room) ?? (event.kind === 'room' ? { unit: '°C' } : undefined) } : {};
    void correcting.post({ event: { ...event, at, ...measured }, reason });
  };
  return (
    <form class="stack" onSubmit={correct}>
      <div class="fields">
        {event.kind !== 'excursion' && (
          <TextField
            label={`It was at, in ${zone.value}`}
            type="datetime-local"
            required
            value={wall}
            wrong={atMs === null ? 'This time does not exist in the shop’s zone.' : null}
            onValue={setWall}
          />
        )}
        {hasRoom && <RoomFields room={room} onRoom={setRoom} />}
        <TextField label="Why" required maxLength={2000} value={reason} onValue={setReason} />
      </div>
      {correcting.problem && <Problem problem={correcting.problem} kept="Nothing was written." />}
      <div class="row">
        {event.kind !== 'excursion' && (
          <button type="submit" disabled={correcting.isUnderWay || atMs === null}>
            Correct the line
          </button>
        )}
        <button
          type="button"
          class="grave"
          disabled={correcting.isUnderWay || reason.trim() === ''}
          onClick={() => void correcting.post({ event: null, reason })}
        >
          It never happened: take it back
        </button>
      </div>
    </form>
  );
}
