import type { Layout } from '../../models/log/layout.ts';
import type { ImportView } from '../../server/contract/imports.ts';

/** Which layout to begin with: one kept for a recorder, or the one proposed from the file. */
export function LayoutChoice({
  view,
  source,
  proposed,
  onTake,
}: {
  view: ImportView;
  source: string | null;
  proposed: Layout;
  onTake: (recorder: string | null, layout: Layout) => void;
}) {
  const readers = view.knownLayouts.filter(({ reads }) => reads);
  if (readers.length === 0) return null;
  return (
    <fieldset class="row layout-choice">
      <legend>Read by the layout</legend>
      {readers.map((known) => (
        <button
          key={known.recorder}
          type="button"
          class="quiet"
          aria-pressed={source === known.recorder}
          onClick={() => onTake(known.recorder, known.layout)}
        >
          of {known.recorder}
        </button>
      ))}
      <button type="button" class="quiet" aria-pressed={source === null} onClick={() => onTake(null, proposed)}>
        proposed from the file
      </button>
    </fieldset>
  );
}
