import type { Evaluation, Finding, PartEvaluation, Verdict } from '../../models/evaluation/evaluation.ts';
import { count, listed, raised } from './figures.ts';
import { limitName, worstFirst } from './limits.ts';

const WORST = ['does-not-conform', 'cannot-tell', 'pending', 'conforms'] as const satisfies readonly Verdict[];

const VERBS: Readonly<Record<Verdict, readonly [one: string, many: string]>> = {
  conforms: ['conforms', 'conform'],
  'does-not-conform': ['does not conform', 'do not conform'],
  'cannot-tell': ['cannot be told', 'cannot be told'],
  pending: ['is still running', 'are still running'],
};

/** The part that decides a run's verdict: the first of the worst. */
export function worstPart(evaluation: Evaluation): PartEvaluation | null {
  for (const verdict of WORST) {
    const part = evaluation.parts.find((one) => one.verdict === verdict);
    if (part) return part;
  }
  return null;
}

/** A run's verdict in a few sentences: why, what else, and how the other parts came out. */
export function verdictSentences(evaluation: Evaluation): string[] {
  const part = worstPart(evaluation);
  if (!part) return ['No part is named in its load, so nothing was judged.'];
  const parts = evaluation.parts;
  if (parts.length > 1 && evaluation.verdict === 'conforms') {
    return [`Every limit of the cycle was met, for ${listed(parts.map(partName))}.`];
  }
  const [first = '', ...more] = whyOfPart(part);
  const isOneOfMany = evaluation.parts.length > 1;
  return [isOneOfMany ? `${partName(part)}, ${lowered(first)}` : first, ...more, ...othersOf(evaluation, part)];
}

export function whyOfPart(part: PartEvaluation): string[] {
  const findings = worstFirst(part.findings);
  const worst = findings[0];
  if (!worst || worst.outcome === 'met') return [`Every limit of the cycle was met: all ${findings.length}.`];
  if (worst.awaits !== undefined) return awaiting(findings);
  const alike = findings.filter(({ outcome }) => outcome === worst.outcome).length - 1;
  const rest = alike > 0 ? [`${raised(count(alike, 'other limit'))} ${STATES[worst.outcome]}.`] : [];
  const also = otherOutcomes(findings, worst.outcome);
  return [`${limitName(worst.limit)}: ${sentence(worst.because)}`, ...rest, ...also];
}

/** Where the worst hangs on a person's decision, that decision is the reason. */
function awaiting(findings: readonly Finding[]): string[] {
  const channels = [...new Set(findings.flatMap(({ awaits }) => awaits ?? []))];
  const n = findings.filter(({ awaits }) => awaits !== undefined).length;
  const others = findings.filter(({ outcome, awaits }) => outcome !== 'met' && awaits === undefined).length;
  return [
    `Nobody has decided yet whether ${listed(channels)} can be believed; ${count(n, 'limit')} ${n === 1 ? 'hangs' : 'hang'} on it.`,
    others > 0 ? `${raised(count(others, 'other limit'))} cannot be told either.` : 'Everything else was met.',
  ];
}

const STATES: Readonly<Record<Finding['outcome'], string>> = {
  'not-met': 'not met',
  'cannot-tell': 'cannot be told',
  pending: 'not decided yet',
  met: 'met',
};

function otherOutcomes(findings: readonly Finding[], worst: Finding['outcome']): string[] {
  const others = (['cannot-tell', 'pending'] as const).filter((outcome) => outcome !== worst);
  const said = others.flatMap((outcome) => {
    const n = findings.filter((finding) => finding.outcome === outcome).length;
    return n === 0 ? [] : [`${raised(count(n, 'limit'))} ${STATES[outcome]}.`];
  });
  const isRestMet = findings.every(({ outcome }, n) => n === 0 || outcome === 'met');
  return isRestMet && findings.length > 1 ? ['Everything else was met.'] : said;
}

function othersOf(evaluation: Evaluation, part: PartEvaluation): string[] {
  const others = evaluation.parts.filter((other) => other !== part);
  return WORST.flatMap((verdict) => {
    const names = others.filter((other) => other.verdict === verdict).map(partName);
    if (names.length === 0) return [];
    const [one, many] = VERBS[verdict];
    const also = verdict === part.verdict ? ' either' : '';
    return [`${listed(names)} ${names.length === 1 ? one : many}${also}.`];
  });
}

export function partName(part: PartEvaluation): string {
  return part.part ?? 'The load';
}

function lowered(text: string): string {
  return text.charAt(0).toLowerCase() + text.slice(1);
}

/** A reason ends as a sentence does, whoever wrote it. */
export function sentence(text: string): string {
  return /[.!?]$/.test(text) ? raised(text) : `${raised(text)}.`;
}
