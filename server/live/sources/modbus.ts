import type { LiveSource } from '../../../models/log/live-source.ts';
import { growingPause } from './growing-pause.ts';
import { type ModbusPlace, type ModbusPort, openModbus } from './modbus-port.ts';
import { modbusRequests } from './modbus-requests.ts';
import { type ModbusScan, readModbusScan } from './modbus-scan.ts';
import { scanTicks } from './scan-ticks.ts';
import type { OneScan, ReadOnceParts, RunningSource, SourceDriver, SourceParts } from './source.ts';

/** Modbus over TCP or a serial line: a device is asked for its registers at each interval. */
export const modbus: SourceDriver = { start, readOnce };

function start({ document, take, tell, fault, now }: SourceParts): RunningSource {
  const { place, requests, timeoutMs, quietMs } = askedOf(document);
  const pause = growingPause();
  let port: ModbusPort | null = null;
  const drop = async (why: string) => {
    const open = port;
    port = null;
    pause.failed(performance.now());
    tell('cannot-be-reached', why);
    await open?.close();
  };

  const ticks = scanTicks(document.intervalS * 1000, { now, fault }, async (atMs) => {
    if (performance.now() < pause.untilMs) return;
    try {
      port ??= await openModbus(place, timeoutMs);
    } catch (error) {
      return drop((error as Error).message);
    }
    const scan = await readModbusScan(port, requests, document.channels.length, quietMs);
    if (!scan.answered) return drop(scan.because.find((why) => why !== null) ?? 'no answer');
    pause.succeeded();
    if (!scan.gave) return tell('cannot-be-reached', `it answers, but ${refusalsOf(scan)}`);
    tell('reached', refusalsOf(scan));
    // Not waited for: a disk that is full must not keep the next reading from being made. Who takes it says what failed.
    take([{ timeMs: atMs, sequence: null, figures: scan.figures }]).catch(() => undefined);
  });
  return {
    async close() {
      await ticks.close();
      await port?.close();
    },
  };
}

async function readOnce({ document }: ReadOnceParts): Promise<OneScan> {
  const { place, requests, timeoutMs, quietMs } = askedOf({ ...document, intervalS: 4 });
  const port = await openModbus(place, timeoutMs);
  try {
    return await readModbusScan(port, requests, document.channels.length, quietMs);
  } finally {
    await port.close();
  }
}

/** Half the interval is waited for an answer, within these bounds, ms. */
const SHORTEST_WAIT_MS = 200;
const LONGEST_WAIT_MS = 2000;

function askedOf({ reads, channels, intervalS }: LiveSource) {
  const place = reads as ModbusPlace;
  const timeoutMs = Math.min(LONGEST_WAIT_MS, Math.max(SHORTEST_WAIT_MS, intervalS * 500));
  const quietMs = place.kind === 'modbus-rtu' ? timeoutMs : 0;
  return { place, requests: modbusRequests(place, channels), timeoutMs, quietMs };
}

/** What is absent and why, without what the device itself calls not available: that is a reading's own affair. */
function refusalsOf({ because }: ModbusScan): string | null {
  const refusals = [...new Set(because.filter((why) => why !== null && !why.endsWith('"not available"')))];
  return refusals.length === 0 ? null : refusals.join('; ');
}
