import type { Layout } from '../../models/log/layout.ts';
import { delimiterName } from '../words/layouts.ts';
import { Wide } from './wide.tsx';

/** The file's own first lines, with what each line is taken for. */
export function FirstLines({ name, lines, layout }: { name: string; lines: readonly string[]; layout: Layout | null }) {
  return (
    <figure class="first-lines">
      <figcaption>
        First lines of <strong class="breakable">{name}</strong>
      </figcaption>
      <Wide label={`First lines of ${name}`}>
        <ol>
          {lines.map((line, n) => {
            const taken = takenFor(n + 1, layout);
            return (
              <li key={n} class={taken ? `is-${taken.kind}` : ''}>
                <span class="taken">{taken?.word}</span> <code>{line === '' ? ' ' : showTabs(line)}</code>
              </li>
            );
          })}
        </ol>
      </Wide>
      {layout && <p class="soft small">Cells apart by {delimiterName(layout.delimiter ?? ',')}.</p>}
    </figure>
  );
}

function takenFor(line: number, layout: Layout | null): { kind: string; word: string } | null {
  if (!layout) return null;
  if (line === layout.header) return { kind: 'header', word: 'headings' };
  if (line === layout.units) return { kind: 'units', word: 'units' };
  if (line === firstReadingOf(layout)) return { kind: 'reading', word: 'first reading' };
  if (line > firstReadingOf(layout)) return { kind: 'reading', word: '' };
  return { kind: 'before', word: '' };
}

export function firstReadingOf(layout: Layout): number {
  return layout.firstReading ?? Math.max(layout.header, layout.units ?? 0) + 1;
}

function showTabs(line: string): string {
  return line.replaceAll('\t', ' → ');
}
