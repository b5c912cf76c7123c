import { useState } from 'preact/hooks';
import { type NominalProgramme, nominalProgramme } from '../../models/cycle/nominal-programme.ts';
import type { Cycles, CycleView } from '../../server/contract/cycles.ts';
import { CYCLES_PATH, cyclePath } from '../../server/contract/paths.ts';
import { readJson } from '../api.ts';
import { usePost } from '../use-post.ts';
import { useRead } from '../use-read.ts';
import { ChoiceField } from './field.tsx';
import { Problem } from './problem.tsx';

/** Takes the programme of a cycle on record, made as its words then say. */
export function ProgrammeOfCycle({ onTake }: { onTake: (cycle: string, made: NominalProgramme) => void }) {
  const reading = useRead<Cycles>(CYCLES_PATH);
  const cycles = reading.value?.cycles ?? [];
  const [chosen, setChosen] = useState(0);
  const taking = usePost(async () => {
    const line = cycles[chosen];
    if (!line) return;
    const view = await readJson<CycleView>(cyclePath(line.code, line.issue));
    onTake(`${view.code} issue ${view.issue}`, nominalProgramme(view.document));
  });
  const problem = reading.problem ?? taking.problem;
  if (problem) return <Problem problem={problem} again={reading.again} />;
  if (cycles.length === 0) return null;
  return (
    <div class="row programme-of-cycle">
      <ChoiceField
        label="Or from a cycle on record"
        value={String(chosen)}
        choices={cycles.map(({ code, issue, status }, n) => ({
          value: String(n),
          text: `${code} issue ${issue}${status === 'released' ? '' : `, ${status}`}`,
        }))}
        onValue={(value) => setChosen(Number(value))}
      />
      <button type="button" class="quiet" disabled={taking.isUnderWay} onClick={() => void taking.post()}>
        Take its programme
      </button>
    </div>
  );
}
