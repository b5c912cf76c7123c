import type { PartView } from '../../server/contract/parts.ts';
import { LayupFacts } from './layup-facts.tsx';
import { PartCoupons } from './part-coupons.tsx';
import { PartWorks } from './part-works.tsx';

/** How a part was laid up, its coupons, and what was done to it after cure. */
export function PartLayup({ view, onChanged }: { view: PartView; onChanged: () => void }) {
  const page = `/parts/${encodeURIComponent(view.serial)}/layup`;
  return (
    <>
      <section class="section">
        <h2>Lay-up</h2>
        {view.layup ? (
          <>
            <LayupFacts layup={view.layup} />
            <p class="soft small">
              written by {view.layup.deed.by}
              {view.layup.reason ? `: ${view.layup.reason}` : ''}
            </p>
            <p>
              <a href={page}>Write it again, or see how it was written before</a>
            </p>
          </>
        ) : (
          <>
            <p class="soft">Not on record.</p>
            <a class="button" href={page}>
              Write the lay-up down
            </a>
          </>
        )}
      </section>
      <PartCoupons view={view} onChanged={onChanged} />
      <PartWorks view={view} onChanged={onChanged} />
    </>
  );
}
