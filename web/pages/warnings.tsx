import { useEffect } from 'preact/hooks';
import type { Warnings } from '../../server/contract/live.ts';
import { WARNINGS_PATH } from '../../server/contract/paths.ts';
import { usePageTitle } from '../page-title.ts';
import { Advisory } from '../parts/advisory.tsx';
import { PageHead } from '../parts/notebook.tsx';
import { Shown } from '../parts/shown.tsx';
import { WarningLine } from '../parts/warning-strip.tsx';
import { useLiveVessels } from '../use-live-vessels.ts';
import { useRead } from '../use-read.ts';

/** Every warning that was given: those nobody has acknowledged first. */
export default function WarningsPage() {
  usePageTitle('Warnings');
  const reading = useRead<Warnings>(WARNINGS_PATH);
  const heard = useLiveVessels();
  const told = (heard.value?.vessels ?? []).flatMap(({ warnings }) =>
    warnings.map(({ id, over, acknowledged }) => `${id} ${over} ${acknowledged?.at}`),
  );
  const standing = told.join('|');
  useEffect(() => {
    if (standing !== '') reading.again();
  }, [standing]);
  return (
    <div class="live">
      <PageHead title="Warnings">
        <Advisory />
        <p class="soft">
          A warning is no alarm anyone may rely on: it may come late or not at all. The vessel’s own protection is what
          protects.
        </p>
      </PageHead>
      <Shown reading={reading} what="Reading the warnings">
        {({ warnings }) => <Listed warnings={warnings} again={reading.again} />}
      </Shown>
    </div>
  );
}

function Listed({ warnings, again }: { warnings: Warnings['warnings']; again: () => void }) {
  const latestFirst = warnings.toSorted((a, b) => Date.parse(b.began) - Date.parse(a.began));
  const open = latestFirst.filter(({ acknowledged }) => acknowledged === null);
  const taken = latestFirst.filter(({ acknowledged }) => acknowledged !== null);
  return (
    <>
      <section>
        <h2>Not acknowledged</h2>
        {open.length === 0 && <p class="soft section">None. Each that was given has been acknowledged by name.</p>}
        <ul class="warnings section">
          {open.map((warning) => (
            <WarningLine key={warning.id} warning={warning} onTaken={again} />
          ))}
        </ul>
      </section>
      {taken.length > 0 && (
        <section class="section">
          <h2>Acknowledged</h2>
          <ul class="warnings section">
            {taken.map((warning) => (
              <WarningLine key={warning.id} warning={warning} />
            ))}
          </ul>
        </section>
      )}
    </>
  );
}
