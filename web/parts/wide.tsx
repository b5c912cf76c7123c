import type { ComponentChildren } from 'preact';

/** Something wider than a narrow screen: it scrolls by itself, with the keyboard too. */
export function Wide({ label, children }: { label: string; children: ComponentChildren }) {
  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: without focus a keyboard cannot scroll it
    <section class="table-scroll" tabIndex={0} aria-label={label}>
      {children}
    </section>
  );
}
