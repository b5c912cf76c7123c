import { workshop } from '../workshop.ts';

/** What an empty workshop does first, and why; steps already taken are said to be. */
export function FirstSteps() {
  const counts = workshop.value?.counts;
  const steps = [
    {
      isTaken: (counts?.vessels ?? 0) > 0,
      what: <a href="/workshop">Name the workshop and its vessels</a>,
      why: 'Runs are found again by the oven or autoclave they ran in, and times are shown in the shop’s zone.',
    },
    {
      isTaken: (counts?.cycles ?? 0) > 0,
      what: <a href="/cycles/import">Bring in a cycle</a>,
      why: 'A run is judged against one issue of a written cycle. Without one it is kept, but nobody can say what it came to.',
    },
    {
      isTaken: (counts?.runs ?? 0) > 0,
      what: <a href="/import">Import a recorder’s file</a>,
      why: 'Drop the file as the recorder wrote it. Its layout is proposed beside its first lines, and kept for the next one.',
    },
  ];
  return (
    <section class="section" aria-labelledby="first">
      <h2 id="first">Nothing has been logged yet. Do this first</h2>
      <ol class="entries">
        {steps.map((step, n) => (
          <li class="entry" key={step.why}>
            <div class="when">
              <b>{n + 1}</b> {step.isTaken ? 'done' : ''}
            </div>
            <div class="head">
              <h3>{step.what}</h3>
            </div>
            <p class="soft">{step.why}</p>
          </li>
        ))}
      </ol>
    </section>
  );
}
