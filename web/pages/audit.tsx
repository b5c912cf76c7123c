import { useState } from 'preact/hooks';
import type { Audit, AuditLine, AuditVerification } from '../../server/contract/audit.ts';
import { AUDIT_VERIFY_PATH, auditPath } from '../../server/contract/paths.ts';
import { readJson } from '../api.ts';
import { usePageTitle } from '../page-title.ts';
import { AuditEntries } from '../parts/audit-entries.tsx';
import { Notebook, PageHead } from '../parts/notebook.tsx';
import { OutcomeMark } from '../parts/outcome-mark.tsx';
import { Problem } from '../parts/problem.tsx';
import { Shown } from '../parts/shown.tsx';
import { usePost } from '../use-post.ts';
import { useRead } from '../use-read.ts';
import { count } from '../words/figures.ts';

/** Who did what, when and why; and whether every chain still holds. */
export function AuditPage() {
  usePageTitle('Audit trail');
  const reading = useRead<Audit>(auditPath());
  const [earlier, setEarlier] = useState<{ lines: readonly AuditLine[]; next: number | null }>({
    lines: [],
    next: null,
  });
  const [verified, setVerified] = useState<AuditVerification | null>(null);
  const checking = usePost(async () => setVerified(await readJson<AuditVerification>(AUDIT_VERIFY_PATH)));
  const adding = usePost(async (before: number) => {
    const page = await readJson<Audit>(auditPath({ before }));
    setEarlier({ lines: [...earlier.lines, ...page.lines], next: page.next });
  });
  return (
    <Notebook>
      <PageHead title="Audit trail">
        <p class="soft">
          Every write, with who made it and why. Each line carries a hash over itself and all lines before it, so that
          nothing can be changed or taken out unseen.
        </p>
      </PageHead>
      <div class="stack">
        <button type="button" disabled={checking.isUnderWay} onClick={() => void checking.post()}>
          {checking.isUnderWay ? 'Recomputing every chain …' : 'Recompute every chain'}
        </button>
        {checking.problem && <Problem problem={checking.problem} />}
        <div role="status">{verified && <Verified verified={verified} />}</div>
      </div>
      <Shown reading={reading} what="Reading the trail">
        {(audit) => {
          const lines = [...audit.lines, ...earlier.lines];
          const next = earlier.lines.length > 0 ? earlier.next : audit.next;
          return (
            <section class="section">
              <h2>Lines, latest first</h2>
              {lines.length === 0 ? <p>Nothing has been written yet.</p> : <AuditEntries lines={lines} />}
              {adding.problem && <Problem problem={adding.problem} />}
              {next !== null && (
                <p class="section">
                  <button type="button" disabled={adding.isUnderWay} onClick={() => void adding.post(next)}>
                    Earlier lines
                  </button>
                </p>
              )}
            </section>
          );
        }}
      </Shown>
    </Notebook>
  );
}

function Verified({ verified }: { verified: AuditVerification }) {
  const said = `${count(verified.lines, 'line')} and ${count(verified.sources, 'chain')} of readings were recomputed.`;
  return verified.holds ? (
    <p class="notice kept">
      <span class="outcome-line outcome-met">
        <OutcomeMark mark="met" />
        Every chain holds
      </span>
      {said}
    </p>
  ) : (
    <p class="notice grave">
      <span class="outcome-line outcome-not-met">
        <OutcomeMark mark="not-met" />A chain is broken
      </span>
      {said} The first link that does not hold is {verified.firstBroken}. Keep the database as it is and restore from a
      backup beside it.
    </p>
  );
}
