import type { Resins } from '../../server/contract/resins.ts';
import { ChoiceField } from './field.tsx';

/** Chooses the set that is tried beside the page's own. */
export function ResinBeside({
  resins,
  own,
  chosen,
  onChoose,
}: {
  resins: Resins['resins'];
  own: string;
  chosen: string;
  onChoose: (code: string) => void;
}) {
  const others = resins.filter(({ code }) => code !== own);
  if (others.length === 0) return <p class="soft">No other set is on record to compare with.</p>;
  const isStrange = chosen !== '' && !others.some(({ code }) => code === chosen);
  return (
    <ChoiceField
      label="Beside it, the set"
      value={isStrange ? '' : chosen}
      wrong={isStrange ? `The address names the set "${chosen}"; it is not on record here.` : null}
      choices={[
        { value: '', text: 'none' },
        ...others.map(({ code, status }) => ({ value: code, text: `${code}, ${status}` })),
      ]}
      onValue={onChoose}
    />
  );
}
