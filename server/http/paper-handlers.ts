import { rm } from 'node:fs/promises';
import { basename } from 'node:path';
import type { Readable } from 'node:stream';
import { DomainError } from '../../models/errors.ts';
import { fileAtPath } from '../actions/file-at-path.ts';
import { keepPaper } from '../actions/keep-paper.ts';
import { MOST_PAPER_BYTES } from '../contract/papers.ts';
import { fileChunks } from '../store/files.ts';
import { listPapers, type PaperOwner, requirePaper } from '../store/papers.ts';
import { requirePart } from '../store/parts.ts';
import { requireRun } from '../store/runs.ts';
import type { AppParts } from './app-parts.ts';
import type { SomeHandlers } from './handler.ts';
import { numberIn } from './number-in.ts';
import { saveUpload } from './save-upload.ts';

export const paperHandlers: SomeHandlers<
  'listPartPapers' | 'sendPartPaper' | 'listRunPapers' | 'sendRunPaper' | 'readPaper' | 'showPaper'
> = {
  listPartPapers: ({ db }, { params }) => ({
    papers: listPapers(db, { partId: requirePart(db, params.serial ?? '') }),
  }),
  async sendPartPaper(parts, { params, query, body }) {
    const { serial = '' } = params;
    return send(parts, { partId: requirePart(parts.db, serial) }, `part/${serial}`, query, body);
  },
  listRunPapers({ db }, { params }) {
    const run = numberIn(params, 'run');
    requireRun(db, run);
    return { papers: listPapers(db, { run }) };
  },
  async sendRunPaper(parts, { params, query, body }) {
    const run = numberIn(params, 'run');
    requireRun(parts.db, run);
    return send(parts, { run }, `run/${run}`, query, body);
  },
  readPaper({ db }, { params }) {
    const { name, fileId } = requirePaper(db, numberIn(params, 'paper'));
    return { name, chunks: fileChunks(db, fileId) };
  },
  showPaper({ db }, { params }) {
    const { id, name, picture, fileId } = requirePaper(db, numberIn(params, 'paper'));
    if (picture === null) throw new DomainError('not-found', `${name} is no picture; download it`, { paper: id });
    return { type: picture, chunks: fileChunks(db, fileId) };
  },
};

async function send(
  parts: AppParts,
  owner: PaperOwner,
  subject: string,
  { name, shows }: { name: string; shows?: string | undefined },
  body: Readable,
) {
  const path = await saveUpload({ ...parts, mostUploadBytes: Math.min(parts.mostUploadBytes, MOST_PAPER_BYTES) }, body);
  try {
    keepPaper(parts, { owner, subject, file: fileAtPath(path, basename(name)), shows: shows || null });
    return { papers: listPapers(parts.db, owner) };
  } finally {
    await rm(path, { force: true });
  }
}
