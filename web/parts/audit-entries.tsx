import type { AuditLine } from '../../server/contract/audit.ts';
import { Entry } from './notebook.tsx';
import { When } from './when.tsx';

/** Lines of the audit trail: what was done, to what, by whom and why. */
export function AuditEntries({ lines }: { lines: readonly AuditLine[] }) {
  return (
    <ul class="entries">
      {lines.map((line) => (
        <Entry key={line.n} when={<When at={line.at} seconds />}>
          <div class="head">
            <h3>{line.verb.replaceAll('-', ' ')}</h3>
            <Subject subject={line.subject} />
            <span class="soft">by {line.by}</span>
          </div>
          {line.why && <p>{line.why}</p>}
          <p class="soft small breakable">
            line {line.n} · <code>{line.sha256.slice(0, 16)}</code>
          </p>
        </Entry>
      ))}
    </ul>
  );
}

const PAGES: Readonly<Record<string, string>> = {
  run: '/runs/',
  part: '/parts/',
  cycle: '/cycles/',
  resin: '/resins/',
  material: '/materials/',
  roll: '/rolls/',
  kit: '/kits/',
  import: '/imports/',
  recorder: '/recorders/',
};

function Subject({ subject }: { subject: string }) {
  const cut = subject.indexOf('/');
  const page = cut < 0 ? undefined : PAGES[subject.slice(0, cut)];
  const text = subject.replace('/', ' ');
  return page ? <a href={page + subject.slice(cut + 1)}>{text}</a> : <span>{text}</span>;
}
