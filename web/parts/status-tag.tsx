/** Draft, released, withdrawn: a word in a frame; what holds is the word. */
export function StatusTag({ status }: { status: 'draft' | 'released' | 'withdrawn' }) {
  return <span class={`tag status-${status}`}>{status}</span>;
}
