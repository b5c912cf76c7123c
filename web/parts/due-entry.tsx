import type { Need } from '../../server/contract/now.ts';
import { Entry } from './notebook.tsx';
import { OutcomeMark } from './outcome-mark.tsx';

type Due = Extract<Need, { readonly due: string }>;

/** What runs out soon, or has run out, and where to see to it. */
export function DueEntry({ need }: { need: Due }) {
  const mark = need.isOver ? 'not-met' : 'awaits';
  const { href, name, what, more } = wordsOf(need);
  return (
    <Entry when={<time dateTime={need.due}>{need.due}</time>}>
      <div class="head">
        <a href={href}>{name}</a>
        <span class={`outcome-line outcome-${mark}`}>
          <OutcomeMark mark={mark} />
          {what} {need.isOver ? 'was due on' : 'due on'} {need.due}
        </span>
      </div>
      {more && <p class="soft">{more}</p>}
    </Entry>
  );
}

export function keyOfDue(need: Due): string {
  return `${need.kind} ${wordsOf(need).name} ${wordsOf(need).what}`;
}

function wordsOf(need: Due): { href: string; name: string; what: string; more: string } {
  switch (need.kind) {
    case 'calibration-due': {
      const href = `/instruments/${encodeURIComponent(need.instrument)}`;
      return { href, name: need.instrument, what: 'Calibration', more: need.places.join(', ') };
    }
    case 'survey-due': {
      const what = need.what === 'uniformity survey' ? 'Uniformity survey' : 'System accuracy test';
      return { href: `/vessels/${encodeURIComponent(need.vessel)}`, name: need.vessel, what, more: '' };
    }
    case 'batch-ends': {
      const href = `/materials/${encodeURIComponent(need.material)}`;
      return { href, name: `Batch ${need.batch}`, what: 'Shelf life', more: 'Rolls of it are still here.' };
    }
  }
}
