import type { Signal } from '@preact/signals';
import { type SchemeChoice, schemeChoice } from '../scheme.ts';
import { pressureChoice, temperatureChoice, vacuumChoice, workshop } from '../workshop.ts';
import { ChoiceField } from './field.tsx';

const SCHEMES: readonly { value: SchemeChoice; text: string }[] = [
  { value: 'as-system', text: 'as this device is set' },
  { value: 'light', text: 'light' },
  { value: 'dark', text: 'dark' },
];

/** Each person's own choices, kept in this browser. Nothing written in the book changes by them. */
export function ShownToYou() {
  const units = workshop.value?.units;
  return (
    <section>
      <h2>How it is shown to you</h2>
      <p class="soft">
        Kept in this browser. Charts are drawn in these units; limits and findings stay as the cycle wrote them.
      </p>
      <div class="fields section">
        <ChoiceField
          label="Page"
          choices={SCHEMES}
          value={schemeChoice.value}
          onValue={(value) => {
            schemeChoice.value = value as SchemeChoice;
          }}
        />
        <UnitField
          label="Temperature on charts"
          choice={temperatureChoice}
          base={units?.temperature}
          names={['°C', '°F']}
        />
        <UnitField
          label="Pressure on charts"
          choice={pressureChoice}
          base={units?.pressure}
          names={['bar', 'kPa', 'MPa', 'psi']}
        />
        <UnitField
          label="Vacuum on charts"
          choice={vacuumChoice}
          base={units?.vacuum}
          names={['bar', 'kPa', 'mbar', 'inHg', 'mmHg']}
        />
      </div>
    </section>
  );
}

function UnitField<T extends string>({
  label,
  choice,
  base,
  names,
}: {
  label: string;
  choice: Signal<T>;
  base: string | undefined;
  names: readonly string[];
}) {
  return (
    <ChoiceField
      label={label}
      choices={[
        { value: 'as-workshop', text: base ? `as the workshop: ${base}` : 'as the workshop' },
        ...names.map((name) => ({ value: name, text: name })),
      ]}
      value={choice.value}
      onValue={(value) => {
        choice.value = value as T;
      }}
    />
  );
}
