import type * as z from 'zod';
import { askedParts, askPartsQuery, askVerdictsQuery, touched, withoutRecord } from './ask.ts';
import { audit, auditQuery, auditVerification } from './audit.ts';
import { chartQuery } from './chart.ts';
import { compared, compareQuery, overlaid, overlayQuery } from './comparison.ts';
import { changeStatusRequest, cycles, cycleView, importCycleRequest } from './cycles.ts';
import { chartDocument } from './documents.ts';
import { findQuery, found } from './find.ts';
import {
  discardImportRequest,
  imports,
  importView,
  joinPreview,
  preview,
  previewJoinRequest,
  previewRequest,
  recordedRun,
  recordRunRequest,
  uploadQuery,
} from './imports.ts';
import {
  addCalibrationRequest,
  instruments,
  instrumentView,
  placeInstrumentRequest,
  runInstruments,
  setInstrumentRequest,
  takeOffRequest,
} from './instruments.ts';
import { labelQuery } from './labels.ts';
import { addPartWorkRequest, layupQuery, layupView, setCouponRequest, setLayupRequest } from './layups.ts';
import {
  acknowledgeRequest,
  beginRunRequest,
  doorChecks,
  doorChecksRequest,
  endRunRequest,
  enterRequest,
  liveRun,
  liveVessels,
  madeKey,
  makeKeyRequest,
  pushed,
  pushRequest,
  restSourceRequest,
  revokeKeyRequest,
  senderKeys,
  setSourceRequest,
  sources,
  sourceView,
  tried,
  tryRequest,
  warnings,
} from './live.ts';
import {
  batchLine,
  correctEventRequest,
  cutKitRequest,
  extendLifeRequest,
  importMaterialRequest,
  itemEvent,
  itemView,
  materials,
  materialView,
  partMaterials,
  partMaterialsQuery,
  receiveRollRequest,
  recordExcursionRequest,
  setBatchRequest,
  setPartMaterialsRequest,
} from './materials.ts';
import { now } from './now.ts';
import { papers, sendPaperQuery } from './papers.ts';
import { parts, partsQuery, partView } from './parts.ts';
import { addRecorderRequest, keepLayoutRequest, recorder, recorders } from './recorders.ts';
import { importResinRequest, resins, resinView } from './resins.ts';
import { addPartResultRequest, setNonconformanceRequest } from './results.ts';
import type { Route } from './route.ts';
import { ROUTES } from './routes.ts';
import {
  addNoteRequest,
  closeRunRequest,
  decideSuspectRequest,
  evaluationView,
  judgeAgainRequest,
  readAgainRequest,
  runs,
  runsQuery,
  runView,
  setLoadRequest,
} from './runs.ts';
import { addAccuracyTestRequest, addSurveyRequest, setQualifiedRangeRequest, vesselSurveys } from './surveys.ts';
import { tableImport, tableQuery } from './tables.ts';
import { thickness, thicknessQuery } from './thickness.ts';
import { setToolRequest } from './tool-record.ts';
import { tools, toolView } from './tools.ts';
import { failedParts, holds, holdView, makeHoldRequest, partDanger, setWhereaboutsRequest } from './trace.ts';
import { setWarningRoutesRequest, warningRoutesView } from './warnings.ts';
import { addVesselRequest, setWorkshopRequest, vessels, workshop } from './workshop.ts';

/** A route with the shapes of what it takes and answers. */
export interface Operation extends Route {
  readonly query?: z.ZodType;
  /** Of a JSON body. */
  readonly body?: z.ZodType;
  /** JSON answer, or the media type of another one. */
  readonly answer:
    | z.ZodType
    | 'text/csv'
    | 'image/*'
    | 'application/octet-stream'
    | 'application/json'
    | 'text/event-stream';
  /** Status of a good answer; default 200. */
  readonly status?: 201;
}

/** Every route with its shapes. The OpenAPI description is made from it. */
export const OPERATIONS = {
  readWorkshop: { ...ROUTES.readWorkshop, answer: workshop },
  setWorkshop: { ...ROUTES.setWorkshop, body: setWorkshopRequest, answer: workshop },
  readNow: { ...ROUTES.readNow, answer: now },
  listVessels: { ...ROUTES.listVessels, answer: vessels },
  addVessel: { ...ROUTES.addVessel, body: addVesselRequest, answer: vessels, status: 201 },
  listRecorders: { ...ROUTES.listRecorders, answer: recorders },
  addRecorder: { ...ROUTES.addRecorder, body: addRecorderRequest, answer: recorder, status: 201 },
  readRecorder: { ...ROUTES.readRecorder, answer: recorder },
  keepLayout: { ...ROUTES.keepLayout, body: keepLayoutRequest, answer: recorder, status: 201 },
  listImports: { ...ROUTES.listImports, answer: imports },
  uploadFile: { ...ROUTES.uploadFile, query: uploadQuery, answer: importView, status: 201 },
  readImport: { ...ROUTES.readImport, answer: importView },
  previewImport: { ...ROUTES.previewImport, body: previewRequest, answer: preview },
  recordRun: { ...ROUTES.recordRun, body: recordRunRequest, answer: recordedRun, status: 201 },
  discardImport: { ...ROUTES.discardImport, body: discardImportRequest, answer: imports },
  readLive: { ...ROUTES.readLive, answer: liveVessels },
  watchLive: { ...ROUTES.watchLive, answer: 'text/event-stream' },
  readLiveRun: { ...ROUTES.readLiveRun, answer: liveRun },
  watchLiveRun: { ...ROUTES.watchLiveRun, answer: 'text/event-stream' },
  listWarnings: { ...ROUTES.listWarnings, answer: warnings },
  acknowledgeWarning: { ...ROUTES.acknowledgeWarning, body: acknowledgeRequest, answer: warnings },
  readWarningRoutes: { ...ROUTES.readWarningRoutes, answer: warningRoutesView },
  setWarningRoutes: { ...ROUTES.setWarningRoutes, body: setWarningRoutesRequest, answer: warningRoutesView },
  listRuns: { ...ROUTES.listRuns, query: runsQuery, answer: runs },
  readRun: { ...ROUTES.readRun, answer: runView },
  readRunChart: { ...ROUTES.readRunChart, query: chartQuery, answer: chartDocument },
  setLoad: { ...ROUTES.setLoad, body: setLoadRequest, answer: runView, status: 201 },
  readAgain: { ...ROUTES.readAgain, body: readAgainRequest, answer: runView, status: 201 },
  decideSuspect: { ...ROUTES.decideSuspect, body: decideSuspectRequest, answer: runView, status: 201 },
  judgeAgain: { ...ROUTES.judgeAgain, body: judgeAgainRequest, answer: evaluationView, status: 201 },
  readEvaluation: { ...ROUTES.readEvaluation, answer: evaluationView },
  addNote: { ...ROUTES.addNote, body: addNoteRequest, answer: runView, status: 201 },
  readReadings: { ...ROUTES.readReadings, answer: 'text/csv' },
  readFile: { ...ROUTES.readFile, answer: 'application/octet-stream' },
  listCycles: { ...ROUTES.listCycles, answer: cycles },
  importCycle: { ...ROUTES.importCycle, body: importCycleRequest, answer: cycleView, status: 201 },
  readCycle: { ...ROUTES.readCycle, answer: cycleView },
  releaseCycle: { ...ROUTES.releaseCycle, body: changeStatusRequest, answer: cycleView, status: 201 },
  withdrawCycle: { ...ROUTES.withdrawCycle, body: changeStatusRequest, answer: cycleView, status: 201 },
  listResins: { ...ROUTES.listResins, answer: resins },
  importResin: { ...ROUTES.importResin, body: importResinRequest, answer: resinView, status: 201 },
  readResin: { ...ROUTES.readResin, answer: resinView },
  listParts: { ...ROUTES.listParts, query: partsQuery, answer: parts },
  importParts: { ...ROUTES.importParts, query: tableQuery, answer: tableImport },
  importRolls: { ...ROUTES.importRolls, query: tableQuery, answer: tableImport },
  readPart: { ...ROUTES.readPart, answer: partView },
  addPartResult: { ...ROUTES.addPartResult, body: addPartResultRequest, answer: partView, status: 201 },
  setNonconformance: {
    ...ROUTES.setNonconformance,
    body: setNonconformanceRequest,
    answer: partView,
    status: 201,
  },
  listPartPapers: { ...ROUTES.listPartPapers, answer: papers },
  sendPartPaper: { ...ROUTES.sendPartPaper, query: sendPaperQuery, answer: papers, status: 201 },
  listRunPapers: { ...ROUTES.listRunPapers, answer: papers },
  sendRunPaper: { ...ROUTES.sendRunPaper, query: sendPaperQuery, answer: papers, status: 201 },
  readPaper: { ...ROUTES.readPaper, answer: 'application/octet-stream' },
  showPaper: { ...ROUTES.showPaper, answer: 'image/*' },
  readLayup: { ...ROUTES.readLayup, query: layupQuery, answer: layupView },
  setLayup: { ...ROUTES.setLayup, body: setLayupRequest, answer: layupView, status: 201 },
  readThickness: { ...ROUTES.readThickness, query: thicknessQuery, answer: thickness },
  addPartWork: { ...ROUTES.addPartWork, body: addPartWorkRequest, answer: partView, status: 201 },
  setCoupon: { ...ROUTES.setCoupon, body: setCouponRequest, answer: partView, status: 201 },
  listTools: { ...ROUTES.listTools, answer: tools },
  readTool: { ...ROUTES.readTool, answer: toolView },
  setTool: { ...ROUTES.setTool, body: setToolRequest, answer: toolView, status: 201 },
  listMaterials: { ...ROUTES.listMaterials, answer: materials },
  importMaterial: { ...ROUTES.importMaterial, body: importMaterialRequest, answer: materialView, status: 201 },
  readMaterial: { ...ROUTES.readMaterial, answer: materialView },
  setBatch: { ...ROUTES.setBatch, body: setBatchRequest, answer: batchLine, status: 201 },
  receiveRoll: { ...ROUTES.receiveRoll, body: receiveRollRequest, answer: itemView, status: 201 },
  recordExcursion: { ...ROUTES.recordExcursion, body: recordExcursionRequest, answer: materials, status: 201 },
  readItem: { ...ROUTES.readItem, answer: itemView },
  addItemEvent: { ...ROUTES.addItemEvent, body: itemEvent, answer: itemView, status: 201 },
  correctEvent: { ...ROUTES.correctEvent, body: correctEventRequest, answer: itemView, status: 201 },
  cutKit: { ...ROUTES.cutKit, body: cutKitRequest, answer: itemView, status: 201 },
  extendLife: { ...ROUTES.extendLife, body: extendLifeRequest, answer: itemView, status: 201 },
  readPartMaterials: { ...ROUTES.readPartMaterials, query: partMaterialsQuery, answer: partMaterials },
  setPartMaterials: {
    ...ROUTES.setPartMaterials,
    body: setPartMaterialsRequest,
    answer: partMaterials,
    status: 201,
  },
  readDanger: { ...ROUTES.readDanger, answer: partDanger },
  setWhereabouts: { ...ROUTES.setWhereabouts, body: setWhereaboutsRequest, answer: partDanger, status: 201 },
  listHolds: { ...ROUTES.listHolds, answer: holds },
  makeHold: { ...ROUTES.makeHold, body: makeHoldRequest, answer: holdView, status: 201 },
  readHold: { ...ROUTES.readHold, answer: holdView },
  readHoldCsv: { ...ROUTES.readHoldCsv, answer: 'text/csv' },
  listInstruments: { ...ROUTES.listInstruments, answer: instruments },
  setInstrument: { ...ROUTES.setInstrument, body: setInstrumentRequest, answer: instrumentView, status: 201 },
  readInstrument: { ...ROUTES.readInstrument, answer: instrumentView },
  addCalibration: { ...ROUTES.addCalibration, body: addCalibrationRequest, answer: instrumentView, status: 201 },
  placeInstrument: { ...ROUTES.placeInstrument, body: placeInstrumentRequest, answer: instrumentView, status: 201 },
  takeOffInstrument: { ...ROUTES.takeOffInstrument, body: takeOffRequest, answer: instrumentView, status: 201 },
  readRunInstruments: { ...ROUTES.readRunInstruments, answer: runInstruments },
  readDoorChecks: { ...ROUTES.readDoorChecks, answer: doorChecks },
  checkDoor: { ...ROUTES.checkDoor, body: doorChecksRequest, answer: doorChecks },
  readTouched: { ...ROUTES.readTouched, answer: touched },
  askParts: { ...ROUTES.askParts, query: askPartsQuery, answer: askedParts },
  askWithoutRecord: { ...ROUTES.askWithoutRecord, answer: withoutRecord },
  askVerdicts: { ...ROUTES.askVerdicts, query: askVerdictsQuery, answer: 'text/event-stream' },
  readSurveys: { ...ROUTES.readSurveys, answer: vesselSurveys },
  addSurvey: { ...ROUTES.addSurvey, body: addSurveyRequest, answer: vesselSurveys, status: 201 },
  addAccuracyTest: { ...ROUTES.addAccuracyTest, body: addAccuracyTestRequest, answer: vesselSurveys, status: 201 },
  setQualifiedRange: {
    ...ROUTES.setQualifiedRange,
    body: setQualifiedRangeRequest,
    answer: vesselSurveys,
    status: 201,
  },
  listFailed: { ...ROUTES.listFailed, answer: failedParts },
  compareParts: { ...ROUTES.compareParts, query: compareQuery, answer: compared },
  overlayParts: { ...ROUTES.overlayParts, query: overlayQuery, answer: overlaid },
  readLabel: { ...ROUTES.readLabel, query: labelQuery, answer: 'image/*' },
  find: { ...ROUTES.find, query: findQuery, answer: found },
  readAudit: { ...ROUTES.readAudit, query: auditQuery, answer: audit },
  verifyAudit: { ...ROUTES.verifyAudit, answer: auditVerification },
  previewJoin: { ...ROUTES.previewJoin, body: previewJoinRequest, answer: joinPreview },
  listSources: { ...ROUTES.listSources, answer: sources },
  addSource: { ...ROUTES.addSource, body: setSourceRequest, answer: sourceView, status: 201 },
  trySource: { ...ROUTES.trySource, body: tryRequest, answer: tried },
  readSource: { ...ROUTES.readSource, answer: sourceView },
  setSource: { ...ROUTES.setSource, body: setSourceRequest, answer: sourceView },
  restSource: { ...ROUTES.restSource, body: restSourceRequest, answer: sourceView },
  enterReadings: { ...ROUTES.enterReadings, body: enterRequest, answer: pushed, status: 201 },
  listKeys: { ...ROUTES.listKeys, answer: senderKeys },
  makeKey: { ...ROUTES.makeKey, body: makeKeyRequest, answer: madeKey, status: 201 },
  revokeKey: { ...ROUTES.revokeKey, body: revokeKeyRequest, answer: senderKeys },
  push: { ...ROUTES.push, body: pushRequest, answer: pushed },
  beginRun: { ...ROUTES.beginRun, body: beginRunRequest, answer: runView, status: 201 },
  endRun: { ...ROUTES.endRun, body: endRunRequest, answer: runView },
  closeRun: { ...ROUTES.closeRun, body: closeRunRequest, answer: runView },
  readOpenApi: { ...ROUTES.readOpenApi, answer: 'application/json' },
} as const satisfies Record<keyof typeof ROUTES, Operation>;
