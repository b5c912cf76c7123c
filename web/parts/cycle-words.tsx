import type { ComponentChildren } from 'preact';
import type { Cycle } from '../../models/cycle/cycle.ts';
import { wordsOfCycle } from '../../models/cycle/words-of-cycle.ts';
import { raised } from '../words/figures.ts';

/** Every limit of a cycle in words, defaults included; pointing at one lights it in the picture. */
export function CycleWordsView({ cycle, onLight }: { cycle: Cycle; onLight: (name: string | null) => void }) {
  const words = wordsOfCycle(cycle);
  return (
    <div>
      {words.opening.map((sentence) => (
        <p key={sentence}>{sentence}</p>
      ))}
      <section class="section">
        <h2>Stages</h2>
        {words.stages.map((stage) => (
          <Said key={stage.name} name={stage.name} sentences={stage.sentences} onLight={onLight} />
        ))}
      </section>
      {words.windows.length > 0 && (
        <section class="section">
          <h2>Pressure and vacuum</h2>
          {words.windows.map((window) => (
            <Said key={window.name} name={window.name} sentences={window.sentences} onLight={onLight} />
          ))}
        </section>
      )}
      {words.others.length > 0 && (
        <section class="section">
          <h2>Everything else that is asked</h2>
          {words.others.map((other) => (
            <Said key={other.name} name={other.name} sentences={other.sentences} onLight={onLight} />
          ))}
        </section>
      )}
      {words.assumptions.length > 0 && (
        <section class="section">
          <h2>Not written, so this holds</h2>
          <ul>
            {words.assumptions.map((sentence) => (
              <li key={sentence}>{sentence}</li>
            ))}
          </ul>
        </section>
      )}
    </div>
  );
}

function Said({
  name,
  sentences,
  onLight,
}: {
  name: string;
  sentences: readonly string[];
  onLight: (name: string | null) => void;
}): ComponentChildren {
  return (
    <div class="said" onPointerEnter={() => onLight(name)} onPointerLeave={() => onLight(null)}>
      <h3>{raised(name)}</h3>
      {sentences.map((sentence) => (
        <p key={sentence}>{sentence}</p>
      ))}
    </div>
  );
}
