/** Where everything is. Builders only: no schema is loaded by who imports this. */

export const WORKSHOP_PATH = '/api/workshop';
export const NOW_PATH = '/api/now';
export const RUNS_PATH = '/api/runs';
export const IMPORTS_PATH = '/api/imports';
export const RECORDERS_PATH = '/api/recorders';
export const VESSELS_PATH = '/api/vessels';
export const CYCLES_PATH = '/api/cycles';
export const RESINS_PATH = '/api/resins';
export const PARTS_PATH = '/api/parts';
export const TOOLS_PATH = '/api/tools';
export const MATERIALS_PATH = '/api/materials';
export const BATCHES_PATH = '/api/batches';
export const ROLLS_PATH = '/api/rolls';
export const EXCURSIONS_PATH = '/api/freezer-excursions';
export const AUDIT_PATH = '/api/audit';
export const AUDIT_VERIFY_PATH = '/api/audit/verify';

/** A query as it is put into an address; what is null or absent is left out. */
export type Query = Readonly<Record<string, string | number | boolean | null | undefined>>;

export function withQuery(path: string, query: Query): string {
  const entries = Object.entries(query).flatMap(([key, value]): [string, string][] =>
    value === undefined || value === null || value === '' ? [] : [[key, String(value)]],
  );
  return entries.length === 0 ? path : `${path}?${new URLSearchParams(entries)}`;
}

export function runsPath(query: Query = {}): string {
  return withQuery(RUNS_PATH, query);
}

export function runPath(run: number): string {
  return `${RUNS_PATH}/${run}`;
}

/** `from` and `until` are ISO instants, `points` the most a series may hold, `part` the part whose judgement is drawn. */
export function runChartPath(
  run: number,
  query: { from?: string; until?: string; points?: number; part?: string | null } = {},
): string {
  return withQuery(`${runPath(run)}/chart`, query);
}

export function runLoadPath(run: number): string {
  return `${runPath(run)}/load`;
}

/** Where a source's files are read again by another layout; `source` is its `n`. */
export function runSourceLayoutPath(run: number, source: number): string {
  return `${runPath(run)}/sources/${source}/layout`;
}

export function runExclusionsPath(run: number): string {
  return `${runPath(run)}/exclusions`;
}

export function runEvaluationsPath(run: number): string {
  return `${runPath(run)}/evaluations`;
}

export function runNotesPath(run: number): string {
  return `${runPath(run)}/notes`;
}

export function runReadingsCsvPath(run: number): string {
  return `${runPath(run)}/readings.csv`;
}

/** The n-th file of a run, counted from 1: the bytes as they came. */
export function runFilePath(run: number, file: number): string {
  return `${runPath(run)}/file/${file}`;
}

/** Where a file's bytes are posted as `application/octet-stream`. */
export function uploadPath(name: string, recorder?: string): string {
  return withQuery(IMPORTS_PATH, { name, recorder });
}

export function importPath(id: number): string {
  return `${IMPORTS_PATH}/${id}`;
}

export function importPreviewPath(id: number): string {
  return `${importPath(id)}/preview`;
}

export function importRunPath(id: number): string {
  return `${importPath(id)}/run`;
}

export function importDiscardPath(id: number): string {
  return `${importPath(id)}/discard`;
}

export function recorderPath(name: string): string {
  return `${RECORDERS_PATH}/${encodeURIComponent(name)}`;
}

export function cyclePath(code: string, issue: string): string {
  return `${CYCLES_PATH}/${encodeURIComponent(code)}/${encodeURIComponent(issue)}`;
}

export function cycleReleasePath(code: string, issue: string): string {
  return `${cyclePath(code, issue)}/release`;
}

export function cycleWithdrawPath(code: string, issue: string): string {
  return `${cyclePath(code, issue)}/withdraw`;
}

export function resinPath(code: string): string {
  return `${RESINS_PATH}/${encodeURIComponent(code)}`;
}

export function partsPath(query: { q?: string; limit?: number } = {}): string {
  return withQuery(PARTS_PATH, query);
}

export function partPath(serial: string): string {
  return `${PARTS_PATH}/${encodeURIComponent(serial)}`;
}

export function partResultsPath(serial: string): string {
  return `${partPath(serial)}/results`;
}

/** `drawing` and `tool` find a part like it where the part itself has none on record yet. */
export function partLayupPath(serial: string, query: { drawing?: string; tool?: string } = {}): string {
  return withQuery(`${partPath(serial)}/layup`, query);
}

/** `bag` and `tool` name the channels of the two sides, `bagFilm` and `toolFilm` coefficients in W/(m² K). */
export function partThicknessPath(
  serial: string,
  run: number,
  query: { bag?: string; tool?: string; bagFilm?: number; toolFilm?: number; resin?: string } = {},
): string {
  return withQuery(`${partPath(serial)}/runs/${run}/thickness`, query);
}

export function partWorksPath(serial: string): string {
  return `${partPath(serial)}/works`;
}

export function partCouponsPath(serial: string): string {
  return `${partPath(serial)}/coupons`;
}

export function toolPath(code: string): string {
  return `${TOOLS_PATH}/${encodeURIComponent(code)}`;
}

export function materialPath(code: string): string {
  return `${MATERIALS_PATH}/${encodeURIComponent(code)}`;
}

/** A roll or a kit, by its code. */
export function itemPath(code: string): string {
  return `/api/items/${encodeURIComponent(code)}`;
}

export function itemEventsPath(code: string): string {
  return `${itemPath(code)}/events`;
}

export function itemKitsPath(code: string): string {
  return `${itemPath(code)}/kits`;
}

export function itemExtensionsPath(code: string): string {
  return `${itemPath(code)}/extensions`;
}

/** Where a wrong line of a ledger is corrected; `line` is its `id`. */
export function itemCorrectionPath(code: string, line: number): string {
  return `${itemEventsPath(code)}/${line}/correction`;
}

/** `at` is the ISO instant that the materials' ages are asked for. */
export function partMaterialsPath(serial: string, query: { at?: string } = {}): string {
  return withQuery(`${partPath(serial)}/materials`, query);
}

export function findPath(code: string): string {
  return withQuery('/api/find', { code });
}

export function auditPath(query: { before?: number; limit?: number; subject?: string } = {}): string {
  return withQuery(AUDIT_PATH, query);
}

export function importJoinPath(id: number): string {
  return `${importPath(id)}/join`;
}

/** Where scans are pushed. */
export const PUSH_PATH = '/api/push';

export function vesselSourcesPath(vessel: string): string {
  return `${VESSELS_PATH}/${encodeURIComponent(vessel)}/sources`;
}

/** Where settings are tried that nobody has saved. */
export function vesselSourcesTryPath(vessel: string): string {
  return `${vesselSourcesPath(vessel)}/try`;
}

export function sourcePath(source: number): string {
  return `/api/sources/${source}`;
}

export function sourceRestPath(source: number): string {
  return `${sourcePath(source)}/rest`;
}

/** Where what a person read is entered. */
export function sourceReadingsPath(source: number): string {
  return `${sourcePath(source)}/readings`;
}

export function vesselKeysPath(vessel: string): string {
  return `${VESSELS_PATH}/${encodeURIComponent(vessel)}/keys`;
}

export function vesselKeyRevokePath(vessel: string, key: number): string {
  return `${vesselKeysPath(vessel)}/${key}/revoke`;
}

/** Where a run is begun. */
export function vesselRunsPath(vessel: string): string {
  return `${VESSELS_PATH}/${encodeURIComponent(vessel)}/runs`;
}

export function runEndPath(run: number): string {
  return `${runPath(run)}/end`;
}

export function runClosePath(run: number): string {
  return `${runPath(run)}/close`;
}

/** Every vessel as it is now; its events tell of what changed. */
export const LIVE_PATH = '/api/live';
export const LIVE_EVENTS_PATH = `${LIVE_PATH}/events`;

export function runLivePath(run: number): string {
  return `${runPath(run)}/live`;
}

/** Scans as they come, and what the run came to. */
export function runLiveEventsPath(run: number): string {
  return `${runLivePath(run)}/events`;
}

export function vesselDoorChecksPath(vessel: string): string {
  return `${VESSELS_PATH}/${encodeURIComponent(vessel)}/door-checks`;
}

export const WARNINGS_PATH = '/api/warnings';

export function warningAcknowledgePath(warning: number): string {
  return `${WARNINGS_PATH}/${warning}/acknowledge`;
}

/** The help page of a problem's `type`. */
export function problemPath(code: string): string {
  return `/problems/${code}`;
}
