/** What the chart of a part says is estimated over its run. */
export interface EstimatesTold {
  readonly part: string | null;
  readonly sentences: readonly string[];
}

export function EstimatesToldList({ told: { part, sentences } }: { told: EstimatesTold }) {
  if (sentences.length === 0) return null;
  return (
    <div class="section">
      <h3>Along the run{part === null ? '' : ` of ${part}`}, estimated</h3>
      <ul>
        {sentences.map((sentence) => (
          <li key={sentence}>{sentence}</li>
        ))}
      </ul>
    </div>
  );
}
