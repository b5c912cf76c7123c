import { LAMINATES } from '../../models/cure/heat/laminates.ts';
import { figure, plain } from '../words/figures.ts';
import { type LayupForm, needsFraction } from '../words/layup-form.ts';
import { numberIn } from '../words/typed.ts';
import { ChoiceField, TextField } from './field.tsx';
import { FigureField } from './figure-field.tsx';

/** What the laminate is as a slab: an entry of the table, or the shop's own figures with their source. */
export function LayupLaminate({ form, onChange }: { form: LayupForm; onChange: (next: Partial<LayupForm>) => void }) {
  const { laminate } = form;
  const change = (next: Partial<LayupForm['laminate']>) => onChange({ laminate: { ...laminate, ...next } });
  return (
    <section class="section stack">
      <h2>Laminate</h2>
      <p class="soft">
        For the cure through its thickness. The figures of a data sheet or of your own tests hold first.
      </p>
      <div class="fields">
        <ChoiceField
          label="Figures of the laminate"
          choices={[
            { value: '', text: 'not known' },
            ...LAMINATES.map(({ name }) => ({ value: name, text: name })),
            { value: 'own', text: 'figures of our own' },
          ]}
          value={laminate.entry}
          onValue={(entry) => onChange(chosen(form, entry))}
        />
        <FigureField
          label="Fibre by volume, %"
          hint="Needed where a resin set gives its heat for a kg of resin"
          value={form.fibreFraction}
          onValue={(fibreFraction) => onChange({ fibreFraction })}
        />
      </div>
      {laminate.entry === 'own' ? (
        <div class="fields">
          <TextField
            label="What it is called"
            required
            maxLength={120}
            value={laminate.name}
            onValue={(name) => change({ name })}
          />
          <FigureField
            label="Density, kg/m³"
            required
            value={laminate.density}
            onValue={(density) => change({ density })}
          />
          <FigureField
            label="Specific heat, J/(kg K)"
            required
            value={laminate.specificHeat}
            onValue={(specificHeat) => change({ specificHeat })}
          />
          <FigureField
            label="Conductivity through the thickness, W/(m K)"
            required
            value={laminate.conductivity}
            onValue={(conductivity) => change({ conductivity })}
          />
          <FigureField
            label="Density of the cured resin, kg/m³"
            value={laminate.resinDensity}
            onValue={(resinDensity) => change({ resinDensity })}
          />
          <TextField
            label="Where the figures come from"
            required
            maxLength={2000}
            value={laminate.source}
            onValue={(source) => change({ source })}
          />
        </div>
      ) : (
        <EntryWords form={form} />
      )}
    </section>
  );
}

function EntryWords({ form }: { form: LayupForm }) {
  const entry = LAMINATES.find(({ name }) => name === form.laminate.entry);
  if (entry === undefined) return null;
  if (needsFraction(form))
    return <p class="wrong">These figures are mixed for a fibre fraction of up to 78 %: type it.</p>;
  const share = (numberIn(form.fibreFraction) ?? Number.NaN) / 100;
  const { densityKgM3, specificHeatJKgK, conductivityWMK, resinDensityKgM3 } = entry.figuresAt(share);
  return (
    <p class="soft">
      {figure(densityKgM3, 'kg/m³', 0)}, {figure(specificHeatJKgK, 'J/(kg K)', 0)}, {plain(conductivityWMK, 3)}
      {' W/(m K)'}
      {resinDensityKgM3 === null
        ? '; the density of its resin is not given'
        : `; resin ${figure(resinDensityKgM3, 'kg/m³', 0)}`}
      . Source: {entry.source}.
    </p>
  );
}

/** An entry brings the fibre fraction its source gives, unless one was typed. */
function chosen(form: LayupForm, entry: string): Partial<LayupForm> {
  const fraction = LAMINATES.find(({ name }) => name === entry)?.fibreFraction;
  const isTyped = form.fibreFraction.trim() !== '';
  return {
    laminate: { ...form.laminate, entry },
    ...(fraction === undefined || isTyped ? {} : { fibreFraction: plain(100 * fraction, 1) }),
  };
}
