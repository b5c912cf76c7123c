import { FILM_SOURCE } from '../../models/cure/heat/film-range.ts';
import type { ThicknessRecords } from '../actions/thickness-records.ts';
import { isoFromMs } from '../store/instants.ts';
import { thicknessGaps } from './thickness-gaps.ts';
import type { ThicknessFound } from './thickness-view.ts';

/** What the answer takes for granted, a sentence each: first what was supposed of the faces. */
export function assumptionsOf(found: ThicknessFound, records: ThicknessRecords): string[] {
  return [
    ...ofFaces(found),
    ...ofReadings(found),
    ofStart(found),
    `Heat flows straight through the thickness only: edges, steps and a change of thickness are not seen.`,
    'Laminate and tool touch everywhere without resistance, and no resin flows or bleeds.',
    `Density, specific heat and conductivity stay the same at every temperature and degree of cure (${records.layup.laminate?.source}).`,
    ofHeat(records),
  ];
}

function ofFaces({ asked: { choices, query, films, sensors, channels } }: ThicknessFound): string[] {
  const said: string[] = [];
  const faces = choices.flatMap(({ bag, tool }) => [bag, tool]);
  const unnamed = sensors.filter(
    ({ channel, side }) =>
      channels.includes(channel) && side === 'surface' && channel !== query.bag && channel !== query.tool,
  );
  if (unnamed.length > 0) {
    const names = unnamed.map(({ channel }) => channel).join(', ');
    said.push(
      `The load does not say on which side ${names} ${unnamed.length === 1 ? 'lies' : 'lie'}; ` +
        'each supposition about it is worked out, and the answer is the range between them.',
    );
  }
  for (const side of ['bag', 'tool'] as const) {
    if (query[side] !== undefined) said.push(`${query[side]} was put to the ${side} side by who asked.`);
  }
  if (faces.some(({ meets }) => meets === 'air')) {
    const range =
      films === null ? '' : ` For ${films.of} it is ${films.least} to ${films.most} W/(m² K) (${FILM_SOURCE}).`;
    said.push(`Where air meets a face its heat passes through a film that stays the same all run.${range}`);
  }
  if (faces.some(({ meets }) => meets === 'insulation')) {
    said.push(
      'What the other side meets is not on record: it is bounded by the same temperature and by no heat passing.',
    );
  }
  if (faces.some(({ meets }) => meets === 'tool-thermocouple')) {
    said.push('A thermocouple of the tool is taken to read its far face.');
  }
  return said;
}

function ofReadings(found: ThicknessFound): string[] {
  const { sensors, channels } = found.asked;
  const said = thicknessGaps(found).map(({ channel, fromMs, lastsMs, isBridged }) => {
    const gap = `${(lastsMs / 60_000).toFixed(0)} min from ${isoFromMs(fromMs).replace('.000Z', 'Z')}`;
    return isBridged
      ? `${channel} has no reading for ${gap}: a straight line stands for it, and what was reached cannot be told.`
      : `${channel} were not all read for ${gap}: that stretch is left out, and what was reached cannot be told.`;
  });
  const doubted = found.suspects.filter((channel) => channels.includes(channel));
  if (doubted.length > 0) said.push(`${doubted.join(', ')} may lie and nobody has decided yet; it is believed here.`);
  const lent = sensors.filter(({ channel, role, isOwn }) => channels.includes(channel) && role === 'part' && !isOwn);
  if (lent.length > 0) {
    said.push(`${lent.map(({ channel }) => channel).join(', ')} is not on this part and stands in for its surface.`);
  }
  const excluded = sensors.filter(({ against }) => against === 'excluded').map(({ channel }) => channel);
  if (excluded.length > 0) said.push(`Left out because a person excluded it: ${excluded.join(', ')}.`);
  return said;
}

function ofStart({ asked: { startDegree } }: ThicknessFound): string {
  const from = startDegree.from === 'load' ? 'as the load says' : 'as the resin set has it, for the load says nothing';
  return `The part begins everywhere at a degree of cure of ${startDegree.degree}, ${from}, and at one temperature.`;
}

function ofHeat({ document, layup }: ThicknessRecords): string {
  const { heatOfReaction = 0, basis } = document.thermal ?? {};
  const perKg = `${(heatOfReaction / 1000).toPrecision(4)} kJ for each kg of`;
  return basis === 'resin'
    ? `The reaction gives ${perKg} resin, which is ${((1 - (layup.fibreFraction ?? 0)) * 100).toFixed(1)} % of the volume.`
    : `The reaction gives ${perKg} laminate, fibre and all.`;
}
