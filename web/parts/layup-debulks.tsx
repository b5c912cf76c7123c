import type { DebulkForm, LayupForm } from '../words/layup-form.ts';
import { zone } from '../workshop.ts';
import { TextField } from './field.tsx';
import { FigureField } from './figure-field.tsx';

/** Debulks in their order, each on one line; one more is one press. */
export function LayupDebulks({
  form,
  vacuumUnit,
  onChange,
}: {
  form: LayupForm;
  vacuumUnit: string;
  onChange: (next: Partial<LayupForm>) => void;
}) {
  const { debulks } = form;
  const last = debulks.at(-1);
  const add = () =>
    onChange({
      debulks: [
        ...debulks,
        {
          id: Math.max(0, ...debulks.map(({ id }) => id)) + 1,
          at: '',
          minutes: last?.minutes ?? '',
          vacuum: last?.vacuum ?? '',
          vacuumUnit: last?.vacuumUnit || vacuumUnit,
        },
      ],
    });
  const change = (id: number, next: Partial<DebulkForm>) =>
    onChange({ debulks: debulks.map((debulk) => (debulk.id === id ? { ...debulk, ...next } : debulk)) });
  return (
    <section class="section stack">
      <h2>Debulks</h2>
      {debulks.length === 0 && <p class="soft">None written down.</p>}
      <ol class="debulks plain-list" hidden={debulks.length === 0}>
        {debulks.map((debulk, n) => (
          <li key={debulk.id}>
            <fieldset class="row">
              <legend>Debulk {n + 1}</legend>
              <TextField
                label={`Began, in ${zone.value}`}
                type="datetime-local"
                value={debulk.at}
                onValue={(at) => change(debulk.id, { at })}
              />
              <FigureField
                label="Minutes"
                value={debulk.minutes}
                onValue={(minutes) => change(debulk.id, { minutes })}
              />
              <FigureField
                label={`Vacuum, ${debulk.vacuumUnit || vacuumUnit}`}
                value={debulk.vacuum}
                onValue={(vacuum) => change(debulk.id, { vacuum })}
              />
              <button
                type="button"
                class="quiet"
                aria-label={`Take out debulk ${n + 1}`}
                onClick={() => onChange({ debulks: debulks.filter(({ id }) => id !== debulk.id) })}
              >
                Take out
              </button>
            </fieldset>
          </li>
        ))}
      </ol>
      <p>
        <button type="button" onClick={add}>
          Add a debulk
        </button>
      </p>
    </section>
  );
}
