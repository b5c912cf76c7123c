import { useState } from 'preact/hooks';
import type { PartMaterialRequest, PartMaterials } from '../../server/contract/materials.ts';
import { partMaterialsPath } from '../../server/contract/paths.ts';
import { postJson } from '../api.ts';
import { usePost } from '../use-post.ts';
import { useRead } from '../use-read.ts';
import { dayAndClock, instantOfWallClock, wallClock } from '../words/clock.ts';
import { itemPage } from '../words/materials.ts';
import { zone } from '../workshop.ts';
import { TextField } from './field.tsx';
import { LifeMark } from './life-lines.tsx';
import { Entry } from './notebook.tsx';
import { Problem } from './problem.tsx';
import { Shown } from './shown.tsx';
import { When } from './when.tsx';

/** What a part was laid up from: each roll or kit with its age as its cure began, and a form to say it. */
export function PartMaterialsSection({ part, onChanged }: { part: string; onChanged: () => void }) {
  const reading = useRead<PartMaterials>(partMaterialsPath(part));
  const again = () => {
    reading.again();
    onChanged();
  };
  return (
    <section class="section">
      <h2>Material</h2>
      <Shown reading={reading} what="Reading what it was laid up from">
        {(view) => (
          <>
            {view.materials.length === 0 ? (
              <p>The rolls it was laid up from, and so their out-life, are not on record.</p>
            ) : (
              <ul class="entries">
                {view.materials.map((material) => (
                  <Entry key={material.item} when={material.laidUpFrom && <When at={material.laidUpFrom} />}>
                    <div class="head">
                      <a href={itemPage({ item: material.item, kind: 'roll' })}>{material.item}</a>
                      <LifeMark outcome={material.state.outcome} />
                    </div>
                    <p>
                      As of {dayAndClock(material.state.at, zone.value)}: {material.state.because}
                    </p>
                    <p class="soft">
                      {[
                        material.material && `${material.material.name}, issue ${material.material.issue}`,
                        material.batch && `batch ${material.batch}`,
                        material.plies !== null && `${material.plies} plies`,
                        material.laidUpFrom === null && 'when it was laid up is not on record',
                        material.laidUpUntil !== null &&
                          `laid up until ${dayAndClock(material.laidUpUntil, zone.value)}`,
                      ]
                        .filter(Boolean)
                        .join(' · ')}
                    </p>
                  </Entry>
                ))}
              </ul>
            )}
            <details class="section no-print">
              <summary>Say which rolls and kits it was laid up from</summary>
              <MaterialsForm key={view.set?.at} view={view} onDone={again} />
            </details>
          </>
        )}
      </Shown>
    </section>
  );
}

interface UseForm {
  readonly item: string;
  readonly plies: string;
  readonly from: string;
  readonly until: string;
}

const EMPTY: UseForm = { item: '', plies: '', from: '', until: '' };

function MaterialsForm({ view, onDone }: { view: PartMaterials; onDone: () => void }) {
  const wall = (at: string | null) => (at === null ? '' : wallClock(at, zone.value).slice(0, 16));
  const [uses, setUses] = useState<readonly UseForm[]>([
    ...view.materials.map(({ item, plies, laidUpFrom, laidUpUntil }) => ({
      item,
      plies: plies === null ? '' : String(plies),
      from: wall(laidUpFrom),
      until: wall(laidUpUntil),
    })),
    EMPTY,
  ]);
  const [reason, setReason] = useState('');
  const change = (i: number, next: Partial<UseForm>) =>
    setUses(uses.map((use, k) => (k === i ? { ...use, ...next } : use)));
  const saving = usePost(async () => {
    const materials = uses.filter(({ item }) => item.trim() !== '').map(requestOf);
    await postJson<PartMaterials>(partMaterialsPath(view.part), { materials, ...(view.set ? { reason } : {}) });
    onDone();
  });
  const save = (event: Event) => {
    event.preventDefault();
    void saving.post();
  };
  return (
    <form class="stack" onSubmit={save}>
      {uses.map((use, i) => (
        <div class="fields" key={i}>
          <TextField
            label="Roll or kit"
            hint="Scan or type"
            maxLength={120}
            value={use.item}
            onValue={(item) => change(i, { item })}
          />
          <TextField
            label="Plies"
            inputMode="numeric"
            pattern="[0-9]+"
            value={use.plies}
            onValue={(plies) => change(i, { plies })}
          />
          <TextField
            label="Laid up from"
            type="datetime-local"
            value={use.from}
            onValue={(from) => change(i, { from })}
          />
          <TextField label="until" type="datetime-local" value={use.until} onValue={(until) => change(i, { until })} />
        </div>
      ))}
      <button type="button" class="quiet" onClick={() => setUses([...uses, EMPTY])}>
        One more
      </button>
      {view.set && (
        <TextField label="Why it is said again" required maxLength={2000} value={reason} onValue={setReason} />
      )}
      {saving.problem && <Problem problem={saving.problem} kept="What you typed is kept on this page." />}
      <button type="submit" disabled={saving.isUnderWay}>
        Keep the materials
      </button>
    </form>
  );
}

function requestOf({ item, plies, from, until }: UseForm): PartMaterialRequest {
  const instant = (wall: string) => {
    const ms = wall === '' ? null : instantOfWallClock(wall, zone.value);
    return ms === null ? null : new Date(ms).toISOString();
  };
  return {
    item: item.trim(),
    plies: plies.trim() === '' ? null : Number(plies),
    laidUpFrom: instant(from),
    laidUpUntil: instant(until),
  };
}
