import type { ProblemError } from '../problem-error.ts';

/** An error says what happened, what was kept and what to do; facts as the server gave them. */
export function Problem({ problem, again, kept }: { problem: ProblemError; again?: () => void; kept?: string }) {
  // What the sentence says already is not said again.
  const facts = Object.entries(problem.facts).filter(([, value]) => !problem.detail.includes(String(value)));
  return (
    <div class="notice grave" role="alert">
      <h2>{problem.title}</h2>
      <p class="breakable">{problem.detail}</p>
      {problem.errors.length > 0 && (
        <ul>
          {problem.errors.map((error) => (
            <li key={error.pointer + error.detail}>
              <code>{error.pointer}</code> {error.detail}
            </li>
          ))}
        </ul>
      )}
      {facts.length > 0 && (
        <dl class="facts small">
          {facts.map(([name, value]) => (
            <Fact key={name} name={name} value={String(value)} />
          ))}
        </dl>
      )}
      {kept && <p>{kept}</p>}
      {problem.instance && <p class="small">Written to the server's log as {problem.instance}.</p>}
      {again && (
        <button type="button" onClick={again}>
          Try again
        </button>
      )}
    </div>
  );
}

function Fact({ name, value }: { name: string; value: string }) {
  return (
    <>
      <dt>{name.replace(/([A-Z])/g, ' $1').toLowerCase()}</dt>
      <dd class="breakable">{value}</dd>
    </>
  );
}
