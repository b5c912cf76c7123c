import { useState } from 'preact/hooks';
import type { MadeKey, SenderKey, SenderKeys as SenderKeysAnswer } from '../../server/contract/live.ts';
import { PUSH_PATH, vesselKeyRevokePath, vesselKeysPath } from '../../server/contract/paths.ts';
import { postJson } from '../api.ts';
import { usePost } from '../use-post.ts';
import { useRead } from '../use-read.ts';
import { dayAndClock } from '../words/clock.ts';
import { zone } from '../workshop.ts';
import { TextField } from './field.tsx';
import { Problem } from './problem.tsx';
import { Shown } from './shown.tsx';

/** Keys by which senders push scans of one vessel. A key is shown once, when it is made. */
export function SenderKeys({ vessel }: { vessel: string }) {
  const reading = useRead<SenderKeysAnswer>(vesselKeysPath(vessel));
  const [name, setName] = useState('');
  const [made, setMade] = useState<MadeKey | null>(null);
  const making = usePost(async () => {
    setMade(await postJson<MadeKey>(vesselKeysPath(vessel), { name: name.trim() }));
    setName('');
    reading.again();
  });
  return (
    <section class="section">
      <h2>Keys for senders</h2>
      <p class="soft">
        A sender posts scans to {PUSH_PATH} with <code>Authorization: Bearer KEY</code>. A key opens this vessel and no
        other, and can be taken out of use at any time.
      </p>
      {made && <Made made={made} onDone={() => setMade(null)} />}
      <Shown reading={reading} what="Reading the keys">
        {({ keys }) => (
          <ul class="entries section">
            {keys.map((key) => (
              <KeyEntry key={key.id} vessel={vessel} line={key} onRevoked={reading.again} />
            ))}
          </ul>
        )}
      </Shown>
      <form
        class="stack section"
        onSubmit={(event) => {
          event.preventDefault();
          void making.post();
        }}
      >
        <TextField
          label="Whom a new key is for"
          hint="The sender’s name: PLC of autoclave 1"
          required
          maxLength={120}
          value={name}
          onValue={setName}
        />
        {making.problem && <Problem problem={making.problem} />}
        <button type="submit" disabled={making.isUnderWay || name.trim() === ''}>
          Make a key
        </button>
      </form>
    </section>
  );
}

function Made({ made, onDone }: { made: MadeKey; onDone: () => void }) {
  const [isCopied, setIsCopied] = useState(false);
  // Without a secure origin the browser copies nothing by itself; the text can still be selected.
  const clipboard = (globalThis.navigator as Partial<Navigator>).clipboard;
  return (
    <div class="notice kept" role="status">
      <h3>The key for {made.name}</h3>
      <p>It is shown this once and kept only as a hash. Copy it to the sender now.</p>
      <p class="breakable">
        <code class="made-key">{made.key}</code>
      </p>
      <div class="row">
        {clipboard && (
          <button type="button" onClick={() => void clipboard.writeText(made.key).then(() => setIsCopied(true))}>
            {isCopied ? 'Copied' : 'Copy it'}
          </button>
        )}
        <button type="button" class="quiet" onClick={onDone}>
          I have it
        </button>
      </div>
    </div>
  );
}

function KeyEntry({ vessel, line, onRevoked }: { vessel: string; line: SenderKey; onRevoked: () => void }) {
  const [reason, setReason] = useState('');
  const revoking = usePost(async () => {
    await postJson<SenderKeysAnswer>(vesselKeyRevokePath(vessel, line.id), { reason: reason.trim() });
    onRevoked();
  });
  return (
    <li class="entry">
      <div class="head">
        <h3>{line.name}</h3>
        <span class="soft">{line.revoked ? 'out of use' : 'in use'}</span>
      </div>
      <p class="soft">
        Made by {line.made.by}, {dayAndClock(line.made.at, zone.value)}.{' '}
        {line.lastUsed ? `Last used ${dayAndClock(line.lastUsed, zone.value)}.` : 'Never used.'}
        {line.revoked && ` Taken out of use by ${line.revoked.by}, ${dayAndClock(line.revoked.at, zone.value)}.`}
      </p>
      {!line.revoked && (
        <details>
          <summary>Take it out of use</summary>
          <form
            class="row"
            onSubmit={(event) => {
              event.preventDefault();
              void revoking.post();
            }}
          >
            <TextField
              label={`Why the key of ${line.name} goes`}
              required
              maxLength={2000}
              value={reason}
              onValue={setReason}
            />
            <button type="submit" class="grave" disabled={revoking.isUnderWay || reason.trim() === ''}>
              Take it out of use for good
            </button>
          </form>
          {revoking.problem && <Problem problem={revoking.problem} />}
        </details>
      )}
    </li>
  );
}
