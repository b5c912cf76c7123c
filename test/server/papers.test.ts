import { createHash } from 'node:crypto';
import { deflateSync } from 'node:zlib';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type LiveApp, liveApp, NOW, upload } from './live-app.ts';
import { recordCase } from './workshop-steps.ts';

/** One grey pixel: signature, IHDR, IDAT, IEND, as W3C PNG 5 lays them out; checksums of chunks left 0. */
const PNG = Buffer.concat([
  Buffer.from('89504e470d0a1a0a0000000d49484452000000010000000108000000003a7e9b55', 'hex'),
  Buffer.from('0000000a49444154', 'hex'),
  deflateSync(Buffer.from([0, 128])),
  Buffer.from('000000000000000049454e44ae426082', 'hex'),
]);
const HTML = '<html><script>alert(1)</script></html>';

async function appWithPart(changes = {}): Promise<LiveApp> {
  const app = await liveApp(changes);
  expect((await app.post('/api/parts/SR-1/layup', {})).status).toBe(201);
  return app;
}

const sha256 = (bytes: Uint8Array | string) => createHash('sha256').update(bytes).digest('hex');

async function bytesAt(app: LiveApp, path: string) {
  const response = await fetch(`${app.origin}${path}`);
  return { response, bytes: Buffer.from(await response.arrayBuffer()) };
}

describe('a photograph of a part', () => {
  it('is kept by its hash, listed, shown as what it is and handed out byte for byte', async () => {
    const app = await appWithPart();
    const sent = await upload(app, '/api/parts/SR-1/papers?name=root%20end.html&shows=root%20end', PNG);
    expect(sent.status, sent.text).toBe(201);
    const paper = {
      id: 1,
      name: 'root end.html',
      bytes: PNG.length,
      sha256: sha256(PNG),
      picture: 'image/png',
      shows: 'root end',
      deed: { at: NOW, by: 'inspector 2' },
    };
    expect(sent.body).toEqual({ papers: [paper] });
    expect((await app.get('/api/parts/SR-1/papers')).body).toEqual({ papers: [paper] });
    const shown = await bytesAt(app, '/api/papers/1/picture');
    expect(shown.bytes.equals(PNG)).toBe(true);
    expect(shown.response.headers.get('content-type')).toBe('image/png');
    expect(shown.response.headers.get('x-content-type-options')).toBe('nosniff');
    const handed = await bytesAt(app, '/api/papers/1/file');
    expect(handed.bytes.equals(PNG)).toBe(true);
    expect(handed.response.headers.get('content-type')).toBe('application/octet-stream');
    expect(handed.response.headers.get('content-disposition')).toContain('attachment');
    expect((await app.get('/api/parts/SR-1')).body.audit[0]).toMatchObject({ verb: 'keep-paper', why: 'root end' });
  });

  it('is kept once for a part, however often it is sent, and again for another', async () => {
    const app = await appWithPart();
    await app.post('/api/parts/SR-2/layup', {});
    expect((await upload(app, '/api/parts/SR-1/papers?name=a.png', PNG)).status).toBe(201);
    const again = await upload(app, '/api/parts/SR-1/papers?name=b.png', PNG);
    expect([again.status, again.body.type]).toEqual([409, '/problems/already-recorded']);
    expect((await upload(app, '/api/parts/SR-2/papers?name=b.png', PNG)).status).toBe(201);
    expect(app.parts.db.prepare('SELECT count(*) FROM files').pluck().get()).toBe(1);
  });
});

describe('a document', () => {
  it('is never shown as a page of ours, whatever it says it is', async () => {
    const app = await appWithPart();
    for (const bytes of [
      HTML,
      '<svg xmlns="http://www.w3.org/2000/svg"><script>1</script></svg>',
      `%PDF-1.7 ${HTML}`,
    ]) {
      const sent = await upload(app, '/api/parts/SR-1/papers?name=photo.png', bytes);
      expect(sent.body.papers[0].picture).toBeNull();
      const { id } = sent.body.papers[0];
      expect((await app.get(`/api/papers/${id}/picture`)).status).toBe(404);
      const { response } = await bytesAt(app, `/api/papers/${id}/file`);
      expect(response.headers.get('content-type')).toBe('application/octet-stream');
      expect(response.headers.get('x-content-type-options')).toBe('nosniff');
    }
  });

  it('of a run is listed there', async () => {
    const app = await liveApp();
    const run = await recordCase(app, 'must-work');
    expect((await upload(app, `/api/runs/${run}/papers?name=chart.pdf`, '%PDF-1.7')).status).toBe(201);
    expect((await app.get(`/api/runs/${run}/papers`)).body.papers).toMatchObject([{ name: 'chart.pdf' }]);
    expect((await upload(app, '/api/runs/99/papers?name=chart.pdf', '%PDF-1.7')).status).toBe(404);
  });

  it('comes back as it was sent, whatever its bytes', async () => {
    const app = await appWithPart();
    await fc.assert(
      fc.asyncProperty(fc.uint8Array({ minLength: 1, maxLength: 5000 }), async (bytes) => {
        const sent = await upload(app, '/api/parts/SR-1/papers?name=x', bytes);
        if (sent.status === 409) return;
        const [{ id, sha256: hash }] = sent.body.papers;
        expect(hash).toBe(sha256(bytes));
        expect((await bytesAt(app, `/api/papers/${id}/file`)).bytes.equals(Buffer.from(bytes))).toBe(true);
      }),
      { numRuns: 15 },
    );
  });

  it('is refused where it is empty, too large or of no part', async () => {
    const app = await appWithPart({ mostUploadBytes: 1000 });
    const post = (path: string, bytes: string) => upload(app, path, bytes);
    expect((await post('/api/parts/SR-1/papers?name=x', '')).status).toBe(422);
    expect((await post('/api/parts/SR-1/papers?name=x', 'x'.repeat(1001))).status).toBe(413);
    expect((await post('/api/parts/none/papers?name=x', 'x')).status).toBe(404);
    expect((await post('/api/parts/SR-1/papers', 'x')).status).toBe(400);
    expect(app.parts.db.prepare('SELECT count(*) FROM papers').pluck().get()).toBe(0);
  });
});
