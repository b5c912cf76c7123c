import type { Finding } from '../../models/evaluation/evaluation.ts';
import { figureAgainst, raised } from './figures.ts';

const NAMES: Readonly<Record<string, string>> = {
  ceiling: 'Ceiling',
  spread: 'Spread',
  'sensors/working': 'Sensors, working',
  'sensors/own': 'Sensors, own',
  'sensors/must-work': 'Sensors, must work',
  'log/gap': 'Log, longest gap',
  'leak-test': 'Bag leak test',
  'cure/degree': 'Degree of cure, estimate',
  'cure/tg': 'Tg, estimate',
  'cure/pressure-before-gel': 'Pressure before gel, estimate',
  'material/out-life': 'Material, out-life',
  'instruments/calibration': 'Instruments, calibration',
};

/** `dwell 2/time` as a shop says it: `Dwell 2, time`. */
export function limitName(limit: string): string {
  const known = NAMES[limit];
  if (known) return known;
  if (limit.startsWith('window/')) return raised(limit.slice('window/'.length));
  const cut = limit.lastIndexOf('/');
  return cut < 0 ? raised(limit) : `${raised(limit.slice(0, cut))}, ${limit.slice(cut + 1)}`;
}

export function observedFigure(finding: Finding): string {
  return figureAgainst(finding.observed, finding.unit, [finding.atLeast, finding.atMost]);
}

const WORST_FIRST = ['not-met', 'cannot-tell', 'pending', 'met'];

/** Findings worst first; among equals in the order of the cycle. */
export function worstFirst(findings: readonly Finding[]): Finding[] {
  return findings
    .map((finding, place) => ({ finding, place }))
    .sort((a, b) => rank(a.finding) - rank(b.finding) || a.place - b.place)
    .map(({ finding }) => finding);
}

function rank(finding: Finding): number {
  return WORST_FIRST.indexOf(finding.outcome);
}
