import { THERMOCOUPLE_TYPES, type Thermocouple } from '../../models/log/layout.ts';
import { isTemperatureUnit } from '../../models/units.ts';
import { withAnswer } from '../words/layout-edits.ts';
import type { LayoutEditing } from './layout-editor.tsx';
import { isOpen, wrongIfOpen } from './open-field.ts';

/** What turns a column of emf into temperatures: the type of its wire, and where its cold junction was. */
export function ThermocoupleFields({
  editing,
  n,
  thermocouple,
}: {
  editing: LayoutEditing;
  n: number;
  thermocouple: Thermocouple;
}) {
  const { layout, onChange } = editing;
  const keyOf = (what: string) => `channels/${n}/thermocouple/${what}`;
  const change = (what: string, answer: string) => onChange(withAnswer(layout, keyOf(what), answer), keyOf(what));
  const colds = layout.channels.filter(({ unit }) => isTemperatureUnit(unit));
  return (
    <div class="emf">
      <label>
        <span>Thermocouple</span>
        <select
          value={isOpen(editing, keyOf('type')) ? '' : thermocouple.type}
          {...wrongIfOpen(editing, keyOf('type'))}
          onChange={(event) => change('type', event.currentTarget.value)}
        >
          <option value="">choose</option>
          {THERMOCOUPLE_TYPES.map((type) => (
            <option key={type} value={type}>
              type {type}
            </option>
          ))}
        </select>
      </label>
      <label>
        <span>Cold junction, its channel or °C</span>
        <input
          list={`colds-${n}`}
          size={12}
          value={String(thermocouple.coldJunction ?? '')}
          {...wrongIfOpen(editing, keyOf('coldJunction'))}
          onChange={(event) => change('coldJunction', event.currentTarget.value)}
        />
        <datalist id={`colds-${n}`}>
          {colds.map(({ name }) => (
            <option key={name} value={name} />
          ))}
        </datalist>
      </label>
    </div>
  );
}
