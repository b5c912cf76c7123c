import type { Cycle } from '../../../models/cycle/cycle.ts';
import type { SimulationPlan } from '../../../server/practice/simulator/simulation-plan.ts';
import type { Truth } from '../../../server/practice/simulator/truth.ts';

/** What must come of a case; `observed` is worked out from the noise-free history alone. */
export interface ExpectedFinding {
  readonly limit: string;
  readonly outcome: 'met' | 'not-met' | 'cannot-tell' | 'pending';
  readonly observed?: number;
  readonly within?: number;
  readonly sensor?: string;
}

export interface ExpectedOutcome {
  readonly verdict: 'conforms' | 'does-not-conform' | 'cannot-tell';
  readonly exit: 0 | 1 | 2;
  readonly findings: readonly ExpectedFinding[];
  readonly parts?: Readonly<
    Record<string, { readonly verdict: string; readonly findings: readonly ExpectedFinding[] }>
  >;
  readonly notFindings?: readonly string[];
  readonly faults?: Readonly<Record<string, string>>;
  readonly repairs?: true;
  readonly cure?: readonly {
    readonly channel: string;
    readonly degree: number;
    readonly tgC: number;
    readonly gelAt: string;
    readonly within: { readonly degree: number; readonly tgC: number; readonly gelS: number };
  }[];
}

/** A whole run simulated in a dialect of its own, with the outcome its construction gives it. */
export interface PracticeCase {
  readonly name: string;
  readonly what: string;
  readonly plan: SimulationPlan;
  readonly args?: readonly string[];
  readonly isCureEstimated?: true;
  readonly expects: (truth: Truth) => ExpectedOutcome;
}

/** What the cases' cycles have in common. */
export const CYCLE: Pick<Cycle, 'format' | 'issue' | 'judgedBy' | 'origin'> = {
  format: 'dwellbook-cycle/1',
  issue: '1',
  judgedBy: 'part',
  origin: { document: 'invented for practice' },
};

/** The classic clock: the last in opens it, the first out closes it. */
export const LAGGING_TO_FIRST = { opens: 'lagging-enters', closes: 'first-leaves' } as const;
