import type * as z from 'zod';
import { audit, auditQuery, auditVerification } from './audit.ts';
import { chartQuery } from './chart.ts';
import { changeStatusRequest, cycles, cycleView, importCycleRequest } from './cycles.ts';
import { chartDocument } from './documents.ts';
import { findQuery, found } from './find.ts';
import {
  discardImportRequest,
  imports,
  importView,
  preview,
  previewRequest,
  recordedRun,
  recordRunRequest,
  uploadQuery,
} from './imports.ts';
import { now } from './now.ts';
import { addPartResultRequest, parts, partsQuery, partView } from './parts.ts';
import { addRecorderRequest, keepLayoutRequest, recorder, recorders } from './recorders.ts';
import { importResinRequest, resins, resinView } from './resins.ts';
import type { Role } from './roles.ts';
import {
  addNoteRequest,
  decideSuspectRequest,
  evaluationView,
  judgeAgainRequest,
  runs,
  runsQuery,
  runView,
  setLoadRequest,
} from './runs.ts';
import { addVesselRequest, setWorkshopRequest, vessels, workshop } from './workshop.ts';

/** One thing that can be asked of the server over HTTP. */
export interface Operation {
  readonly method: 'get' | 'post';
  /** OpenAPI template: `/api/runs/{run}`. */
  readonly path: string;
  readonly summary: string;
  /** Who may use it. */
  readonly roles: readonly Role[];
  readonly query?: z.ZodType;
  /** JSON body, or `bytes` for a file as it is. */
  readonly body?: z.ZodType | 'bytes';
  /** JSON answer, or the media type of another one. */
  readonly answer: z.ZodType | 'text/csv' | 'application/octet-stream' | 'application/json';
  /** Status of a good answer; default 200. */
  readonly status?: 201;
}

const ANYONE: readonly Role[] = ['operator', 'engineer', 'inspector', 'administrator'];
const ENGINEERS: readonly Role[] = ['engineer', 'administrator'];
const DECIDERS: readonly Role[] = ['engineer', 'inspector', 'administrator'];

/** Every route there is. `server/http` must have a handler for each; the OpenAPI description is made from it. */
export const OPERATIONS = {
  readWorkshop: op('get', '/api/workshop', 'The workshop and who is using it', ANYONE, { answer: workshop }),
  setWorkshop: op('post', '/api/workshop', 'Name the workshop, its zone and its units', ['administrator'], {
    body: setWorkshopRequest,
    answer: workshop,
  }),
  readNow: op('get', '/api/now', 'What the vessels did last, and what needs someone', ANYONE, { answer: now }),

  listVessels: op('get', '/api/vessels', 'Vessels', ANYONE, { answer: vessels }),
  addVessel: op('post', '/api/vessels', 'Add a vessel', ENGINEERS, {
    body: addVesselRequest,
    answer: vessels,
    status: 201,
  }),
  listRecorders: op('get', '/api/recorders', 'Recorders with their layouts', ANYONE, { answer: recorders }),
  addRecorder: op('post', '/api/recorders', 'Add a recorder', ENGINEERS, {
    body: addRecorderRequest,
    answer: recorder,
    status: 201,
  }),
  readRecorder: op('get', '/api/recorders/{recorder}', 'One recorder', ANYONE, { answer: recorder }),
  keepLayout: op('post', '/api/recorders/{recorder}/layouts', 'Keep a layout for a recorder', ENGINEERS, {
    body: keepLayoutRequest,
    answer: recorder,
    status: 201,
  }),

  listImports: op('get', '/api/imports', 'Files that wait for someone', ANYONE, { answer: imports }),
  uploadFile: op('post', '/api/imports', 'Bring in a file as its recorder wrote it', ANYONE, {
    query: uploadQuery,
    body: 'bytes',
    answer: importView,
    status: 201,
  }),
  readImport: op('get', '/api/imports/{import}', 'A file with its proposed layout', ANYONE, { answer: importView }),
  previewImport: op('post', '/api/imports/{import}/preview', 'Read the file by a layout, keeping nothing', ANYONE, {
    body: previewRequest,
    answer: preview,
  }),
  recordRun: op('post', '/api/imports/{import}/run', 'Make a run of the file', ANYONE, {
    body: recordRunRequest,
    answer: recordedRun,
    status: 201,
  }),
  discardImport: op('post', '/api/imports/{import}/discard', 'Set a file aside', ANYONE, {
    body: discardImportRequest,
    answer: imports,
  }),

  listRuns: op('get', '/api/runs', 'Runs, latest first', ANYONE, { query: runsQuery, answer: runs }),
  readRun: op('get', '/api/runs/{run}', 'A run whole, without its readings', ANYONE, { answer: runView }),
  readRunChart: op('get', '/api/runs/{run}/chart', 'What is to be drawn of a run', ANYONE, {
    query: chartQuery,
    answer: chartDocument,
  }),
  setLoad: op('post', '/api/runs/{run}/load', 'Say what was in the vessel and by which cycle it was cured', ANYONE, {
    body: setLoadRequest,
    answer: runView,
    status: 201,
  }),
  decideSuspect: op('post', '/api/runs/{run}/exclusions', 'Decide on a sensor that may lie', DECIDERS, {
    body: decideSuspectRequest,
    answer: runView,
    status: 201,
  }),
  judgeAgain: op('post', '/api/runs/{run}/evaluations', 'Judge a run again', DECIDERS, {
    body: judgeAgainRequest,
    answer: evaluationView,
    status: 201,
  }),
  readEvaluation: op('get', '/api/runs/{run}/evaluations/{evaluation}', 'An evaluation as it was given', ANYONE, {
    answer: evaluationView,
  }),
  addNote: op('post', '/api/runs/{run}/notes', 'Write in the margin of a run', ANYONE, {
    body: addNoteRequest,
    answer: runView,
    status: 201,
  }),
  readReadings: op('get', '/api/runs/{run}/readings.csv', 'All readings of a run, in their units', ANYONE, {
    answer: 'text/csv',
  }),
  readFile: op('get', '/api/runs/{run}/file/{n}', 'A file of a run, byte for byte as it came', ANYONE, {
    answer: 'application/octet-stream',
  }),

  listCycles: op('get', '/api/cycles', 'Cycles', ANYONE, { answer: cycles }),
  importCycle: op('post', '/api/cycles', 'Bring in a cycle document as a draft', ENGINEERS, {
    body: importCycleRequest,
    answer: cycleView,
    status: 201,
  }),
  readCycle: op('get', '/api/cycles/{code}/{issue}', 'An issue of a cycle', ANYONE, { answer: cycleView }),
  releaseCycle: op(
    'post',
    '/api/cycles/{code}/{issue}/release',
    'Release an issue; it is frozen from then on',
    ENGINEERS,
    {
      body: changeStatusRequest,
      answer: cycleView,
      status: 201,
    },
  ),
  withdrawCycle: op('post', '/api/cycles/{code}/{issue}/withdraw', 'Withdraw an issue from new runs', ENGINEERS, {
    body: changeStatusRequest,
    answer: cycleView,
    status: 201,
  }),

  listResins: op('get', '/api/resins', 'Resin sets', ANYONE, { answer: resins }),
  importResin: op('post', '/api/resins', 'Bring in a resin document', ENGINEERS, {
    body: importResinRequest,
    answer: resinView,
    status: 201,
  }),
  readResin: op('get', '/api/resins/{code}', 'A resin set', ANYONE, { answer: resinView }),

  listParts: op('get', '/api/parts', 'Parts', ANYONE, { query: partsQuery, answer: parts }),
  readPart: op('get', '/api/parts/{serial}', 'A part: what touched it, and what shares it', ANYONE, {
    answer: partView,
  }),
  addPartResult: op('post', '/api/parts/{serial}/results', 'Record a test or inspection', DECIDERS, {
    body: addPartResultRequest,
    answer: partView,
    status: 201,
  }),

  find: op('get', '/api/find', 'Where a code leads', ANYONE, { query: findQuery, answer: found }),
  readAudit: op('get', '/api/audit', 'The audit trail, latest first', ANYONE, { query: auditQuery, answer: audit }),
  verifyAudit: op('get', '/api/audit/verify', 'Recompute every chain', ANYONE, { answer: auditVerification }),
  readOpenApi: op('get', '/api/openapi.json', 'This description', ANYONE, { answer: 'application/json' }),
} as const satisfies Record<string, Operation>;

export type OperationName = keyof typeof OPERATIONS;

function op<Rest extends Pick<Operation, 'query' | 'body' | 'answer' | 'status'>>(
  method: Operation['method'],
  path: string,
  summary: string,
  roles: readonly Role[],
  rest: Rest,
) {
  return { method, path, summary, roles, ...rest };
}
