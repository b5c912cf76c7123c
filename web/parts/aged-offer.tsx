import type { PartMaterials } from '../../server/contract/materials.ts';
import { partMaterialsPath } from '../../server/contract/paths.ts';
import { useRead } from '../use-read.ts';

/** Offers the degree of cure that a part's material had aged to as the start of its cure, and says by which rule. */
export function AgedOffer({ part, at, onTake }: { part: string; at: string; onTake: (degree: string) => void }) {
  const { value } = useRead<PartMaterials>(part === '' ? null : partMaterialsPath(part, { at }));
  const aged = value?.aged;
  if (!aged) return null;
  const { degree } = aged;
  return (
    <div class="aged-offer">
      <p class="soft">{aged.because}</p>
      {degree !== null && (
        <button type="button" class="quiet" onClick={() => onTake(String(Number(degree.toFixed(4))))}>
          Start its cure from {Number(degree.toFixed(4))}
        </button>
      )}
    </div>
  );
}
