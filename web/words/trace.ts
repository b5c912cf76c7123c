import type { OverlayEvent, OverlayStrip } from '../../server/contract/comparison.ts';
import type { HeldPart, HoldDocument, KinKind, Shared } from '../../server/contract/trace.ts';
import { day } from './clock.ts';
import { count, listed } from './figures.ts';

/** What a list may be made by, in the words of a workshop. */
export const KIN_WORDS: Readonly<Record<KinKind, string>> = {
  load: 'same load',
  kit: 'same kit',
  roll: 'same roll',
  batch: 'same batch',
  tool: 'same tool',
  'bag-line': 'same bag line',
  thermocouple: 'same thermocouple',
  vessel: 'same vessel',
  cycle: 'same cycle issue',
  operator: 'load set by the same person',
};

/** Those that a list begins with; the others widen it to most of a workshop. */
export const CLOSE_KIN: readonly KinKind[] = ['load', 'kit', 'roll', 'batch', 'tool', 'bag-line', 'thermocouple'];

const LACK_WORDS: Readonly<Record<KinKind, string>> = {
  load: 'no load',
  kit: 'no kit',
  roll: 'no roll',
  batch: 'no batch',
  tool: 'no tool',
  'bag-line': 'no bag line',
  thermocouple: 'no thermocouple',
  vessel: 'no vessel',
  cycle: 'no cycle issue',
  operator: 'nobody who set its load',
};

export function whereWords(where: HeldPart['whereabouts']): string {
  if (where === null) return 'Whereabouts not on record';
  return where.place === 'shipped'
    ? `Shipped to ${where.customer} on ${where.since}`
    : `In the shop since ${where.since}`;
}

/** Those that have it are named where not all that the list began from do. */
export function reasonWords(
  { shared: at, runs }: HeldPart['because'][number],
  shared: readonly Shared[],
  failedParts: number,
): string {
  const found = shared[at];
  if (found === undefined) return '';
  const isAll = found.failed.length === failedParts;
  const inRuns = runs.length === 0 || found.kind === 'load' ? '' : ` in run ${listed(runs.map(String))}`;
  return `${found.what}${inRuns}${isAll ? '' : `, as ${listed(found.failed)}`}`;
}

/** What could have been missed, a sentence each. */
export function completenessWords({ completeness }: HoldDocument): string[] {
  const { parts, runsWithoutLoad, runsWithoutVessel, notFollowed } = completeness;
  const lacking: readonly (readonly [number, string])[] = [
    [completeness.withoutRoll, 'roll or kit'],
    [completeness.withoutTool, 'tool'],
    [completeness.withoutBagLine, 'bag line'],
    [completeness.withoutThermocouple, 'thermocouple of their own'],
    [completeness.withoutRun, 'run'],
  ];
  return [
    ...notFollowed.map(
      ({ serial, lacks }) =>
        `Of ${serial}, which the list began from, ${listed(lacks.map((kind) => LACK_WORDS[kind]))} is on record: nothing could be followed there.`,
    ),
    ...lacking.flatMap(([lack, what]) =>
      lack === 0 ? [] : [`${lack} of ${count(parts, 'part')} have no ${what} on record and may be missing here.`],
    ),
    ...(runsWithoutLoad.length === 0
      ? []
      : [`What lay in ${runWords(runsWithoutLoad)} is not on record: its parts may be missing here.`]),
    ...(runsWithoutVessel.length === 0
      ? []
      : [
          `The vessel of ${runWords(runsWithoutVessel)} is not on record: bag lines and thermocouples were not followed there.`,
        ]),
  ];
}

function runWords(runs: readonly number[]): string {
  return runs.length === 1 ? `run ${runs[0]}` : `runs ${listed(runs.map(String))}`;
}

/** By what and when a list was made, in a sentence. */
export function criteriaWords({ kinds, from, until }: HoldDocument, zone: string): string {
  const by = listed(kinds.map((kind) => KIN_WORDS[kind]));
  if (from === null && until === null) return `By ${by}; runs of all dates.`;
  const since = from === null ? '' : ` from ${day(from, zone)}`;
  const to = until === null ? '' : ` until ${day(until, zone)}`;
  return `By ${by}; runs${since}${to}.`;
}

export const EVENT_WORDS: Readonly<Record<OverlayEvent, string>> = {
  'heat-on': 'heat-on',
  'dwell-opens': 'the opening of the first dwell',
  gel: 'the first estimated gel',
  vent: 'the venting of the bag',
};

export const STRIP_WORDS: Readonly<Record<OverlayStrip['what'], string>> = {
  coldest: 'Coldest judged sensor',
  vacuum: 'Bag vacuum',
  pressure: 'Vessel pressure',
  degree: 'Estimated degree of cure, least',
};
