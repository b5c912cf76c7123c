import { useState } from 'preact/hooks';
import type { ItemView, Materials, MaterialView, SetBatchRequest } from '../../server/contract/materials.ts';
import { BATCHES_PATH, MATERIALS_PATH, ROLLS_PATH } from '../../server/contract/paths.ts';
import { postJson } from '../api.ts';
import { ProblemError } from '../problem-error.ts';
import { usePost } from '../use-post.ts';
import { ExcursionForm } from './excursion-form.tsx';
import { ChoiceField, TextField } from './field.tsx';
import { FileButton } from './file-button.tsx';
import { Problem } from './problem.tsx';

/** What is written down as material comes in: the roll first, what it needs below. */
export function MaterialForms({ view, onDone }: { view: Materials; onDone: () => void }) {
  return (
    <section class="section no-print stack">
      {view.batches.length > 0 && (
        <details>
          <summary>A roll has come in</summary>
          <RollForm view={view} onDone={onDone} />
        </details>
      )}
      {view.materials.length > 0 && (
        <details>
          <summary>Record a batch</summary>
          <BatchForm view={view} onDone={onDone} />
        </details>
      )}
      {view.items.length > 0 && (
        <details>
          <summary>The freezer was too warm or too cold</summary>
          <ExcursionForm view={view} onDone={onDone} />
        </details>
      )}
      <details open={view.materials.length === 0}>
        <summary>Bring in a material</summary>
        <MaterialImport onDone={onDone} />
      </details>
    </section>
  );
}

function RollForm({ view, onDone }: { view: Materials; onDone: () => void }) {
  const empty = { roll: '', batch: view.batches.at(-1)?.batch ?? '', as: 'frozen', lengthM: '' };
  const [form, setForm] = useState(empty);
  const change = (next: Partial<typeof empty>) => setForm({ ...form, ...next });
  const receiving = usePost(async () => {
    const lengthM = form.lengthM.trim() === '' ? null : Number(form.lengthM.replace(',', '.'));
    await postJson<ItemView>(ROLLS_PATH, { roll: form.roll.trim(), batch: form.batch, as: form.as, lengthM });
    setForm(empty);
    onDone();
  });
  const receive = (event: Event) => {
    event.preventDefault();
    void receiving.post();
  };
  return (
    <form class="stack" onSubmit={receive}>
      <div class="fields">
        <TextField
          label="Code of the roll"
          required
          maxLength={120}
          value={form.roll}
          onValue={(roll) => change({ roll })}
        />
        <ChoiceField
          label="Of batch"
          choices={view.batches.map(({ batch, material }) => ({ value: batch, text: `${batch} (${material.code})` }))}
          value={form.batch}
          onValue={(batch) => change({ batch })}
        />
        <ChoiceField
          label="It came"
          choices={[
            { value: 'frozen', text: 'frozen' },
            { value: 'out', text: 'warm: it is out from now on' },
          ]}
          value={form.as}
          onValue={(as) => change({ as })}
        />
        <TextField
          label="Length, m"
          inputMode="decimal"
          pattern="[0-9]+([.,][0-9]+)?"
          value={form.lengthM}
          onValue={(lengthM) => change({ lengthM })}
        />
      </div>
      {receiving.problem && <Problem problem={receiving.problem} kept="What you typed is kept on this page." />}
      <button type="submit" class="primary" disabled={receiving.isUnderWay}>
        Record the roll
      </button>
    </form>
  );
}

function BatchForm({ view, onDone }: { view: Materials; onDone: () => void }) {
  const empty = { batch: '', material: view.materials[0]?.code ?? '', made: '', expires: '', certificate: '' };
  const [form, setForm] = useState(empty);
  const change = (next: Partial<typeof empty>) => setForm({ ...form, ...next });
  const saving = usePost(async () => {
    const material = view.materials.find(({ code }) => code === form.material);
    const request: SetBatchRequest = {
      batch: form.batch.trim(),
      material: { code: form.material, issue: material?.issue ?? '' },
      made: form.made || null,
      expires: form.expires || null,
      certificate: form.certificate.trim() || null,
    };
    await postJson(BATCHES_PATH, request);
    setForm(empty);
    onDone();
  });
  const save = (event: Event) => {
    event.preventDefault();
    void saving.post();
  };
  return (
    <form class="stack" onSubmit={save}>
      <div class="fields">
        <TextField
          label="Maker’s lot"
          required
          maxLength={120}
          value={form.batch}
          onValue={(batch) => change({ batch })}
        />
        <ChoiceField
          label="Of material"
          choices={view.materials.map(({ code, issue, name }) => ({ value: code, text: `${name}, issue ${issue}` }))}
          value={form.material}
          onValue={(material) => change({ material })}
        />
        <TextField
          label="Made"
          hint="Year, month, day: 2026-03-02"
          pattern="\d{4}-\d{2}-\d{2}"
          value={form.made}
          onValue={(made) => change({ made })}
        />
        <TextField
          label="The maker’s last day"
          hint="Year, month, day: 2027-03-02"
          pattern="\d{4}-\d{2}-\d{2}"
          value={form.expires}
          onValue={(expires) => change({ expires })}
        />
        <TextField
          label="Certificate"
          maxLength={400}
          value={form.certificate}
          onValue={(certificate) => change({ certificate })}
        />
      </div>
      {saving.problem && <Problem problem={saving.problem} kept="What you typed is kept on this page." />}
      <button type="submit" disabled={saving.isUnderWay}>
        Record the batch
      </button>
    </form>
  );
}

function MaterialImport({ onDone }: { onDone: () => void }) {
  const saving = usePost(async (file: File) => {
    await postJson<MaterialView>(MATERIALS_PATH, { document: parsed(await file.text(), file.name) });
    onDone();
  });
  return (
    <div class="stack">
      <p>A document of the form dwellbook-material/1: its lives, and what counts against them.</p>
      <FileButton
        label="Choose a document"
        accept=".json,application/json"
        isUnderWay={saving.isUnderWay}
        onFile={async (file) => void (await saving.post(file))}
      />
      {saving.problem && <Problem problem={saving.problem} />}
    </div>
  );
}

function parsed(text: string, name: string): unknown {
  try {
    return JSON.parse(text);
  } catch (cause) {
    const detail = `${name}: ${cause instanceof Error ? cause.message : 'it cannot be parsed'}`;
    throw new ProblemError({ code: 'document-not-json', status: 0, title: 'This is not JSON', detail, cause });
  }
}
