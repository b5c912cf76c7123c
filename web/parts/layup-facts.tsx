import { temperatureFromCelsius } from '../../models/units.ts';
import type { Debulk, Layup } from '../../server/contract/layups.ts';
import { clock, dayAndClock, lasting } from '../words/clock.ts';
import { asWritten, count, figure, listed } from '../words/figures.ts';
import { shownUnits, zone } from '../workshop.ts';

/** A lay-up in lines; what nobody wrote down says so. */
export function LayupFacts({ layup }: { layup: Layup }) {
  const { tool, thicknessMm, plies, laminate, fibreFraction, beganAt, endedAt, debulks } = layup;
  return (
    <dl class="facts">
      <dt>Tool</dt>
      <dd>{tool === null ? NOT_ON_RECORD : <a href={`/tools/${encodeURIComponent(tool)}`}>{tool}</a>}</dd>
      <dt>Thickness</dt>
      <dd>
        {thicknessMm === null ? NOT_ON_RECORD : asWritten(thicknessMm, 'mm')}
        {plies !== null && `, ${count(plies, 'ply', 'plies')}`}
      </dd>
      <dt>Laminate</dt>
      <dd>
        {laminate?.name ?? NOT_ON_RECORD}
        {fibreFraction !== null && `, ${asWritten(Number((100 * fibreFraction).toFixed(6)), '%')} fibre by volume`}
      </dd>
      <dt>Laid up</dt>
      <dd>{times(beganAt, endedAt)}</dd>
      <dt>Room</dt>
      <dd>{room(layup)}</dd>
      <dt>Debulks</dt>
      <dd>{debulks.length === 0 ? NOT_ON_RECORD : debulksWords(debulks)}</dd>
      <dt>Work order</dt>
      <dd>{layup.workOrder ?? NOT_ON_RECORD}</dd>
      <dt>Customer</dt>
      <dd>{layup.customer ?? NOT_ON_RECORD}</dd>
    </dl>
  );
}

const NOT_ON_RECORD = 'not on record';

function times(beganAt: string | null, endedAt: string | null): string {
  if (beganAt === null && endedAt === null) return NOT_ON_RECORD;
  const from = beganAt === null ? 'beginning not on record' : `from ${dayAndClock(beganAt, zone.value)}`;
  const until = endedAt === null ? 'end not on record' : `to ${dayAndClock(endedAt, zone.value)}`;
  const took = beganAt && endedAt ? `, ${lasting(Date.parse(endedAt) - Date.parse(beganAt))}` : '';
  return `${from}${beganAt && endedAt ? ' ' : ', '}${until}${took}`;
}

function room({ roomC, humidityPercent }: Layup): string {
  const unit = shownUnits.value.temperature;
  const said = [
    roomC === null ? null : figure(temperatureFromCelsius(roomC, unit), unit),
    humidityPercent === null ? null : `${asWritten(humidityPercent, '%')} relative humidity`,
  ].filter((one) => one !== null);
  return said.length === 0 ? NOT_ON_RECORD : said.join(', ');
}

/** Debulks of like length and vacuum in one breath: `6, each 15 min, at 0.9 bar: 07:41, 09:05 …`. */
function debulksWords(debulks: readonly Debulk[]): string {
  const said = debulks.map(debulkWords);
  const times = debulks.flatMap(({ at }) => (at === null ? [] : [clock(at, zone.value)]));
  const isAlike = said.every((words) => words === said[0]);
  const what = isAlike
    ? said[0]
      ? `, each ${said[0]}`
      : ''
    : `: ${said.map((words) => words || 'not said').join('; ')}`;
  return `${debulks.length}${what}${times.length > 0 ? `; at ${listed(times)}` : ''}`;
}

function debulkWords({ minutes, vacuum, vacuumUnit }: Debulk): string {
  return [
    minutes === null ? null : asWritten(minutes, 'min'),
    vacuum === null ? null : `at ${asWritten(vacuum, vacuumUnit ?? '')}`,
  ]
    .filter((one) => one !== null)
    .join(', ');
}
