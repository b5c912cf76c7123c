import { useLayoutEffect, useRef, useState } from 'preact/hooks';
import type { ProgrammeField, ProgrammeRefusal, TypedProgramme, TypedStep } from '../../models/cycle/read-programme.ts';
import { ChoiceField, TextField } from './field.tsx';

/** A programme as rows: where it starts, then ramps and holds; what is refused stands at its field. */
export function ProgrammeRows({
  programme,
  refusals,
  onChange,
}: {
  programme: TypedProgramme;
  refusals: readonly ProgrammeRefusal[];
  onChange: (next: TypedProgramme) => void;
}) {
  const list = useRef<HTMLOListElement>(null);
  const [focusRow, setFocusRow] = useState<number | null>(null);
  useLayoutEffect(() => {
    if (focusRow === null) return;
    // The first figure of the row; where the last row went, what adds one.
    const row = list.current?.querySelectorAll('li')[focusRow];
    const next = row?.querySelector('input') ?? list.current?.parentElement?.querySelector<HTMLElement>('.add-step');
    next?.focus();
    setFocusRow(null);
  }, [focusRow]);
  const { unit, steps } = programme;
  const wrongAt = (step: number | null, field: ProgrammeField) =>
    refusals.find((one) => one.step === step && one.field === field)?.because ?? null;
  const change = (n: number, step: TypedStep) =>
    onChange({ ...programme, steps: steps.map((one, i) => (i === n ? step : one)) });
  const insert = (n: number, step: TypedStep) => {
    onChange({ ...programme, steps: [...steps.slice(0, n), step, ...steps.slice(n)] });
    setFocusRow(n);
  };
  const remove = (n: number) => {
    onChange({ ...programme, steps: steps.filter((_, i) => i !== n) });
    setFocusRow(Math.max(0, Math.min(n, steps.length - 2)));
  };
  const whole = wrongAt(null, 'steps');
  return (
    <div class="programme-rows">
      <div class="programme-start">
        <TextField
          label={`Starts at, ${unit}`}
          inputMode="decimal"
          value={programme.start}
          wrong={wrongAt(null, 'start')}
          onValue={(start) => onChange({ ...programme, start })}
        />
      </div>
      <ol ref={list} class="programme-steps">
        {steps.map((step, n) => (
          <li key={n}>
            <StepFields
              n={n}
              step={step}
              unit={unit}
              wrongAt={(field) => wrongAt(n, field)}
              onChange={(next) => change(n, next)}
            />
            <div class="row step-deeds">
              <button
                type="button"
                class="quiet"
                aria-label={`Add a step after step ${n + 1}`}
                onClick={() => insert(n + 1, step.kind === 'hold' ? EMPTY_RAMP : EMPTY_HOLD)}
              >
                +
              </button>
              <button type="button" class="quiet" aria-label={`Remove step ${n + 1}`} onClick={() => remove(n)}>
                Remove
              </button>
            </div>
          </li>
        ))}
      </ol>
      {whole && (
        <p class="wrong" role="status">
          {whole}
        </p>
      )}
      <div class="row">
        <button type="button" class="quiet add-step" onClick={() => insert(steps.length, EMPTY_RAMP)}>
          Add a ramp
        </button>
        <button type="button" class="quiet" onClick={() => insert(steps.length, EMPTY_HOLD)}>
          Add a hold
        </button>
      </div>
    </div>
  );
}

const EMPTY_RAMP: TypedStep = { kind: 'ramp', rate: '', to: '' };
const EMPTY_HOLD: TypedStep = { kind: 'hold', minutes: '' };
const KINDS = [
  { value: 'ramp', text: 'heat or cool' },
  { value: 'hold', text: 'hold' },
];

function StepFields({
  n,
  step,
  unit,
  wrongAt,
  onChange,
}: {
  n: number;
  step: TypedStep;
  unit: string;
  wrongAt: (field: ProgrammeField) => string | null;
  onChange: (next: TypedStep) => void;
}) {
  return (
    <fieldset class="step-fields">
      <legend class="unseen">Step {n + 1}</legend>
      <ChoiceField
        label={`Step ${n + 1}`}
        value={step.kind}
        choices={KINDS}
        onValue={(kind) => onChange(kind === 'hold' ? EMPTY_HOLD : EMPTY_RAMP)}
      />
      {step.kind === 'hold' ? (
        <TextField
          label="For, min"
          inputMode="decimal"
          value={step.minutes}
          wrong={wrongAt('minutes')}
          onValue={(minutes) => onChange({ ...step, minutes })}
        />
      ) : (
        <>
          <TextField
            label={`At, ${unit}/min`}
            inputMode="decimal"
            value={step.rate}
            wrong={wrongAt('rate')}
            onValue={(rate) => onChange({ ...step, rate })}
          />
          <TextField
            label={`To, ${unit}`}
            inputMode="decimal"
            value={step.to}
            wrong={wrongAt('to')}
            onValue={(to) => onChange({ ...step, to })}
          />
        </>
      )}
    </fieldset>
  );
}
