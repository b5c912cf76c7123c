import { useLocation } from 'preact-iso';
import type { PartView } from '../../server/contract/parts.ts';
import { partThicknessPath, withQuery } from '../../server/contract/paths.ts';
import type { Thickness } from '../../server/contract/thickness.ts';
import { ThicknessCourse, ThicknessProfile } from '../charts/thickness-pictures.tsx';
import { Problem } from '../parts/problem.tsx';
import { ThicknessChoices } from '../parts/thickness-choices.tsx';
import { ThicknessWords } from '../parts/thickness-words.tsx';
import { Waiting } from '../parts/waiting.tsx';
import { useRead } from '../use-read.ts';
import { missingForThickness, placeOfMissing } from '../words/thickness.ts';

/** "The thermocouple was on the surface; was the middle cured, and how hot did it get?" */
export function PartThickness({ view }: { view: PartView }) {
  const { query } = useLocation();
  const missing = missingForThickness(view);
  const runs = view.runs.map(({ line }) => line.run);
  const run = runs.includes(Number(query.run)) ? Number(query.run) : runs[0];
  return (
    <section class="section" id="thickness">
      <h2>Through the thickness</h2>
      {run === undefined ? (
        <p class="soft">It can be answered once a run names this part in its load.</p>
      ) : missing.length > 0 ? (
        <Asked missing={missing} />
      ) : (
        <Answered view={view} run={run} runs={runs} />
      )}
    </section>
  );
}

/** What has to be on record first. */
function Asked({ missing }: { missing: ReturnType<typeof missingForThickness> }) {
  const [first] = missing;
  return (
    <div class="stack">
      <p>
        The thermocouple was on the surface; was the middle cured, and how hot did it get? To answer, this has to be on
        record:
      </p>
      <ul>
        {missing.map(({ what }) => (
          <li key={what}>{what}</li>
        ))}
      </ul>
      {first && (
        <p>
          <a class="button" href={first.page}>
            {first.todo}
          </a>
        </p>
      )}
    </div>
  );
}

const KEYS = ['bag', 'tool', 'bagFilm', 'toolFilm', 'resin'] as const;

function Answered({ view, run, runs }: { view: PartView; run: number; runs: readonly number[] }) {
  const { query, path, route } = useLocation();
  const asked = Object.fromEntries(KEYS.flatMap((key) => (query[key] ? [[key, query[key]]] : [])));
  const reading = useRead<Thickness>(partThicknessPath(view.serial, run, asked));
  const ask = (next: Readonly<Record<string, string>>) => {
    const all = { ...asked, run: String(run), ...next };
    route(`${withQuery(path, all)}#thickness`, true);
  };
  const answer = reading.value;
  return (
    <>
      {reading.problem?.code === 'record-missing' ? (
        <Lacking view={view} run={run} problem={reading.problem} />
      ) : reading.problem ? (
        <Problem problem={reading.problem} again={reading.again} />
      ) : null}
      {answer === null && reading.problem === null && <Waiting what="Working out the cure through the thickness" />}
      {answer && (
        <>
          <ThicknessWords answer={answer} />
          <ThicknessCourse answer={answer} />
          <ThicknessProfile answer={answer} />
        </>
      )}
      <ThicknessChoices
        key={JSON.stringify([run, asked, answer === null])}
        answer={answer}
        run={run}
        runs={runs}
        asked={asked}
        onAsk={ask}
      />
    </>
  );
}

function Lacking({
  view,
  run,
  problem,
}: {
  view: PartView;
  run: number;
  problem: NonNullable<ReturnType<typeof useRead>['problem']>;
}) {
  const place = placeOfMissing(view, run, problem.facts);
  return (
    <div class="notice" role="status">
      <p>{problem.detail}.</p>
      {place && (
        <p>
          <a class="button" href={place.page}>
            {place.todo}
          </a>
        </p>
      )}
    </div>
  );
}
