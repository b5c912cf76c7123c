import type { KinKind } from '../contract/trace.ts';

/** The load that holds for a run. */
const HOLDS = 'loads.id = (SELECT max(id) FROM loads AS later WHERE later.run_id = loads.run_id)';
const IN_SPAN = 'from_ms >= @fromMs AND from_ms < @untilMs';
const NAMED = 'IN (SELECT value FROM json_each(@parts))';
const KEYS = 'IN (SELECT value FROM json_each(@keys))';
const KEY_IDS = 'IN (SELECT CAST(value AS INTEGER) FROM json_each(@keys))';
const IS_LATEST = 'about.id = (SELECT max(id) FROM part_particulars WHERE part_id = about.part_id)';

const LOADS_OF_PARTS = `
  FROM load_parts JOIN loads ON loads.id = load_id AND ${HOLDS} JOIN runs ON runs.id = run_id
  LEFT JOIN vessels ON vessels.id = vessel_id LEFT JOIN cycles ON cycles.id = cycle_id
  WHERE load_parts.part_id ${NAMED}`;

const PARTS_OF_LOADS = `
  FROM runs JOIN loads ON loads.run_id = runs.id AND ${HOLDS} JOIN load_parts ON load_id = loads.id`;

/** Every item above a part's own, itself included. */
const ABOVE = `
  WITH RECURSIVE above (part_id, own_id, item_id) AS (
    SELECT part_id, item_id, item_id FROM part_materials_now WHERE part_id ${NAMED}
    UNION SELECT part_id, own_id, parent_id FROM above
      JOIN material_events_now AS event ON event.item_id = above.item_id AND parent_id IS NOT NULL)`;

/** Every item below those of a key, themselves included. */
function below(named: string): string {
  return `
  WITH RECURSIVE below (key, item_id) AS (
    ${named}
    UNION SELECT key, event.item_id FROM below JOIN material_events_now AS event ON event.parent_id = below.item_id)
  SELECT DISTINCT part_id AS partId, CAST(key AS TEXT) AS key, NULL AS run
  FROM below CROSS JOIN part_materials_now AS used ON used.item_id = below.item_id`;
}

function channelKeys(kind: 'bag-line' | 'thermocouple', word: string): string {
  return `
  SELECT DISTINCT load_parts.part_id AS partId, vessel_id || ' ' || channel AS key,
    '${word} ' || channel || ' of ' || vessels.name AS what
  FROM load_parts JOIN loads ON loads.id = load_parts.load_id AND ${HOLDS} JOIN runs ON runs.id = run_id
  JOIN vessels ON vessels.id = vessel_id
  JOIN load_places ON load_places.load_id = loads.id AND load_places.kind = '${kind}' AND load_places.part_id = load_parts.part_id
  WHERE load_parts.part_id ${NAMED}`;
}

/** By vessel and channel: the same name in another vessel is another line. */
function channelKin(kind: 'bag-line' | 'thermocouple'): string {
  return `
  WITH wanted AS (
    SELECT value AS key, CAST(substr(value, 1, instr(value, ' ') - 1) AS INTEGER) AS vessel,
      substr(value, instr(value, ' ') + 1) AS channel FROM json_each(@keys))
  SELECT DISTINCT load_places.part_id AS partId, key, runs.id AS run
  FROM (SELECT DISTINCT vessel FROM wanted) AS here CROSS JOIN runs ON vessel_id = here.vessel AND ${IN_SPAN}
  CROSS JOIN loads ON loads.id = (SELECT max(id) FROM loads AS later WHERE later.run_id = runs.id)
  CROSS JOIN wanted ON wanted.vessel = here.vessel
  CROSS JOIN load_places ON load_places.load_id = loads.id AND load_places.kind = '${kind}'
    AND load_places.channel = wanted.channel`;
}

/** What parts have, by kind. */
export const KEYS_OF: Readonly<Record<KinKind, string>> = {
  load: `SELECT load_parts.part_id AS partId, CAST(run_id AS TEXT) AS key, 'run ' || run_id AS what ${LOADS_OF_PARTS}`,
  kit: `
    SELECT DISTINCT part_id AS partId, CAST(item_id AS TEXT) AS key, 'kit ' || code AS what
    FROM part_materials_now JOIN material_items ON material_items.id = item_id
    WHERE part_id ${NAMED} AND kind = 'kit'`,
  roll: `${ABOVE}
    SELECT DISTINCT part_id AS partId, CAST(item_id AS TEXT) AS key, 'roll ' || code AS what
    FROM above JOIN material_items ON material_items.id = item_id WHERE kind = 'roll'`,
  batch: `${ABOVE}
    SELECT DISTINCT part_id AS partId, CAST(batch_id AS TEXT) AS key, 'batch ' || batches.code AS what
    FROM above JOIN material_events_now AS event ON event.item_id = above.item_id AND event.kind = 'received'
    JOIN batches ON batches.id = batch_id`,
  tool: `
    SELECT part_id AS partId, tool AS key, 'tool ' || tool AS what FROM part_particulars AS about
    WHERE part_id ${NAMED} AND tool <> '' AND ${IS_LATEST}`,
  'bag-line': channelKeys('bag-line', 'bag line'),
  thermocouple: channelKeys('thermocouple', 'thermocouple'),
  vessel: `
    SELECT DISTINCT load_parts.part_id AS partId, CAST(vessel_id AS TEXT) AS key, vessels.name AS what
    ${LOADS_OF_PARTS} AND vessel_id IS NOT NULL`,
  cycle: `
    SELECT DISTINCT load_parts.part_id AS partId, CAST(cycle_id AS TEXT) AS key,
      'cycle ' || cycles.code || ' issue ' || cycles.issue AS what ${LOADS_OF_PARTS} AND cycle_id IS NOT NULL`,
  operator: `
    SELECT DISTINCT load_parts.part_id AS partId, loads.by AS key, 'load set by ' || loads.by AS what ${LOADS_OF_PARTS}`,
};

/** Parts that have it, by kind. */
export const KIN_OF: Readonly<Record<KinKind, string>> = {
  load: `
    SELECT part_id AS partId, CAST(runs.id AS TEXT) AS key, runs.id AS run ${PARTS_OF_LOADS}
    WHERE runs.id ${KEY_IDS} AND ${IN_SPAN}`,
  kit: below('SELECT CAST(value AS INTEGER), CAST(value AS INTEGER) FROM json_each(@keys)'),
  roll: below('SELECT CAST(value AS INTEGER), CAST(value AS INTEGER) FROM json_each(@keys)'),
  batch: below(`
    SELECT batch_id, item_id FROM material_events_now
    WHERE batch_id IS NOT NULL AND kind = 'received'
      AND batch_id ${KEY_IDS}`),
  tool: `
    SELECT part_id AS partId, tool AS key, NULL AS run FROM part_particulars AS about
    WHERE tool ${KEYS} AND ${IS_LATEST}`,
  'bag-line': channelKin('bag-line'),
  thermocouple: channelKin('thermocouple'),
  vessel: `
    SELECT part_id AS partId, CAST(vessel_id AS TEXT) AS key, runs.id AS run ${PARTS_OF_LOADS}
    WHERE vessel_id ${KEY_IDS} AND ${IN_SPAN}`,
  cycle: `
    SELECT part_id AS partId, CAST(cycle_id AS TEXT) AS key, runs.id AS run
    FROM loads JOIN runs ON runs.id = run_id JOIN load_parts ON load_id = loads.id
    WHERE cycle_id ${KEY_IDS} AND ${HOLDS} AND ${IN_SPAN}`,
  operator: `
    SELECT part_id AS partId, loads.by AS key, runs.id AS run
    FROM loads JOIN runs ON runs.id = run_id JOIN load_parts ON load_id = loads.id
    WHERE loads.by ${KEYS} AND ${HOLDS} AND ${IN_SPAN}`,
};
