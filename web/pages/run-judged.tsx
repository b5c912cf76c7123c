import { useRef, useState } from 'preact/hooks';
import { useLocation } from 'preact-iso';
import { withQuery } from '../../server/contract/paths.ts';
import type { EvaluationView, RunView } from '../../server/contract/runs.ts';
import { RunChart } from '../charts/run-chart.tsx';
import { Decisions } from '../parts/decisions.tsx';
import type { EstimatesTold } from '../parts/estimates-told.tsx';
import { FindingList, focusNextFinding } from '../parts/finding-list.tsx';
import { PartSwitch } from '../parts/part-switch.tsx';
import { RunHead } from '../parts/run-head.tsx';
import { RunMargin } from '../parts/run-margin.tsx';
import { RunPapers } from '../parts/run-papers.tsx';
import { RunVerdict } from '../parts/run-verdict.tsx';
import { partName, worstPart } from '../words/verdicts.ts';

/** A judged run: the verdict first, then what is to be decided, the chart, and the findings beside it. */
export function RunJudged({ run, evaluation, again }: { run: RunView; evaluation: EvaluationView; again: () => void }) {
  const { query, route } = useLocation();
  const [lit, setLit] = useState<string | null>(null);
  const [estimates, setEstimates] = useState<EstimatesTold | null>(null);
  const findings = useRef<HTMLDivElement>(null);
  const parts = evaluation.document.parts;
  const named = parts.find((one) => one.part !== null && one.part === query.part);
  const part = named ?? worstPart(evaluation.document);
  const choose = (name: string | null) => route(withQuery(`/runs/${run.run}`, { part: name }), true);
  return (
    <div class="notebook with-side run-book">
      <div class="margin">
        <RunMargin run={run} part={part?.part ?? null} />
      </div>
      <div class="leaf">
        <RunHead run={run} />
        <RunVerdict evaluation={evaluation.document} />
        <Decisions run={run} evaluation={evaluation.document} onDecided={again} />
        <RunChart
          run={run}
          part={part}
          lit={lit}
          onNext={() => focusNextFinding(findings.current)}
          onEstimates={setEstimates}
        />
      </div>
      <div class="side" ref={findings}>
        <PartSwitch parts={parts} chosen={part} onChoose={choose} />
        {part && <FindingList part={part} run={run} lit={lit} onLight={setLit} />}
        <div class="on-paper">
          {parts
            .filter((one) => one !== part)
            .map((one) => (
              <FindingList key={partName(one)} part={one} run={run} lit={null} onLight={setLit} />
            ))}
        </div>
      </div>
      <div class="rest">
        <RunPapers run={run} evaluation={evaluation} estimates={estimates} again={again} />
      </div>
    </div>
  );
}
