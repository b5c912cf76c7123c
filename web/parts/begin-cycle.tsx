import type { CycleLine } from '../../server/contract/cycles.ts';
import { ChoiceField } from './field.tsx';

/** Which issue it is cured to: released ones first. */
export function BeginCycle({
  cycles,
  value,
  onValue,
}: {
  cycles: readonly CycleLine[];
  value: string;
  onValue: (value: string) => void;
}) {
  const offered = cycles
    .filter(({ status }) => status !== 'withdrawn')
    .toSorted((a, b) => rank(a) - rank(b) || a.code.localeCompare(b.code));
  return (
    <section class="section">
      <h2>Cycle</h2>
      <div class="fields">
        <ChoiceField
          label="Issue it is cured to"
          choices={[
            { value: '', text: 'not known yet' },
            ...offered.map((line) => ({
              value: `${line.code}\t${line.issue}`,
              text: `${line.code} issue ${line.issue}${line.status === 'released' ? '' : ' (draft)'}: ${line.title}`,
            })),
          ]}
          value={value}
          onValue={onValue}
          hint={
            cycles.length === 0 ? (
              <>
                None is on record; <a href="/cycles/import">bring one in</a>.
              </>
            ) : undefined
          }
        />
      </div>
    </section>
  );
}

function rank({ status }: CycleLine): number {
  return status === 'released' ? 0 : 1;
}
