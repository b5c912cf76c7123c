import { labelsPage } from '../../server/contract/record-paths.ts';

/** Leads from a thing to its label. */
export function LabelLink({ kind, code }: { kind: 'part' | 'tool' | 'roll' | 'kit'; code: string }) {
  return (
    <p class="no-print">
      <a href={labelsPage(kind, code)}>Print label</a>
    </p>
  );
}
