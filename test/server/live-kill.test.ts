import { once } from 'node:events';
import { existsSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';
import { describe, expect, it } from 'vitest';
import { verifyChains } from '../../server/actions/verify-chains.ts';
import { databasePath } from '../../server/command/data-folder.ts';
import { openDatabase } from '../../server/store/database.ts';
import { insertKey } from '../../server/store/sender-keys.ts';
import { addressOf, startDwellbook } from './built-program.ts';
import { freshDatabase, freshFolder } from './fresh-database.ts';
import { addLiveVessel, BEGUN_MS, DEED, openRun, pushSource } from './live-workshop.ts';
import { startSender } from './sender-process.ts';

const KILLS = 30;
const CHANNELS = 8;
const SEED = 20_260_310;
/** On a machine with nothing else to do it takes some 15 s. */
const TIMEOUT_MS = 240_000;

/** Numbers in [0, 1) from a seed: a failure can be played again. Park and Miller's minimal standard generator. */
function seeded(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state * 48_271) % 2_147_483_647;
    return state / 2_147_483_647;
  };
}

describe('a program that is killed at any instant', () => {
  it(
    'has every scan it acknowledged once, in order, the hash intact, and the run goes on by itself',
    async () => {
      const folder = freshFolder();
      const path = databasePath(folder);
      const portFile = join(folder, 'port');
      const db = freshDatabase(path);
      const { vesselId } = addLiveVessel(db, 'Autoclave 1', pushSource('plc', CHANNELS));
      insertKey(db, { vesselId, name: 'cell controller', key: 'key-of-the-cell', ...DEED });
      const run = openRun(db, vesselId);
      db.close();

      const random = seeded(SEED);
      const start = async () => {
        const child = startDwellbook('serve', '--data', folder, '--port', '0', '--watch', join(folder, 'watched'));
        const address = await addressOf(child);
        writeFileSync(portFile, new URL(address).port);
        return { child, address };
      };
      let program = await start();
      const sender = startSender({
        portFile,
        key: 'key-of-the-cell',
        source: 'plc',
        begunMs: BEGUN_MS,
        channels: CHANNELS,
      });
      for (let kill = 0; kill < KILLS; kill += 1) {
        console.log(kill, sender.acknowledged.length, Date.now() % 1e6);
        await sender.more();
        await wait(150 * random());
        program.child.kill('SIGKILL');
        await once(program.child, 'exit');
        program = await start();
      }
      await sender.more();
      await sender.end();
      expect(sender.refused).toEqual([]);
      expect(sender.acknowledged.length).toBeGreaterThan(KILLS);

      const post = (deed: string) =>
        fetch(`${program.address}/api/runs/${run}/${deed}`, {
          method: 'POST',
          headers: { 'content-type': 'application/json' },
          body: '{}',
        });
      const csv = async () => (await fetch(`${program.address}/api/runs/${run}/readings.csv`)).text();
      const open = await csv();
      const rows = open.trimEnd().split('\r\n').slice(1);
      const instants = rows.map((row) => Date.parse(row.split(',')[0] ?? ''));
      // Once each and in order; nothing else but what was sent and not answered before a kill.
      expect(instants).toEqual([...new Set(instants)].sort((a, b) => a - b));
      const kept = new Map(rows.map((row, n) => [instants[n], row]));
      const lost = sender.acknowledged.filter((n) => kept.get(BEGUN_MS + 250 * n) !== rowOf(n));
      expect(lost).toEqual([]);
      // At most one push was kept and not answered when the last kill came.
      expect(kept.size - sender.acknowledged.length).toBeGreaterThanOrEqual(0);
      expect(kept.size - sender.acknowledged.length).toBeLessThanOrEqual(8);

      // The run went on by itself through every kill; it is ended and closed, and says the same.
      expect((await post('end')).status).toBe(200);
      const closed = await post('close');
      expect(closed.status, await closed.clone().text()).toBe(200);
      expect(await closed.json()).toMatchObject({ live: null, scans: rows.length });
      expect(await csv()).toBe(open);
      program.child.kill('SIGTERM');
      await once(program.child, 'exit');
      expect(existsSync(path)).toBe(true);
      const after = openDatabase(path, { at: DEED.at, readonly: true });
      expect(verifyChains(after)).toMatchObject({ holds: true });
      expect(after.pragma('integrity_check', { simple: true })).toBe('ok');
      after.close();
    },
    TIMEOUT_MS,
  );
});

/** What readings.csv says of the sender's n-th scan. */
function rowOf(n: number): string {
  const figures = Array.from({ length: CHANNELS }, (_, c) => Math.round(10 * (20 + c + n / 7)) / 10);
  return [new Date(BEGUN_MS + 250 * n).toISOString(), ...figures].join(',');
}
