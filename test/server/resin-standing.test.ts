import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { setWorkshop } from '../../server/actions/set-workshop.ts';
import { type LiveApp, liveApp } from './live-app.ts';
import { loadCase, recordCase } from './workshop-steps.ts';

// The written rules: a set recalled from memory is for tests and trials, and never a limit in a real workshop.
const NAME = 'cure-estimates';
const shipped = JSON.parse(readFileSync(new URL(`../golden/recorded/${NAME}/resin.json`, import.meta.url), 'utf8'));
const withStatus = (status: string) => ({ ...shipped, source: { citation: 'a paper', status } });
const WORKSHOP = {
  name: 'Skerry Row',
  zone: 'Europe/Lisbon',
  units: { temperature: '°C', pressure: 'bar', vacuum: 'bar' },
};

async function judged(app: LiveApp, status: string) {
  expect((await app.post('/api/resins', { document: withStatus(status) })).status).toBe(201);
  const run = await recordCase(app, NAME);
  expect((await loadCase(app, run, NAME)).status).toBe(201);
  const { evaluation, cycleIssue } = (await app.get(`/api/runs/${run}`)).body;
  const [part] = evaluation.document.parts;
  const ofCure = part.findings.filter(({ limit }: { limit: string }) => limit.startsWith('cure/'));
  expect(ofCure).toHaveLength(3);
  const { code, issue } = cycleIssue;
  const release = () => app.post(`/api/cycles/${code}/${issue}/release`, { reason: 'ready' });
  return { part, ofCure, release };
}

describe.each(['recalled', 'illustrative'])('a %s set in a real workshop', (status) => {
  it('gives estimates, and no limit can be told by it', async () => {
    const { part, ofCure } = await judged(await liveApp(), status);
    expect(part.cure.length).toBeGreaterThan(1);
    for (const { outcome, because } of ofCure) {
      expect(outcome).toBe('cannot-tell');
      expect(because).toContain('never a limit in a real workshop');
    }
    expect(part.verdict).toBe('cannot-tell');
  });

  it('keeps its cycle from being released, by name', async () => {
    const { release } = await judged(await liveApp(), status);
    const refused = await release();
    expect([refused.status, refused.body.facts]).toEqual([409, { resin: 'skerry-180', status }]);
    expect(refused.body.detail).toMatch(/"skerry-180" .* never a limit in a real workshop; name a published or fitted/);
  });
});

describe('the same set', () => {
  it('is a limit in the practice workshop', async () => {
    const app = await liveApp();
    setWorkshop(app.parts, WORKSHOP as Parameters<typeof setWorkshop>[1], 'Skerry Row');
    const { ofCure, release } = await judged(app, 'recalled');
    expect(ofCure.map(({ outcome }: { outcome: string }) => outcome)).not.toContain('cannot-tell');
    expect((await release()).status).toBe(201);
  });

  it('is a limit anywhere once its figures were read in a source', async () => {
    const { ofCure, release } = await judged(await liveApp(), 'published');
    expect(ofCure.map(({ outcome }: { outcome: string }) => outcome)).not.toContain('cannot-tell');
    expect((await release()).status).toBe(201);
  });
});
