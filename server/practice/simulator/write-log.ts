import type { ChannelLayout, Layout } from '../../../models/log/layout.ts';
import { encodeText } from './encode-text.ts';
import type { Recorded } from './read-instruments.ts';
import type { Figures, Recorder } from './recorder.ts';
import { type RecorderMishap, type WrittenScans, writtenScans } from './recorder-mishaps.ts';
import { stampBy, wallClockIn } from './wall-clock.ts';

export interface LogFileBytes {
  readonly name: string;
  readonly bytes: Uint8Array;
}

/** The files of one run as its recorder leaves them. */
export function writeLogFiles(
  recorded: Recorded,
  recorder: Recorder,
  { run, startMs, mishaps }: { run: string; startMs: number; mishaps: readonly RecorderMishap[] },
): LogFileBytes[] {
  const pieces = writtenScans(recorded.instantsMs, startMs, mishaps);
  const isCut = mishaps.some((mishap) => mishap.kind === 'last-line-cut');
  return pieces.map((scans, n) => {
    const lines = [...headLines(recorder, run, startMs), ...scanLines(recorded, recorder, scans, startMs)];
    const whole = [...lines, ...(recorder.footer ?? [])].map((line) => line + recorder.lineEnd).join('');
    const text = isCut ? cutInLastLine(whole, recorder.lineEnd) : whole;
    const { encoding = 'utf-8' } = recorder.layout;
    const suffix = pieces.length > 1 ? `-${n + 1}` : '';
    return {
      name: `${run}${suffix}.${recorder.extension}`,
      bytes: encodeText(text, encoding, recorder.byteOrderMark ?? false),
    };
  });
}

/** The file stops in the middle of its last line, as when the power goes while it is written. */
function cutInLastLine(text: string, lineEnd: string): string {
  const from = text.lastIndexOf(lineEnd, text.length - lineEnd.length - 1) + lineEnd.length;
  return text.slice(0, from + Math.floor((text.length - from) * 0.6));
}

function headLines(recorder: Recorder, run: string, startMs: number): string[] {
  const { layout } = recorder;
  const lines = recorder.preamble.map((line) =>
    line.replace('{run}', run).replace('{date}', new Date(startMs).toISOString().slice(0, 10)),
  );
  if (lines.length !== layout.header - 1)
    throw new Error(`${recorder.name}: the preamble is not ${layout.header - 1} lines`);
  lines.push(headingOf(recorder));
  if (layout.units === undefined) return lines;
  const blanks = layout.time.columns.map(() => '');
  const units = [...blanks, ...layout.channels.map(({ unit }) => unit), ...(recorder.extra ?? []).map(() => '')];
  return [...lines, units.join(delimiterOf(layout))];
}

function headingOf({ layout, extra = [] }: Recorder): string {
  const columns = [
    ...layout.time.columns,
    ...layout.channels.map(({ column }) => column),
    ...extra.map((e) => e.column),
  ];
  return columns.join(delimiterOf(layout));
}

function scanLines(recorded: Recorded, recorder: Recorder, scans: WrittenScans, startMs: number): string[] {
  const { layout, extra = [] } = recorder;
  const delimiter = delimiterOf(layout);
  const stamp = stamper(layout, startMs);
  const cells = layout.channels.map((channel) => cellWriter(channel, recorder));
  const tail = extra.map(({ cell }) => delimiter + cell).join('');
  const lines: string[] = [];
  for (const [at, n] of scans.order.entries()) {
    if (scans.headingsBefore.includes(at)) lines.push(headingOf(recorder));
    let line = stamp(scans.stampMs[at]!).join(delimiter);
    for (const [c, cell] of cells.entries()) line += delimiter + cell(recorded.values[c]![n]!);
    lines.push(line + tail);
  }
  return lines;
}

function stamper(layout: Layout, startMs: number): (instantMs: number) => string[] {
  const { time } = layout;
  if ('elapsed' in time) {
    const unitMs = { s: 1000, min: 60_000, h: 3_600_000 }[time.elapsed];
    const decimals = { s: 0, min: 2, h: 5 }[time.elapsed];
    return (instantMs) => [decimal(((instantMs - startMs) / unitMs).toFixed(decimals), layout)];
  }
  const clock = wallClockIn(time.zone);
  if ('serialDays' in time) return (instantMs) => [decimal(serialDay(clock(instantMs)).toFixed(6), layout)];
  const patterns = time.columns.length === 2 ? splitPattern(time.pattern) : [time.pattern];
  const stamps = patterns.map(stampBy);
  return (instantMs) => stamps.map((write) => write(clock(instantMs)));
}

/** Date and time stand in two columns: the pattern's first blank parts them. */
function splitPattern(pattern: string): string[] {
  const blank = pattern.indexOf(' ');
  return [pattern.slice(0, blank), pattern.slice(blank + 1)];
}

/** Days since 1899-12-30, as spreadsheets count them. */
function serialDay(clock: {
  year: number;
  month: number;
  day: number;
  hour: number;
  minute: number;
  second: number;
}): number {
  const ms = Date.UTC(clock.year, clock.month - 1, clock.day, clock.hour, clock.minute, clock.second);
  return (ms - Date.UTC(1899, 11, 30)) / 86_400_000;
}

function cellWriter(channel: ChannelLayout, recorder: Recorder): (value: number) => string {
  const { scale = 1, offset = 0 } = channel;
  const figures = figuresOf(channel, recorder);
  const decimals = Math.max(0, figures.decimals + Math.round(Math.log10(scale)));
  return (value) =>
    Number.isNaN(value) ? recorder.absent : decimal(((value - offset) / scale).toFixed(decimals), recorder.layout);
}

function figuresOf({ role }: ChannelLayout, recorder: Recorder): Figures {
  if (role === 'pressure') return recorder.pressure;
  return role === 'vacuum' || role === 'vacuum-source' ? recorder.vacuum : recorder.temperature;
}

function decimal(figure: string, { decimal: mark = '.' }: Layout): string {
  return mark === ',' ? figure.replace('.', ',') : figure;
}

function delimiterOf({ delimiter = ',' }: Layout): string {
  return delimiter;
}
