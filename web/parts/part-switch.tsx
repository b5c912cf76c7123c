import type { PartEvaluation } from '../../models/evaluation/evaluation.ts';
import { partName } from '../words/verdicts.ts';

/** Which part is looked at, where there is more than one. */
export function PartSwitch({
  parts,
  chosen,
  onChoose,
}: {
  parts: readonly PartEvaluation[];
  chosen: PartEvaluation | null;
  onChoose: (part: string | null) => void;
}) {
  if (parts.length < 2) return null;
  return (
    <fieldset class="part-switch">
      <legend>Part</legend>
      {parts.map((one) => (
        <button
          key={partName(one)}
          type="button"
          class="quiet"
          aria-pressed={one.part === chosen?.part}
          onClick={() => onChoose(one.part)}
        >
          {partName(one)}
        </button>
      ))}
    </fieldset>
  );
}
