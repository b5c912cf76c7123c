import { useEffect, useMemo, useState } from 'preact/hooks';
import type { Resin } from '../../models/cure/resin.ts';
import { readProgramme, typedFrom } from '../../models/cycle/read-programme.ts';
import { celsiusDifferenceFrom } from '../../models/units.ts';
import { RESINS_PATH, resinPath } from '../../server/contract/paths.ts';
import type { Resins, ResinView } from '../../server/contract/resins.ts';
import { programmePlot } from '../charts/programme-plot.ts';
import { ResinPlotFigure } from '../charts/resin-plot-figure.tsx';
import { keepInPageQuery, readPageQuery } from '../page-query.ts';
import { TextField } from '../parts/field.tsx';
import { Problem } from '../parts/problem.tsx';
import { ProgrammeFigures } from '../parts/programme-figures.tsx';
import { ProgrammeNotes } from '../parts/programme-notes.tsx';
import { ProgrammeOfCycle } from '../parts/programme-of-cycle.tsx';
import { ProgrammeRows } from '../parts/programme-rows.tsx';
import { ResinBeside } from '../parts/resin-beside.tsx';
import { useRead } from '../use-read.ts';
import { asWritten } from '../words/figures.ts';
import { trialOf } from '../words/trial.ts';
import {
  firstForm,
  formFromQuery,
  inOtherUnit,
  queryOfForm,
  readStartDegree,
  readUncertainty,
  type TrialForm,
} from '../words/trial-form.ts';
import { programmeWords } from '../words/trial-words.ts';
import { shownUnits } from '../workshop.ts';

/** How the programme in the rows came there. */
interface Origin {
  readonly cycle: string;
  readonly words: readonly string[];
  readonly before: TrialForm;
}

/** A cure at any programme, worked out here at every edit by the same code as a run's. */
export function ResinProgramme({ resin }: { resin: Resin }) {
  const unit = shownUnits.value.temperature;
  const [held] = useState(() => formFromQuery(readPageQuery(), firstForm(resin, unit)));
  const [form, setForm] = useState(held.form);
  const [origin, setOrigin] = useState<Origin | null>(null);
  const [isUntouched, setIsUntouched] = useState(true);
  const list = useRead<Resins>(RESINS_PATH);
  const isOnRecord = list.value?.resins.some(({ code }) => code === form.other && code !== resin.code) ?? false;
  const beside = useRead<ResinView>(isOnRecord ? resinPath(form.other) : null);
  const other = beside.value?.document ?? null;

  const read = useMemo(() => readProgramme(form.programme), [form.programme]);
  const start = readStartDegree(form.startDegree, resin);
  const otherStart = other ? readStartDegree(form.otherStartDegree, other) : null;
  const uncertainty = readUncertainty(form.uncertainty, form.programme.unit);
  const wrong = start.wrong ?? otherStart?.wrong ?? uncertainty.wrong;
  const trials = useMemo(() => {
    if (!read.programme || wrong) return [];
    const uncertaintyK = celsiusDifferenceFrom(uncertainty.value, form.programme.unit);
    const first = trialOf(resin, read.programme, start.value, uncertaintyK);
    return other && otherStart ? [first, trialOf(other, read.programme, otherStart.value, uncertaintyK)] : [first];
  }, [resin, other, form, wrong]);
  const plot = useMemo(() => (trials.length === 0 ? null : programmePlot(trials, unit)), [trials, unit]);

  useEffect(() => {
    if (!isUntouched && read.programme && !wrong) keepInPageQuery(queryOfForm(form));
  }, [form]);
  const change = (next: TrialForm, from: Origin | null = null) => {
    setIsUntouched(false);
    setOrigin(from ?? (next.programme === form.programme ? origin : null));
    setForm(next);
  };
  return (
    <section class="section stack" id="programme">
      <h2>A cure at any programme</h2>
      {held.isUnreadable && isUntouched && (
        <p class="notice amber">
          The programme in this page’s address cannot be read; another stands in its place. Ask whoever sent it for the
          whole address.
        </p>
      )}
      <div class="programme-sheet">
        <div class="stack no-print">
          <ProgrammeRows
            programme={form.programme}
            refusals={read.refusals}
            onChange={(programme) => change({ ...form, programme })}
          />
          {form.programme.unit !== unit && (
            <button type="button" class="link" onClick={() => change(inOtherUnit(form, unit))}>
              Written in {form.programme.unit}; write it in {unit}, to a hundredth
            </button>
          )}
          <ProgrammeOfCycle
            onTake={(cycle, made) =>
              change(
                { ...inOtherUnit(form, made.programme.unit), programme: typedFrom(made.programme) },
                { cycle, words: made.words, before: form },
              )
            }
          />
          {origin && (
            <div class="notice kept">
              <p>
                <b>Made of {origin.cycle}</b>, which is a set of limits, not a curve:
              </p>
              <ul>
                {origin.words.map((sentence) => (
                  <li key={sentence}>{sentence}</li>
                ))}
              </ul>
              <button type="button" class="link" onClick={() => change(origin.before)}>
                Back to what was typed
              </button>
            </div>
          )}
        </div>
        <div class="stack no-print">
          <TextField
            label={`Degree of cure at the start, ${resin.code}`}
            inputMode="decimal"
            value={form.startDegree}
            wrong={start.wrong}
            hint={`Empty: the set’s own, ${asWritten(resin.initialDegree)}.`}
            onValue={(startDegree) => change({ ...form, startDegree })}
          />
          <TextField
            label={`Uncertainty of the thermocouple, ${form.programme.unit} (k = 2)`}
            inputMode="decimal"
            value={form.uncertainty}
            wrong={uncertainty.wrong}
            hint={`2.2 °C (4 °F) is the standard tolerance of type K in ASTM E230 below 293 °C, taken here as an expanded uncertainty. Empty: none.`}
            onValue={(text) => change({ ...form, uncertainty: text })}
          />
          {list.problem && <Problem problem={list.problem} again={list.again} />}
          {list.value && (
            <ResinBeside
              resins={list.value.resins}
              own={resin.code}
              chosen={form.other}
              onChoose={(code) => change({ ...form, other: code, otherStartDegree: '' })}
            />
          )}
          {beside.problem && <Problem problem={beside.problem} again={beside.again} />}
          {other && (
            <TextField
              label={`Degree of cure at the start, ${other.code}`}
              inputMode="decimal"
              value={form.otherStartDegree}
              wrong={otherStart?.wrong}
              hint={`Empty: that set’s own, ${asWritten(other.initialDegree)}.`}
              onValue={(otherStartDegree) => change({ ...form, otherStartDegree })}
            />
          )}
        </div>
      </div>
      {plot ? (
        <>
          <ResinPlotFigure plot={plot} name="The cure">
            <figcaption>{read.programme && programmeWords(read.programme)}</figcaption>
          </ResinPlotFigure>
          <ProgrammeFigures trials={trials} unit={unit} />
          <ProgrammeNotes trials={trials} uncertainty={asWritten(uncertainty.value, form.programme.unit)} />
        </>
      ) : (
        <p class="notice amber">Nothing is drawn while something above is refused; what was typed is kept.</p>
      )}
    </section>
  );
}
