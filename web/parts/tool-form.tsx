import { TOOL_MATERIALS } from '../../models/cure/heat/materials.ts';
import { toolPath } from '../../server/contract/paths.ts';
import type { ToolView } from '../../server/contract/tools.ts';
import { postJson } from '../api.ts';
import { useKeptForm } from '../kept-form.ts';
import { usePost } from '../use-post.ts';
import { asWritten } from '../words/figures.ts';
import { formOfTool, requestOfTool, type ToolForm } from '../words/tool-form.ts';
import { ChoiceField, TextField } from './field.tsx';
import { FigureField } from './figure-field.tsx';
import { Problem } from './problem.tsx';

/** What a tool is: its material and its thickness under the part are what heat passes through. */
export function ToolFormView({ tool, onKept }: { tool: ToolView; onKept: () => void }) {
  const [form, setForm, { clear }] = useKeptForm<ToolForm>(`tool.${tool.code}`, formOfTool(tool.record));
  const change = (next: Partial<ToolForm>) => setForm({ ...form, ...next });
  const saving = usePost(async () => {
    await postJson<ToolView>(toolPath(tool.code), requestOfTool(form));
    clear();
    onKept();
  });
  const save = (event: Event) => {
    event.preventDefault();
    void saving.post();
  };
  const entry = TOOL_MATERIALS.find(({ name }) => name === form.entry);
  return (
    <form class="stack section" onSubmit={save}>
      <div class="fields">
        <TextField label="What it is" maxLength={200} value={form.title} onValue={(title) => change({ title })} />
        <TextField label="Drawing" maxLength={120} value={form.drawing} onValue={(drawing) => change({ drawing })} />
        <FigureField
          label="Thickness under the part, mm"
          value={form.thicknessMm}
          onValue={(thicknessMm) => change({ thicknessMm })}
        />
        <ChoiceField
          label="Material"
          choices={[
            { value: '', text: 'not known' },
            ...TOOL_MATERIALS.map(({ name }) => ({ value: name, text: name })),
            { value: 'own', text: 'figures of our own' },
          ]}
          value={form.entry}
          onValue={(value) => change({ entry: value })}
        />
        {form.entry === 'own' && (
          <>
            <TextField
              label="What the material is called"
              required
              maxLength={120}
              value={form.name}
              onValue={(name) => change({ name })}
            />
            <FigureField
              label="Density, kg/m³"
              required
              value={form.density}
              onValue={(density) => change({ density })}
            />
            <FigureField
              label="Specific heat, J/(kg K)"
              required
              value={form.specificHeat}
              onValue={(specificHeat) => change({ specificHeat })}
            />
            <FigureField
              label="Conductivity, W/(m K)"
              required
              value={form.conductivity}
              onValue={(conductivity) => change({ conductivity })}
            />
            <TextField
              label="Where the figures come from"
              required
              maxLength={2000}
              value={form.source}
              onValue={(source) => change({ source })}
            />
          </>
        )}
        {tool.record && (
          <TextField
            label="Why it is written again"
            required
            maxLength={2000}
            value={form.reason}
            onValue={(reason) => change({ reason })}
          />
        )}
      </div>
      {entry && (
        <p class="soft">
          {asWritten(entry.densityKgM3, 'kg/m³')}, {asWritten(entry.specificHeatJKgK, 'J/(kg K)')},{' '}
          {asWritten(entry.conductivityWMK, 'W/(m K)')}. Source: {entry.source}.
        </p>
      )}
      {saving.problem && <Problem problem={saving.problem} kept="What you typed is kept on this page." />}
      <button type="submit" class="primary" disabled={saving.isUnderWay}>
        Keep the record
      </button>
    </form>
  );
}
