import { useRef, useState } from 'preact/hooks';
import type { Cycle } from '../../models/cycle/cycle.ts';
import type { Parts } from '../../server/contract/parts.ts';
import { partsPath } from '../../server/contract/paths.ts';
import { useRead } from '../use-read.ts';
import { type BeginForm, withoutPart, withSerials } from '../words/begin-form.ts';
import type { PartForm } from '../words/load-form.ts';
import { TextField } from './field.tsx';
import { LeakTestFields } from './load-parts.tsx';

const RECENT = 12;

/** The parts that go in: scanned, typed, or tapped where they were laid up and not cured yet. */
export function BeginParts({
  form,
  cycle,
  bagLines,
  onForm,
}: {
  form: BeginForm;
  cycle: Cycle | null;
  bagLines: readonly string[];
  onForm: (next: BeginForm) => void;
}) {
  const [typed, setTyped] = useState('');
  const box = useRef<HTMLDivElement>(null);
  const add = () => {
    onForm(withSerials(form, typed));
    setTyped('');
    box.current?.querySelector('input')?.focus();
  };
  const change = (id: number, next: Partial<PartForm>) =>
    onForm({ ...form, parts: form.parts.map((part) => (part.id === id ? { ...part, ...next } : part)) });
  return (
    <section class="section">
      <h2>Parts</h2>
      <div class="row add-part" ref={box}>
        <TextField
          label="Serial of a part"
          hint="Scan or type, then Enter."
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
      <Uncured form={form} onTake={(serial) => onForm(withSerials(form, serial))} />
      <ol class="begin-parts">
        {form.parts.map((part, n) => (
          <li key={part.id}>
            <PartCard
              part={part}
              n={n + 1}
              cycle={cycle}
              bagLines={bagLines}
              onChange={(next) => change(part.id, next)}
              onRemove={() => onForm(withoutPart(form, part.id))}
            />
          </li>
        ))}
      </ol>
    </section>
  );
}

/** Parts that are on record and were in no run yet: one tap puts one in. */
function Uncured({ form, onTake }: { form: BeginForm; onTake: (serial: string) => void }) {
  const known = useRead<Parts>(partsPath({ limit: 200 })).value?.parts ?? [];
  const there = new Set(form.parts.map(({ part }) => part));
  const waiting = known.filter(({ serial, runs }) => runs.length === 0 && !there.has(serial)).slice(0, RECENT);
  if (waiting.length === 0) return null;
  return (
    <fieldset class="taps">
      <legend>On record and not cured yet</legend>
      {waiting.map(({ serial, title }) => (
        <button key={serial} type="button" class="quiet" onClick={() => onTake(serial)}>
          {serial}
          {title && <span class="soft small">{title}</span>}
        </button>
      ))}
    </fieldset>
  );
}

function PartCard({
  part,
  n,
  cycle,
  bagLines,
  onChange,
  onRemove,
}: {
  part: PartForm;
  n: number;
  cycle: Cycle | null;
  bagLines: readonly string[];
  onChange: (next: Partial<PartForm>) => void;
  onRemove: () => void;
}) {
  const asksLeakTest = cycle?.leakTest !== undefined;
  return (
    <fieldset class="begin-part">
      <legend>
        <b class="part-number">{n}</b> {part.part}
      </legend>
      <button type="button" class="quiet take-out" onClick={onRemove} aria-label={`Take out ${part.part}`}>
        Take out
      </button>
      {bagLines.length > 0 && (
        <fieldset class="taps">
          <legend>Bag line</legend>
          {bagLines.map((line) => (
            <button
              key={line}
              type="button"
              class="quiet"
              aria-pressed={part.bagLine === line}
              onClick={() => onChange({ bagLine: part.bagLine === line ? '' : line })}
            >
              {line}
            </button>
          ))}
        </fieldset>
      )}
      <div class="fields">
        <TextField label="Tool" maxLength={120} value={part.tool} onValue={(tool) => onChange({ tool })} />
        {asksLeakTest && <LeakTestFields part={part} cycle={cycle} onChange={onChange} />}
      </div>
    </fieldset>
  );
}
