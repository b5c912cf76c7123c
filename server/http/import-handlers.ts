import { rm } from 'node:fs/promises';
import { basename } from 'node:path';
import { DomainError } from '../../models/errors.ts';
import { readHead } from '../../models/log/proposal/read-head.ts';
import { addSource } from '../actions/add-source.ts';
import { discardImport } from '../actions/discard-import.ts';
import { fileAtPath } from '../actions/file-at-path.ts';
import { headOf } from '../actions/head-of.ts';
import { fileOfImport } from '../actions/incoming-file.ts';
import { previewJoin } from '../actions/preview-join.ts';
import { receiveFile, refuseRecorded } from '../actions/receive-file.ts';
import { recordRun } from '../actions/record-run.ts';
import { listWaitingImports, requireImport } from '../store/imports.ts';
import type { SomeHandlers } from './handler.ts';
import { importLineOf, importView } from './import-view.ts';
import { joinedOf } from './joined-channels.ts';
import { numberIn } from './number-in.ts';
import { previewOf } from './preview.ts';
import { saveUpload } from './save-upload.ts';

export const importHandlers: SomeHandlers<
  'listImports' | 'uploadFile' | 'readImport' | 'previewImport' | 'previewJoin' | 'recordRun' | 'discardImport'
> = {
  listImports: ({ db }) => ({ imports: listWaitingImports(db).map(importLineOf) }),
  async uploadFile(parts, { query, body }) {
    const path = await saveUpload(parts, body);
    try {
      const file = fileAtPath(path, basename(query.name));
      refuseRecorded(parts, file);
      // What is no text at all is refused at once; what is a text may wait for someone.
      readHead(await headOf(file));
      const id = receiveFile(parts, { file, origin: 'upload', recorder: query.recorder });
      return await importView(parts.db, requireImport(parts.db, id));
    } finally {
      await rm(path, { force: true });
    }
  },
  readImport: ({ db }, { params }) => importView(db, requireImport(db, numberIn(params, 'import'))),
  previewImport({ db }, { params, body }) {
    return previewOf(fileOfImport(db, requireImport(db, numberIn(params, 'import'))), body.layout);
  },
  async previewJoin({ db }, { params, body }) {
    const file = fileOfImport(db, requireImport(db, numberIn(params, 'import')));
    const { layout, run, shiftS } = body;
    const preview = await previewJoin(db, run, { file, layout, shiftMs: 1000 * shiftS });
    const { shiftMs, channels, ...evidence } = preview.evidence;
    return {
      source: preview.source,
      joined: joinedOf(preview.merged),
      ownChannels: [...preview.ownChannels],
      proposal: { ...evidence, channels: [...channels], shiftS: shiftMs === null ? null : shiftMs / 1000 },
    };
  },
  async recordRun(parts, { params, body }) {
    const row = requireImport(parts.db, numberIn(params, 'import'));
    const { run, join, ...origin } = body;
    const recording = { ...origin, files: [fileOfImport(parts.db, row)], importId: row.id };
    if (run == null) {
      if (join != null) throw new DomainError('invalid-request', 'Say which run the file is to be joined to');
      return { run: await recordRun(parts, recording) };
    }
    await addSource(
      parts,
      run,
      recording,
      join == null ? null : { shiftMs: 1000 * join.shiftS, because: join.because },
    );
    return { run };
  },
  discardImport(parts, { params, body }) {
    discardImport(parts, numberIn(params, 'import'), body.reason);
    return { imports: listWaitingImports(parts.db).map(importLineOf) };
  },
};
