import { figuresFor } from '../run/calibrated-load.ts';
import { calibrationIn } from '../run/calibration-in.ts';
import type { RunChannel } from '../run/channel.ts';
import type { Calibration, InstrumentRecords } from '../run/instrument-records.ts';
import type { Outcome } from './evaluation.ts';
import { type Found, worst } from './finding.ts';
import type { Judgement } from './judgement.ts';
import { usesAir } from './log-gap-limit.ts';
import { channelsFor } from './pressure-scale.ts';

const LIMIT = 'instruments/calibration';

/** `instruments/calibration`: the instrument of every channel a limit looks at, in calibration on the day of the run. */
export function calibrationLimit(j: Judgement): Found {
  const { instruments } = j;
  if (instruments === null) return { limit: LIMIT, outcome: 'cannot-tell', unit: '', because: 'Not recorded.' };
  const standings = usedChannels(j).map((channel) => standingOf(j, instruments, channel));
  const outcome = worst(standings.map((one) => one.outcome));
  const telling = standings.filter((one) => one.outcome === outcome);
  const known = { limit: LIMIT, outcome, unit: '' };
  if (outcome !== 'met') {
    const more = telling.length <= MOST_TOLD ? '' : `, and so for ${telling.length - MOST_TOLD} more`;
    const told = telling.slice(0, MOST_TOLD).map(({ because }) => because);
    return { ...known, sensor: telling[0]!.channel, because: `${told.join('; ')}${more}.` };
  }
  const [only] = telling;
  if (only !== undefined && telling.length === 1) return { ...known, because: `${only.because}.` };
  const first = telling.reduce((a, b) => (b.due < a.due ? b : a));
  const days = daysOf(instruments);
  return {
    ...known,
    because: `All ${telling.length} instruments were in calibration on ${days}; first due is ${first.named}, on ${first.due}.`,
  };
}

const MOST_TOLD = 3;

/** How one channel's instrument stood. `due` is the last day its calibration holds. */
interface Standing {
  readonly channel: string;
  readonly named: string;
  readonly outcome: Outcome;
  readonly due: string;
  readonly because: string;
}

function standingOf({ digest }: Judgement, records: InstrumentRecords, { layout }: RunChannel): Standing {
  const record = records.channels.find(({ channel }) => channel === layout.name);
  const standing = (outcome: Outcome, because: string, due = ''): Standing => ({
    channel: layout.name,
    named: `${record?.instrument ?? 'none'} at ${layout.name}`,
    outcome,
    due,
    because,
  });
  if (record === undefined) return standing('cannot-tell', `No instrument is on record for ${layout.name}`);
  const { calibration, ranOut, replacedBy } = record;
  const named = `${record.instrument} at ${layout.name}`;
  if (replacedBy !== null) {
    return standing('cannot-tell', `${named} gave its place to ${replacedBy} during the run`);
  }
  if (calibration === null) {
    return ranOut === null
      ? standing('cannot-tell', `No calibration of ${named} that holds on ${records.from} is on record`)
      : standing('not-met', `${named} was due on ${ranOut}, and the run began on ${records.from}`);
  }
  const layouts = digest.channels.map((channel) => channel.layout);
  if (figuresFor(record, layout, layouts) === null) {
    return standing(
      'cannot-tell',
      `${named} was calibrated in ${calibration.unit}, ${whyNot(calibration, layout.unit)}`,
    );
  }
  if (calibration.until < records.until) {
    return standing('not-met', `${named} was due on ${calibration.until}, and the run ended on ${records.until}`);
  }
  const { until } = calibration;
  return standing('met', `${named} was in calibration on ${daysOf(records)}, due on ${until}`, until);
}

function daysOf({ from, until }: InstrumentRecords): string {
  return until === from ? from : `${from} and until ${until}`;
}

function whyNot(calibration: Calibration, unit: string): string {
  return calibrationIn(calibration, unit) === null
    ? `which cannot be applied to a channel in ${unit}`
    : 'and the correction of a cold junction comes too late; give its channel an offset in the layout';
}

/** Channels a limit of the part looks at: its thermocouples, the air where it is asked for, and those of its windows. */
function usedChannels(j: Judgement): RunChannel[] {
  const windows = (j.cycle.windows ?? []).flatMap(({ quantity }) => channelsFor(j, quantity));
  const air = usesAir(j.cycle) ? j.air : [];
  return [...new Set([...[...j.sensors, ...air].map(({ channel }) => channel), ...windows])];
}
