import { RESINS_PATH } from '../../server/contract/paths.ts';
import type { Resins } from '../../server/contract/resins.ts';
import { useRead } from '../use-read.ts';
import { ResinStanding } from './resin-status-tag.tsx';
import { Shown } from './shown.tsx';

/** The set a cycle estimates with, and whether it may stand behind a limit. */
export function ResinOfCycle({ code }: { code: string }) {
  const reading = useRead<Resins>(RESINS_PATH);
  return (
    <section class="section stack">
      <h2>Estimates of cure</h2>
      <Shown reading={reading} what="Reading the resins">
        {({ resins }) => {
          const resin = resins.find((one) => one.code === code);
          if (!resin) return <p>By the resin set {code}, which is not on record here.</p>;
          return (
            <>
              <p>
                By the resin set <a href={`/resins/${encodeURIComponent(code)}`}>{code}</a>, {resin.citation}.
              </p>
              <ResinStanding status={resin.status} />
            </>
          );
        }}
      </Shown>
    </section>
  );
}
