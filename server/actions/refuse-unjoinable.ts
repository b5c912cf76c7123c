import { DomainError } from '../../models/errors.ts';
import type { ChannelLayout } from '../../models/log/layout.ts';
import { channelsOf } from '../../models/log/source-channels.ts';
import type { Db } from '../store/database.ts';
import { readSources } from '../store/sources.ts';

/** Refuses a run in which one name would mean two things: its source was set otherwise in its middle. */
export function refuseUnjoinable(db: Db, run: number): void {
  const known = new Map<string, ChannelLayout>();
  for (const channel of readSources(db, run).flatMap(({ layout }) => channelsOf(layout))) {
    const { name, role, unit } = known.get(channel.name) ?? channel;
    known.set(name, channel);
    if (role === channel.role && unit === channel.unit) continue;
    throw new DomainError(
      'state-conflict',
      `"${name}" was ${role} in ${unit} first and ${channel.role} in ${channel.unit} later; begin the run after that`,
      { channel: name },
    );
  }
}
