import { parseResin } from '../../models/cure/parse-resin.ts';
import { wordsOfStanding } from '../../models/cure/standing.ts';
import { parseLayout } from '../../models/log/parse-layout.ts';
import { readLog } from '../../models/log/read-log.ts';
import { openLog } from '../files/open-log.ts';
import { type ChannelCure, cureOfChannels } from './cure-of-channels.ts';
import { readDocumentFile } from './read-document.ts';
import { type Command, EXIT, needed, readWords, wholeNumber, wrongUsage } from './usage.ts';

const HELP = `Usage: dwellbook cure --log RUN.csv --layout LAYOUT.json --resin RESIN.json [OPTIONS]

Estimates degree of cure and glass transition along every part and tool thermocouple.

  --log FILE       the recorder's file; several times for the pieces of one run
  --layout FILE    how the file is to be read (dwellbook-layout/1)
  --resin FILE     the resin set (dwellbook-resin/1)
  --every SECONDS  the whole history too, a figure every so many seconds
  --json           prints JSON instead of a table

What comes out is an estimate from a published or fitted set, no measurement.

Exit status: 0 done, 64 wrong usage, 65 the input cannot be read or used, 70 a fault of the program itself.
`;

export const cureCommand: Command = {
  help: HELP,
  async run(args) {
    const { values, positionals } = readWords('cure', args, {
      log: { type: 'string', multiple: true },
      layout: { type: 'string' },
      resin: { type: 'string' },
      every: { type: 'string' },
      json: { type: 'boolean' },
    });
    if (positionals.length > 0) throw wrongUsage('cure', `"${positionals[0]}" is not expected`);
    const logs = values.log ?? [];
    needed('cure', 'log', logs[0]);
    const everyS =
      values.every === undefined ? null : wholeNumber('cure', 'every', values.every, { atLeast: 1, atMost: 86_400 });
    const layout = await readDocumentFile(needed('cure', 'layout', values.layout), parseLayout);
    const resin = await readDocumentFile(needed('cure', 'resin', values.resin), parseResin);
    const files = await Promise.all(logs.map((path) => openLog(path, path)));
    const channels = cureOfChannels(readLog(files, layout).readings, resin, everyS);
    const { code, source } = resin;
    const words = wordsOfStanding(source.status);
    const standing = words === null ? '' : `; ${words}`;
    const answer = { resin: { code, status: source.status, citation: source.citation }, channels };
    process.stdout.write(
      values.json
        ? `${JSON.stringify(answer)}\n`
        : `Resin set ${code} (${source.status}): ${source.citation}${standing}\n${table(channels)}${intervals(channels)}`,
    );
    return EXIT.done;
  },
};

/** A line for each channel: its intervals, or why it has none. */
function intervals(channels: readonly ChannelCure[]): string {
  const about = ([low, high]: readonly [number, number], digits: number) => ((high - low) / 2).toFixed(digits);
  return channels
    .map(({ channel, degreeInterval, tgIntervalC, gelInterval, intervalBecause }) => {
      const said = [
        degreeInterval && `degree ± ${about(degreeInterval, 4)}`,
        tgIntervalC && `Tg ± ${about(tgIntervalC, 1)} °C`,
        gelInterval && `gel ${gelInterval.join(' to ')}`,
      ].filter(Boolean);
      return `${channel}: ${[...said, intervalBecause].join('; ')}\n`;
    })
    .join('');
}

function table(channels: readonly ChannelCure[]): string {
  const head = ['channel', 'degree', 'Tg °C', 'gel', 'vitrifies'];
  const rows = channels.flatMap(({ channel, degree, tgC, gelAt, vitrifiesAt, series }) => [
    [channel, degree.toFixed(4), tgC === null ? '–' : tgC.toFixed(1), gelAt ?? '–', vitrifiesAt ?? '–'],
    ...(series?.t.map((t, n) => [
      `  ${t}`,
      (series.degree[n] ?? 0).toFixed(4),
      series.tgC[n] == null ? '–' : Number(series.tgC[n]).toFixed(1),
    ]) ?? []),
  ]);
  const widths = head.map((_, column) => Math.max(...[head, ...rows].map((row) => row[column]?.length ?? 0)));
  return [head, ...rows]
    .map(
      (row) =>
        `${row
          .map((cell, column) => cell.padEnd(widths[column] ?? 0))
          .join('  ')
          .trimEnd()}\n`,
    )
    .join('');
}
