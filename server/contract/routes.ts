import type { Role } from './roles.ts';

/** One thing that can be asked of the server over HTTP. */
export interface Route {
  readonly method: 'get' | 'post';
  /** OpenAPI template: `/api/runs/{run}`. */
  readonly path: string;
  readonly summary: string;
  /** Who may use it. */
  readonly roles: readonly Role[];
  /** What is sent along: JSON, or a file as it is. */
  readonly sends: 'nothing' | 'json' | 'bytes';
}

const ANYONE: readonly Role[] = ['operator', 'engineer', 'inspector', 'administrator'];
const ENGINEERS: readonly Role[] = ['engineer', 'administrator'];
const DECIDERS: readonly Role[] = ['engineer', 'inspector', 'administrator'];
const ADMINISTRATORS: readonly Role[] = ['administrator'];

/** Every route there is. What each takes and answers stands in `operations.ts`, which loads the schemas. */
export const ROUTES = {
  readWorkshop: route('get', '/api/workshop', 'The workshop and who is using it', ANYONE),
  setWorkshop: route('post', '/api/workshop', 'Name the workshop, its zone and its units', ADMINISTRATORS, 'json'),
  readNow: route('get', '/api/now', 'What the vessels did last, and what needs someone', ANYONE),
  listVessels: route('get', '/api/vessels', 'Vessels', ANYONE),
  addVessel: route('post', '/api/vessels', 'Add a vessel', ENGINEERS, 'json'),
  listRecorders: route('get', '/api/recorders', 'Recorders with their layouts', ANYONE),
  addRecorder: route('post', '/api/recorders', 'Add a recorder', ENGINEERS, 'json'),
  readRecorder: route('get', '/api/recorders/{recorder}', 'One recorder', ANYONE),
  keepLayout: route('post', '/api/recorders/{recorder}/layouts', 'Keep a layout for a recorder', ENGINEERS, 'json'),
  listImports: route('get', '/api/imports', 'Files that wait for someone', ANYONE),
  uploadFile: route('post', '/api/imports', 'Bring in a file as its recorder wrote it', ANYONE, 'bytes'),
  readImport: route('get', '/api/imports/{import}', 'A file with its proposed layout', ANYONE),
  previewImport: route(
    'post',
    '/api/imports/{import}/preview',
    'Read the file by a layout, keeping nothing',
    ANYONE,
    'json',
  ),
  recordRun: route('post', '/api/imports/{import}/run', 'Make a run of the file', ANYONE, 'json'),
  discardImport: route('post', '/api/imports/{import}/discard', 'Set a file aside', ANYONE, 'json'),
  readLive: route('get', '/api/live', 'Every vessel as it is now', ANYONE),
  watchLive: route('get', '/api/live/events', 'Every vessel as it changes, as server-sent events', ANYONE),
  readLiveRun: route('get', '/api/runs/{run}/live', 'An open run judged so far, and where it is heading', ANYONE),
  watchLiveRun: route('get', '/api/runs/{run}/live/events', 'An open run as it goes, as server-sent events', ANYONE),
  listWarnings: route('get', '/api/warnings', 'Warnings, those that last first', ANYONE),
  acknowledgeWarning: route(
    'post',
    '/api/warnings/{warning}/acknowledge',
    'Say that a warning was seen',
    ANYONE,
    'json',
  ),
  readWarningRoutes: route('get', '/api/warning-routes', 'Where warnings are told besides the screen', ADMINISTRATORS),
  setWarningRoutes: route(
    'post',
    '/api/warning-routes',
    'Say where warnings are told besides the screen',
    ADMINISTRATORS,
    'json',
  ),
  listRuns: route('get', '/api/runs', 'Runs, latest first', ANYONE),
  readRun: route('get', '/api/runs/{run}', 'A run whole, without its readings', ANYONE),
  readRunChart: route('get', '/api/runs/{run}/chart', 'What is to be drawn of a run', ANYONE),
  setLoad: route(
    'post',
    '/api/runs/{run}/load',
    'Say what was in the vessel and by which cycle it was cured',
    ANYONE,
    'json',
  ),
  readAgain: route(
    'post',
    '/api/runs/{run}/sources/{source}/layout',
    'Read the files of a source again by another layout',
    ENGINEERS,
    'json',
  ),
  decideSuspect: route('post', '/api/runs/{run}/exclusions', 'Decide on a sensor that may lie', DECIDERS, 'json'),
  judgeAgain: route('post', '/api/runs/{run}/evaluations', 'Judge a run again', DECIDERS, 'json'),
  readEvaluation: route('get', '/api/runs/{run}/evaluations/{evaluation}', 'An evaluation as it was given', ANYONE),
  addNote: route('post', '/api/runs/{run}/notes', 'Write in the margin of a run', ANYONE, 'json'),
  readReadings: route('get', '/api/runs/{run}/readings.csv', 'All readings of a run, in their units', ANYONE),
  readFile: route('get', '/api/runs/{run}/file/{n}', 'A file of a run, byte for byte as it came', ANYONE),
  listCycles: route('get', '/api/cycles', 'Cycles', ANYONE),
  importCycle: route('post', '/api/cycles', 'Bring in a cycle document as a draft', ENGINEERS, 'json'),
  readCycle: route('get', '/api/cycles/{code}/{issue}', 'An issue of a cycle', ANYONE),
  releaseCycle: route(
    'post',
    '/api/cycles/{code}/{issue}/release',
    'Release an issue; it is frozen from then on',
    ENGINEERS,
    'json',
  ),
  withdrawCycle: route(
    'post',
    '/api/cycles/{code}/{issue}/withdraw',
    'Withdraw an issue from new runs',
    ENGINEERS,
    'json',
  ),
  listResins: route('get', '/api/resins', 'Resin sets', ANYONE),
  importResin: route('post', '/api/resins', 'Bring in a resin document', ENGINEERS, 'json'),
  readResin: route('get', '/api/resins/{code}', 'A resin set', ANYONE),
  listParts: route('get', '/api/parts', 'Parts', ANYONE),
  readPart: route('get', '/api/parts/{serial}', 'A part: what touched it, and what shares it', ANYONE),
  addPartResult: route('post', '/api/parts/{serial}/results', 'Record a test or inspection', DECIDERS, 'json'),
  readLayup: route('get', '/api/parts/{serial}/layup', 'How a part was laid up, and the last part like it', ANYONE),
  setLayup: route('post', '/api/parts/{serial}/layup', 'Record how a part was laid up', ANYONE, 'json'),
  readThickness: route(
    'get',
    '/api/parts/{serial}/runs/{run}/thickness',
    'How hot a part got between its faces, and how far it cured there',
    ANYONE,
  ),
  addPartWork: route('post', '/api/parts/{serial}/works', 'Record what was done to a part after cure', ANYONE, 'json'),
  setCoupon: route('post', '/api/parts/{serial}/coupons', 'Record a witness coupon of a part', ANYONE, 'json'),
  listTools: route('get', '/api/tools', 'Tools', ANYONE),
  readTool: route('get', '/api/tools/{tool}', 'A tool and the parts made on it', ANYONE),
  setTool: route('post', '/api/tools/{tool}', 'Record what a tool is', ENGINEERS, 'json'),
  listMaterials: route('get', '/api/materials', 'Rolls and kits in life, and what is due', ANYONE),
  importMaterial: route('post', '/api/materials', 'Bring in an issue of a material document', ENGINEERS, 'json'),
  readMaterial: route('get', '/api/materials/{code}', 'A material: its latest issue, and what is here of it', ANYONE),
  setBatch: route('post', '/api/batches', "Record a maker's lot, or correct it", ANYONE, 'json'),
  receiveRoll: route('post', '/api/rolls', 'Record a roll that came in', ANYONE, 'json'),
  recordExcursion: route('post', '/api/freezer-excursions', 'Record a freezer too warm or too cold', ANYONE, 'json'),
  readItem: route('get', '/api/items/{item}', 'A roll or kit with its ledger', ANYONE),
  addItemEvent: route('post', '/api/items/{item}/events', 'Write a line of a ledger', ANYONE, 'json'),
  correctEvent: route(
    'post',
    '/api/items/{item}/events/{line}/correction',
    'Put another line in the place of a wrong one',
    ANYONE,
    'json',
  ),
  cutKit: route('post', '/api/items/{item}/kits', 'Cut a kit from a roll or kit', ANYONE, 'json'),
  extendLife: route('post', '/api/items/{item}/extensions', 'Extend a life by a named authority', DECIDERS, 'json'),
  readPartMaterials: route('get', '/api/parts/{serial}/materials', 'What a part was laid up from, and its age', ANYONE),
  setPartMaterials: route('post', '/api/parts/{serial}/materials', 'Say what a part was laid up from', ANYONE, 'json'),
  readDanger: route('get', '/api/parts/{serial}/whereabouts', 'Where a part is, and the hold lists it is on', ANYONE),
  setWhereabouts: route('post', '/api/parts/{serial}/whereabouts', 'Say where a part is', ANYONE, 'json'),
  listHolds: route('get', '/api/holds', 'Hold lists, latest first', ANYONE),
  makeHold: route('post', '/api/holds', 'List every part that shares something with failed ones', ANYONE, 'json'),
  readHold: route('get', '/api/holds/{hold}', 'A hold list as it was kept', ANYONE),
  readHoldCsv: route('get', '/api/holds/{hold}/list.csv', 'A hold list for a spreadsheet', ANYONE),
  find: route('get', '/api/find', 'Where a code leads', ANYONE),
  readAudit: route('get', '/api/audit', 'The audit trail, latest first', ANYONE),
  verifyAudit: route('get', '/api/audit/verify', 'Recompute every chain', ANYONE),
  previewJoin: route(
    'post',
    '/api/imports/{import}/join',
    'See what joining the file to a run would make of it, keeping nothing',
    ANYONE,
    'json',
  ),
  listSources: route('get', '/api/vessels/{vessel}/sources', 'What sends readings of a vessel', ANYONE),
  addSource: route('post', '/api/vessels/{vessel}/sources', 'Add a source of readings', ENGINEERS, 'json'),
  trySource: route(
    'post',
    '/api/vessels/{vessel}/sources/try',
    'One reading by settings nobody has saved, raw beside scaled',
    ENGINEERS,
    'json',
  ),
  readSource: route('get', '/api/sources/{source}', 'A source with its settings and its latest reading', ANYONE),
  setSource: route('post', '/api/sources/{source}', 'Set how a source is read from now on', ENGINEERS, 'json'),
  restSource: route('post', '/api/sources/{source}/rest', 'Let a source rest, or wake it', ENGINEERS, 'json'),
  enterReadings: route(
    'post',
    '/api/sources/{source}/readings',
    'Enter what a person read off a gauge',
    ANYONE,
    'json',
  ),
  listKeys: route('get', '/api/vessels/{vessel}/keys', 'Keys of those who push scans of a vessel', ENGINEERS),
  makeKey: route('post', '/api/vessels/{vessel}/keys', 'Make a key for a sender; it is shown once', ENGINEERS, 'json'),
  revokeKey: route(
    'post',
    '/api/vessels/{vessel}/keys/{key}/revoke',
    'Take a key out of use for good',
    ENGINEERS,
    'json',
  ),
  push: route('post', '/api/push', 'Push scans of a vessel, with its key as Authorization: Bearer', ANYONE, 'json'),
  beginRun: route(
    'post',
    '/api/vessels/{vessel}/runs',
    'Begin a run, now or from an instant still kept',
    ANYONE,
    'json',
  ),
  endRun: route('post', '/api/runs/{run}/end', 'End a run; scans up to the instant count', ANYONE, 'json'),
  closeRun: route(
    'post',
    '/api/runs/{run}/close',
    'Close a run that has ended: its scans are merged, verified and judged for good',
    ANYONE,
    'json',
  ),
  readOpenApi: route('get', '/api/openapi.json', 'This description', ANYONE),
} as const satisfies Record<string, Route>;

export type OperationName = keyof typeof ROUTES;

function route<Sends extends Route['sends'] = 'nothing'>(
  method: Route['method'],
  path: string,
  summary: string,
  roles: readonly Role[],
  sends: Sends = 'nothing' as Sends,
) {
  return { method, path, summary, roles, sends };
}
