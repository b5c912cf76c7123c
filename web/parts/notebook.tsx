import type { ComponentChildren } from 'preact';

/** A page of the book: what belongs to time in the margin, the page, and what stands beside it. */
export function Notebook({
  margin,
  side,
  children,
}: {
  margin?: ComponentChildren;
  side?: ComponentChildren;
  children: ComponentChildren;
}) {
  return (
    <div class={side ? 'notebook with-side' : 'notebook'}>
      <div class="margin">{margin}</div>
      <div class="leaf">{children}</div>
      {side && <div class="side">{side}</div>}
    </div>
  );
}

export function PageHead({ title, children }: { title: ComponentChildren; children?: ComponentChildren }) {
  return (
    <header class="page-head">
      <h1 tabIndex={-1}>{title}</h1>
      {children}
    </header>
  );
}

/** One line of the book; `when` stands in the margin. */
export function Entry({ when, children }: { when?: ComponentChildren; children: ComponentChildren }) {
  return (
    <li class="entry">
      <div class="when">{when}</div>
      {children}
    </li>
  );
}
