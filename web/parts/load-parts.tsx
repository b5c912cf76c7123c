import { useState } from 'preact/hooks';
import type { Cycle } from '../../models/cycle/cycle.ts';
import type { RunView } from '../../server/contract/runs.ts';
import { asWritten, listed } from '../words/figures.ts';
import { type LoadForm, newPart, type PartForm } from '../words/load-form.ts';
import { AgedOffer } from './aged-offer.tsx';
import { ChoiceField, TextField } from './field.tsx';

/** The parts of a load: a serial and Enter is enough; everything else can wait or be left out. */
export function LoadParts({
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
  const [typed, setTyped] = useState('');
  const add = () => {
    const there = new Set(form.parts.map(({ part }) => part));
    const serials = typed.split(/[\s,;]+/).filter((serial) => serial !== '' && !there.has(serial));
    const first = Math.max(0, ...form.parts.map(({ id }) => id)) + 1;
    onChange({ parts: [...form.parts, ...[...new Set(serials)].map((serial, n) => newPart(first + n, serial))] });
    setTyped('');
  };
  const bagLines = run.channels.filter(({ role }) => role === 'vacuum').map(({ name }) => name);
  const change = (id: number, next: Partial<PartForm>) =>
    onChange({ parts: form.parts.map((part) => (part.id === id ? { ...part, ...next } : part)) });
  const remove = (id: number) =>
    onChange({
      parts: form.parts.filter((part) => part.id !== id),
      sensors: form.sensors.map((sensor) => ({ ...sensor, parts: sensor.parts.filter((one) => one !== id) })),
    });
  return (
    <section class="section">
      <h2>Parts</h2>
      <div class="row add-part">
        <TextField
          label="Serial of a part"
          hint="Scan or type, then Enter. Several at once: apart by a space."
          value={typed}
          onValue={setTyped}
          onKeyDown={(event) => {
            if (event.key !== 'Enter') return;
            event.preventDefault();
            add();
          }}
        />
        <button type="button" onClick={add} disabled={typed.trim() === ''}>
          Add
        </button>
      </div>
      <ol class="load-parts">
        {form.parts.map((part, n) => (
          <li key={part.id}>
            <PartLine
              part={part}
              n={n + 1}
              bagLines={bagLines}
              cycle={cycle}
              from={run.from}
              onChange={(next) => change(part.id, next)}
              onRemove={() => remove(part.id)}
            />
          </li>
        ))}
      </ol>
    </section>
  );
}

function PartLine({
  part,
  n,
  bagLines,
  cycle,
  from,
  onChange,
  onRemove,
}: {
  part: PartForm;
  n: number;
  bagLines: readonly string[];
  cycle: Cycle | null;
  /** The log's first scan: the age of a part's material is told as of it. */
  from: string;
  onChange: (next: Partial<PartForm>) => void;
  onRemove: () => void;
}) {
  const asksLeakTest = cycle?.leakTest !== undefined;
  const hasMore =
    part.quantity !== '' ||
    part.startDegree !== '' ||
    Boolean(part.humidity) ||
    part.tool !== '' ||
    part.title !== '' ||
    part.drawing !== '';
  return (
    <fieldset>
      <legend>
        <span class="unseen">Part </span>
        {n}
        <span class="unseen">, {part.part}</span>
      </legend>
      <div class="fields">
        <TextField
          label="Serial"
          required
          maxLength={120}
          value={part.part}
          onValue={(value) => onChange({ part: value })}
        />
        {bagLines.length > 0 && (
          <ChoiceField
            label="Bag line"
            choices={[
              { value: '', text: 'all that no part names' },
              ...bagLines.map((name) => ({ value: name, text: name })),
            ]}
            value={part.bagLine}
            onValue={(bagLine) => onChange({ bagLine })}
          />
        )}
        {asksLeakTest && <LeakTestFields part={part} cycle={cycle} onChange={onChange} />}
      </div>
      <button type="button" class="quiet take-out" onClick={onRemove} aria-label={`Take out ${part.part}`}>
        Take out
      </button>
      <details open={hasMore}>
        <summary>
          Quantity, tool, drawing, degree of cure at the start, humidity of the lay-up
          {asksLeakTest ? '' : ', leak test'}
        </summary>
        <div class="fields">
          <Figure
            label="Quantity"
            hint="Like parts on one record"
            value={part.quantity}
            onValue={(quantity) => onChange({ quantity })}
          />
          <Figure
            label="Degree of cure at the start"
            hint="0 to 1; where the roll had aged"
            value={part.startDegree}
            onValue={(startDegree) => onChange({ startDegree })}
          />
          <AgedOffer part={part.part} at={from} onTake={(startDegree) => onChange({ startDegree })} />
          <Figure
            label="Relative humidity of the lay-up, %"
            hint="Of the room it was laid up in; for the pressure that voids need"
            value={part.humidity ?? ''}
            onValue={(humidity) => onChange({ humidity })}
          />
          <TextField label="Tool" maxLength={120} value={part.tool} onValue={(tool) => onChange({ tool })} />
          <TextField label="What it is" maxLength={200} value={part.title} onValue={(title) => onChange({ title })} />
          <TextField
            label="Drawing"
            maxLength={120}
            value={part.drawing}
            onValue={(drawing) => onChange({ drawing })}
          />
          <TextField
            label="Issue of the drawing"
            maxLength={40}
            value={part.drawingIssue}
            onValue={(drawingIssue) => onChange({ drawingIssue })}
          />
          {!asksLeakTest && <LeakTestFields part={part} cycle={cycle} onChange={onChange} />}
        </div>
      </details>
    </fieldset>
  );
}

export function LeakTestFields({
  part,
  cycle,
  onChange,
}: {
  part: PartForm;
  cycle: Cycle | null;
  onChange: (next: Partial<PartForm>) => void;
}) {
  const unit = cycle?.units.vacuum ?? '';
  const isBegun = [part.leakStart, part.leakEnd, part.leakMinutes].some((value) => value.trim() !== '');
  const asks = cycle?.leakTest
    ? listed([
        ...(cycle.leakTest.startAtLeast === undefined
          ? []
          : [`at least ${asWritten(cycle.leakTest.startAtLeast, unit)} to start`]),
        `at most ${asWritten(cycle.leakTest.lossAtMost, unit)} lost in ${asWritten(cycle.leakTest.over, 'min')}`,
      ])
    : '';
  return (
    <>
      <Figure
        label={unit ? `Leak test, start, ${unit}` : 'Leak test, start'}
        hint={asks}
        required={isBegun}
        value={part.leakStart}
        onValue={(leakStart) => onChange({ leakStart })}
      />
      <Figure
        label={unit ? `Leak test, end, ${unit}` : 'Leak test, end'}
        required={isBegun}
        value={part.leakEnd}
        onValue={(leakEnd) => onChange({ leakEnd })}
      />
      <Figure
        label="Leak test, minutes"
        required={isBegun}
        value={part.leakMinutes}
        onValue={(leakMinutes) => onChange({ leakMinutes })}
      />
    </>
  );
}

function Figure(props: {
  label: string;
  hint?: string;
  required?: boolean;
  value: string;
  onValue: (value: string) => void;
}) {
  return <TextField {...props} inputMode="decimal" pattern="-?[0-9]+([.,][0-9]+)?" title="A figure, such as 0.85" />;
}
