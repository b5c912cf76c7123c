/**
 * Pushes scans as loggers do, in a process of its own: every vessel once a second, each at its own moment of it.
 * Says at the end how long acknowledgements took, ms, sorted.
 */
interface Orders {
  readonly origin: string;
  readonly keys: readonly string[];
  readonly channels: readonly string[];
  readonly seconds: number;
}

const { origin, keys, channels, seconds } = JSON.parse(process.argv[2] ?? '') as Orders;
const tookMs: number[] = [];
let missed = 0;

await Promise.all(keys.map((key, n) => sendEachSecond(key, (1000 * n) / keys.length)));
process.stdout.write(JSON.stringify({ tookMs: tookMs.sort((a, b) => a - b), missed }));

async function sendEachSecond(key: string, offsetMs: number): Promise<void> {
  const startMs = performance.now() + offsetMs;
  for (let second = 0; second < seconds; second += 1) {
    await new Promise((resolve) => setTimeout(resolve, Math.max(0, startMs + 1000 * second - performance.now())));
    const at = new Date();
    const values = Object.fromEntries(channels.map((name, n) => [name, figureAt(second, n)]));
    const body = JSON.stringify({ scans: [{ at: at.toISOString(), sequence: second, values }] });
    const headers = { 'content-type': 'application/json', authorization: `Bearer ${key}` };
    const sentMs = performance.now();
    const response = await fetch(`${origin}/api/push`, { method: 'POST', headers, body });
    const answer = (await response.json()) as { kept?: number };
    tookMs.push(performance.now() - sentMs);
    if (answer.kept !== 1) missed += 1;
  }
}

/** A slow ramp with a tenth of noise. */
function figureAt(second: number, channel: number): number {
  return Math.round(10 * (20 + second / 30 + channel / 7 + Math.sin(12.9898 * second + channel) / 5)) / 10;
}
