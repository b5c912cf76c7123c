import type { ResinStatus } from '../../models/cure/resin.ts';
import { wordsOfStanding } from '../../models/cure/standing.ts';
import type { Cycle } from '../../models/cycle/cycle.ts';
import { limitTitle } from '../../models/cycle/limits-of-cycle.ts';
import type { Evaluation, Finding, Outcome, PartEvaluation, Verdict } from '../../models/evaluation/evaluation.ts';

const VERDICT_WORDS: Readonly<Record<Verdict, string>> = {
  conforms: 'conforms',
  'does-not-conform': 'DOES NOT CONFORM',
  'cannot-tell': 'CANNOT TELL',
  pending: 'pending',
};

const OUTCOME_WORDS: Readonly<Record<Outcome, string>> = {
  met: 'met',
  'not-met': 'NOT MET',
  'cannot-tell': 'cannot tell',
  pending: 'pending',
};

/** An evaluation for a person at a terminal: verdict first, then what is open, then each part's findings. */
export function evaluationTable(evaluation: Evaluation, cycle: Cycle): string {
  const { log, sensors, decisions, parts } = evaluation;
  const lines = [
    `${cycle.code} issue ${cycle.issue}, ${cycle.title}: ${VERDICT_WORDS[evaluation.verdict]}`,
    `${log.scans} scans from ${log.from} until ${log.until}`,
    ...log.repairs.map(({ lines: [first, last], because }) => `repaired, lines ${first} to ${last}: ${because}`),
    ...log.passedOver.map(({ kind, lines: [first, last] }) => `passed over, lines ${first} to ${last}: ${kind}`),
    ...sensors.flatMap(({ channel, exclusion }) =>
      exclusion === null ? [] : [`${channel} excluded from ${exclusion.from}: ${exclusion.reason} (${exclusion.by})`],
    ),
  ];
  if (decisions.length > 0) lines.push('', 'Somebody has to decide:');
  for (const { channel, kind, because, changes } of decisions) {
    lines.push(`  ${channel} may be ${kind}: ${because}`, `    changes ${changes.join(', ')}`);
  }
  const standing = evaluation.resin && wordsOfStanding(evaluation.resin.status as ResinStatus);
  if (standing) lines.push('', `Resin set ${evaluation.resin?.code} is ${standing}`);
  for (const part of parts) lines.push('', ...partLines(part, cycle));
  if (evaluation.assumptions.length > 0)
    lines.push('', 'Not written in the cycle, so:', ...indented(evaluation.assumptions));
  return `${lines.join('\n')}\n`;
}

function partLines(part: PartEvaluation, cycle: Cycle): string[] {
  const name = part.part ?? 'The load';
  const own = part.ownSensors || part.part === null ? '' : ', none of them its own';
  const estimates =
    part.withoutEstimates === part.verdict ? '' : `; without estimates: ${VERDICT_WORDS[part.withoutEstimates]}`;
  const rows = part.findings.map((finding) => [
    OUTCOME_WORDS[finding.outcome],
    limitTitle(cycle, finding.limit),
    observed(finding),
    asked(finding),
    finding.sensor ?? '',
  ]);
  const widths = [0, 1, 2, 3].map((column) => Math.max(...rows.map((row) => row[column]?.length ?? 0), 0));
  return [
    `${name}: ${VERDICT_WORDS[part.verdict]}${estimates}`,
    `  judged by ${part.judgedBy.join(', ') || 'no sensor'}${own}`,
    ...(part.notEstimated ?? []).map(({ channel, because }) => `  no estimate of cure along ${channel}: ${because}`),
    ...part.findings.flatMap((finding, n) => {
      const cells = rows[n]?.map((cell, column) => cell.padEnd(widths[column] ?? 0)) ?? [];
      const line = `  ${cells.join('  ').trimEnd()}`;
      return finding.outcome === 'met' && finding.forgiven === undefined ? [line] : [line, `      ${finding.because}`];
    }),
  ];
}

function observed({ observed: figure, unit }: Finding): string {
  return figure === null ? '–' : `${shown(figure)} ${unit}`.trim();
}

function asked({ atLeast, atMost, unit }: Finding): string {
  if (atLeast !== null && atMost !== null) return `asked ${shown(atLeast)} to ${shown(atMost)} ${unit}`.trim();
  if (atLeast !== null) return `asked at least ${shown(atLeast)} ${unit}`.trim();
  return atMost === null ? '' : `asked at most ${shown(atMost)} ${unit}`.trim();
}

/** Only what is shown is rounded: to four digits, whole figures whole. */
function shown(figure: number): string {
  return Number.isInteger(figure) ? String(figure) : String(Number(figure.toPrecision(4)));
}

function indented(sentences: readonly string[]): string[] {
  return sentences.map((sentence) => `  ${sentence}`);
}
