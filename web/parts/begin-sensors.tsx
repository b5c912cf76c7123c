import { useState } from 'preact/hooks';
import type { LiveReading } from '../../server/contract/live.ts';
import { type BeginForm, channelsOn, nextFree, sensorOf, withAttached } from '../words/begin-form.ts';
import { listed } from '../words/figures.ts';
import { ROLE_WORDS } from '../words/layouts.ts';
import { readingWords } from '../words/live.ts';

/**
 * Which thermocouple is on which part: tap a thermocouple, then its part. The next free one is then held by itself, so
 * that four thermocouples on four parts are five taps. Each shows what it reads now: one held in a hand tells itself.
 */
export function BeginSensors({
  form,
  sensors,
  isOld,
  onForm,
}: {
  form: BeginForm;
  sensors: readonly LiveReading[];
  isOld: boolean;
  onForm: (next: BeginForm) => void;
}) {
  const channels = sensors.map(({ channel }) => channel);
  const [held, setHeld] = useState<string | null>(null);
  const attach = (id: number) => {
    if (held === null) return;
    const next = withAttached(form, held, id);
    onForm(next);
    const wasOn = sensorOf(form, held).parts.includes(id);
    setHeld(wasOn ? held : nextFree(next, channels, held));
  };
  const byKey = (event: KeyboardEvent & { currentTarget: HTMLElement }) => {
    const part = form.parts[Number(event.key) - 1];
    if (part && held !== null) attach(part.id);
    else moveAlong(event);
  };
  if (sensors.length === 0) return null;
  return (
    <section class="section">
      <h2>Which thermocouple is on which part</h2>
      <p>
        Tap a thermocouple, then the part it is on. With the keyboard: arrows move, Enter takes hold, a number key puts
        what is held on the part of that number.
      </p>
      {form.parts.length === 0 ? (
        <p class="soft">Parts come first.</p>
      ) : (
        <fieldset class="attaching" aria-label="Thermocouples and parts" onKeyDown={byKey}>
          <fieldset class="taps">
            <legend>Thermocouples</legend>
            {sensors.map((reading) => (
              <button
                key={reading.channel}
                type="button"
                class="quiet sensor-tap"
                aria-pressed={held === reading.channel}
                data-on={sensorOf(form, reading.channel).parts.length > 0 ? 'yes' : 'no'}
                onClick={() => setHeld(held === reading.channel ? null : reading.channel)}
              >
                <b>{reading.channel}</b>
                <span class="small">{readsNow(reading, isOld)}</span>
                <span class="small soft">{whereIs(form, reading)}</span>
              </button>
            ))}
          </fieldset>
          <fieldset class="taps">
            <legend>{held === null ? 'Parts' : `${held} is on`}</legend>
            {form.parts.map((part, n) => (
              <button
                key={part.id}
                type="button"
                class="quiet part-tap"
                aria-pressed={held !== null && sensorOf(form, held).parts.includes(part.id)}
                disabled={held === null}
                onClick={() => attach(part.id)}
              >
                <b>
                  {n + 1} {part.part}
                </b>
                <span class="small soft">{listed(channelsOn(form, part.id)) || 'none of its own yet'}</span>
              </button>
            ))}
          </fieldset>
        </fieldset>
      )}
      <p class="unseen" role="status">
        {held === null ? '' : `${held} is held.`}
      </p>
    </section>
  );
}

function readsNow(reading: LiveReading, isOld: boolean) {
  const text = readingWords(reading);
  return isOld || reading.isStale ? <s>{text}</s> : text;
}

function whereIs(form: BeginForm, { channel, role }: LiveReading): string {
  const on = sensorOf(form, channel).parts.flatMap((id) => form.parts.find((part) => part.id === id)?.part ?? []);
  return on.length > 0 ? `on ${listed(on)}` : (ROLE_WORDS[role] ?? role);
}

const STEPS: Readonly<Record<string, number>> = { ArrowRight: 1, ArrowDown: 1, ArrowLeft: -1, ArrowUp: -1 };

function moveAlong(event: KeyboardEvent & { currentTarget: HTMLElement }): void {
  const step = STEPS[event.key];
  if (step === undefined || !(event.target instanceof HTMLButtonElement)) return;
  const buttons = [...event.currentTarget.querySelectorAll<HTMLButtonElement>('button:not(:disabled)')];
  const next = buttons[buttons.indexOf(event.target) + step];
  if (!next) return;
  event.preventDefault();
  next.focus();
}
