import { useState } from 'preact/hooks';
import type { FailedParts } from '../../server/contract/trace.ts';
import { TextField } from './field.tsx';

/** Failed parts, ticked among those with a failed test, or typed and scanned. */
export function FailedChoice({
  known,
  failed,
  onFailed,
}: {
  known: FailedParts;
  failed: readonly string[];
  onFailed: (failed: readonly string[]) => void;
}) {
  const [typed, setTyped] = useState('');
  const typedOnes = failed.filter((serial) => !known.parts.some((part) => part.serial === serial));
  const toggle = (serial: string) =>
    onFailed(failed.includes(serial) ? failed.filter((one) => one !== serial) : [...failed, serial]);
  const add = (event: Event) => {
    event.preventDefault();
    const serial = typed.trim();
    if (serial === '') return;
    if (!failed.includes(serial)) onFailed([...failed, serial]);
    setTyped('');
  };
  return (
    <>
      <form class="row filters" onSubmit={add}>
        <TextField label="Serial of a failed part" hint="type or scan it" value={typed} onValue={setTyped} />
        <button type="submit">Add</button>
      </form>
      <fieldset class="ticks wide-ticks">
        <legend>{known.parts.length === 0 ? 'No part has a failed test on record' : 'Parts with a failed test'}</legend>
        {typedOnes.map((serial) => (
          <Tick key={serial} serial={serial} said="chosen by hand" isOn onChange={() => toggle(serial)} />
        ))}
        {known.parts.map(({ serial, title, test, text }) => (
          <Tick
            key={serial}
            serial={serial}
            said={[title, test, text].filter(Boolean).join(' · ')}
            isOn={failed.includes(serial)}
            onChange={() => toggle(serial)}
          />
        ))}
      </fieldset>
      {known.total > known.parts.length && (
        <p class="soft">
          The latest {known.parts.length} of {known.total} are shown; type the serial of another.
        </p>
      )}
    </>
  );
}

function Tick({ serial, said, isOn, onChange }: { serial: string; said: string; isOn: boolean; onChange: () => void }) {
  return (
    <label class="tick">
      <input type="checkbox" checked={isOn} onChange={onChange} />
      <span>
        <b>{serial}</b> <span class="soft">{said}</span>
      </span>
    </label>
  );
}
