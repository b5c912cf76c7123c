import type { Cycle } from '../../models/cycle/cycle.ts';
import type { RunView } from '../../server/contract/runs.ts';
import { listed } from '../words/figures.ts';
import { ROLE_WORDS } from '../words/layouts.ts';
import { isAttachable, type LoadForm, type SensorForm } from '../words/load-form.ts';
import { TextField } from './field.tsx';

/** Which thermocouple is on which part: a grid to tap, where a number key does the same for the row in focus. */
export function LoadSensors({
  form,
  run,
  cycle,
  onChange,
}: {
  form: LoadForm;
  run: RunView;
  cycle: Cycle | null;
  onChange: (next: Partial<LoadForm>) => void;
}) {
  const judgedBy = cycle?.judgedBy ?? 'part';
  const attachable = run.channels.filter((channel) => isAttachable(channel, judgedBy));
  const others = run.channels.filter((channel) => !attachable.includes(channel));
  const channels = [...attachable].sort((a, b) => rank(a.role, judgedBy) - rank(b.role, judgedBy));
  const change = (channel: string, next: Partial<SensorForm>) =>
    onChange({ sensors: form.sensors.map((sensor) => (sensor.channel === channel ? { ...sensor, ...next } : sensor)) });
  return (
    <section class="section">
      <h2>Which thermocouple is on which part</h2>
      <p>
        Tap the parts a thermocouple is on. With the keyboard: arrows move, a number key takes the part of that number.
      </p>
      {form.parts.length === 0 ? (
        <p class="soft">Parts come first.</p>
      ) : (
        <>
          <fieldset class="sensor-grid" aria-label="Thermocouples and parts" onKeyDown={(event) => moveInGrid(event)}>
            {channels.map(({ name, role }) => {
              const sensor = form.sensors.find((one) => one.channel === name);
              if (!sensor) return null;
              return (
                <SensorLine
                  key={name}
                  sensor={sensor}
                  role={role}
                  form={form}
                  places={cycle?.sensors?.mustWork ?? []}
                  onChange={(next) => change(name, next)}
                />
              );
            })}
          </fieldset>
          <datalist id="places">
            {(cycle?.sensors?.mustWork ?? []).map((place) => (
              <option key={place} value={place} />
            ))}
          </datalist>
          <JudgedBy form={form} run={run} judgedBy={judgedBy} />
          {others.length > 0 && <Others channels={others} form={form} onChange={change} />}
        </>
      )}
    </section>
  );
}

function SensorLine({
  sensor,
  role,
  form,
  places,
  onChange,
}: {
  sensor: SensorForm;
  role: string;
  form: LoadForm;
  places: readonly string[];
  onChange: (next: Partial<SensorForm>) => void;
}) {
  const toggle = (id: number) =>
    onChange({ parts: sensor.parts.includes(id) ? sensor.parts.filter((one) => one !== id) : [...sensor.parts, id] });
  const byNumber = (event: KeyboardEvent) => {
    if (!(event.target instanceof HTMLButtonElement)) return;
    const part = form.parts[Number(event.key) - 1];
    if (part) toggle(part.id);
  };
  return (
    <fieldset class="sensor-line" aria-label={`${sensor.channel}, ${ROLE_WORDS[role]}`} onKeyDown={byNumber}>
      <p>
        <strong>{sensor.channel}</strong> <span class="soft small">{ROLE_WORDS[role]}</span>
      </p>
      <div class="on-parts">
        {form.parts.map((part) => (
          <button
            key={part.id}
            type="button"
            class="quiet"
            aria-pressed={sensor.parts.includes(part.id)}
            onClick={() => toggle(part.id)}
          >
            {part.part}
          </button>
        ))}
      </div>
      <input
        class="place"
        aria-label={`Place of ${sensor.channel}`}
        placeholder={places.length > 0 ? `place: ${places.join(', ')}` : 'place'}
        list="places"
        maxLength={120}
        value={sensor.place}
        onInput={(event) => onChange({ place: event.currentTarget.value })}
      />
      <input
        class="uncertainty"
        aria-label={`Uncertainty U (k = 2) of ${sensor.channel}`}
        placeholder="U, k = 2"
        inputMode="decimal"
        pattern="[0-9]+([.,][0-9]+)?"
        value={sensor.uncertainty}
        onInput={(event) => onChange({ uncertainty: event.currentTarget.value })}
      />
      {sensor.corrections && (
        <p class="soft small">
          Corrections on record: {sensor.corrections.map(([at, by]) => `${by} at ${at}`).join(', ')}.
        </p>
      )}
    </fieldset>
  );
}

/** Channels that are on no part still have an uncertainty, where it is known. */
function Others({
  channels,
  form,
  onChange,
}: {
  channels: RunView['channels'];
  form: LoadForm;
  onChange: (channel: string, next: Partial<SensorForm>) => void;
}) {
  return (
    <details>
      <summary>Uncertainty of the other channels</summary>
      <div class="fields">
        {channels.map(({ name, unit }) => (
          <TextField
            key={name}
            label={`${name}, U (k = 2), ${unit}`}
            inputMode="decimal"
            pattern="[0-9]+([.,][0-9]+)?"
            value={form.sensors.find(({ channel }) => channel === name)?.uncertainty ?? ''}
            onValue={(uncertainty) => onChange(name, { uncertainty })}
          />
        ))}
      </div>
    </details>
  );
}

/** Says at once what the choice means for the verdict. */
function JudgedBy({ form, run, judgedBy }: { form: LoadForm; run: RunView; judgedBy: string }) {
  const judged = run.channels.filter(({ role }) => role === judgedBy).map(({ name }) => name);
  return (
    <ul class="section" aria-live="polite">
      {form.parts.map((part) => {
        const own = form.sensors
          .filter(({ channel, parts }) => judged.includes(channel) && parts.includes(part.id))
          .map(({ channel }) => channel);
        return (
          <li key={part.id}>
            {own.length > 0
              ? `${part.part} is judged by ${listed(own)}.`
              : `${part.part} has no ${judgedBy} thermocouple of its own: it is judged by all ${judged.length} in the load, and the verdict says so.`}
          </li>
        );
      })}
    </ul>
  );
}

const STEPS: Readonly<Record<string, readonly [number, number]>> = {
  ArrowRight: [0, 1],
  ArrowLeft: [0, -1],
  ArrowDown: [1, 0],
  ArrowUp: [-1, 0],
};

function moveInGrid(event: KeyboardEvent & { currentTarget: HTMLElement }): void {
  const step = STEPS[event.key];
  if (!step || !(event.target instanceof HTMLButtonElement)) return;
  const rows = [...event.currentTarget.querySelectorAll('.on-parts')].map((row) => [...row.querySelectorAll('button')]);
  const row = rows.findIndex((buttons) => buttons.includes(event.target as HTMLButtonElement));
  const column = rows[row]?.indexOf(event.target) ?? 0;
  const next = rows[row + step[0]]?.[column + step[1]];
  if (!next) return;
  event.preventDefault();
  next.focus();
}

function rank(role: string, judgedBy: string): number {
  return role === judgedBy ? 0 : 1;
}
