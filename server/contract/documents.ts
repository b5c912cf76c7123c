import * as z from 'zod';
import type { Resin } from '../../models/cure/resin.ts';
import type { Cycle } from '../../models/cycle/cycle.ts';
import type { Evaluation, PartEvaluation } from '../../models/evaluation/evaluation.ts';
import type { Forecast } from '../../models/forecast/forecast.ts';
import type { Layout } from '../../models/log/layout.ts';
import type { LiveSource } from '../../models/log/live-source.ts';
import type { LedgerEvent } from '../../models/material/ledger.ts';
import type { Material } from '../../models/material/material.ts';
import type { MaterialState } from '../../models/material/material-state.ts';
import type { Load } from '../../models/run/load.ts';

/**
 * The documents travel whole. Their own parsers in `models` take them apart and refuse by name; here they are only
 * known to be objects.
 */
function document<T>(id: string, description: string): z.ZodType<T> {
  return z
    .custom<T>((value) => typeof value === 'object' && value !== null && !Array.isArray(value), {
      error: `expected a ${id} document`,
    })
    .meta({ id, description });
}

export const cycleDocument = document<Cycle>('Cycle', 'Cycle document, dwellbook-cycle/1');
export const layoutDocument = document<Layout>('Layout', 'Log layout document, dwellbook-layout/1');
export const sourceDocument = document<LiveSource>('Source', 'Live source document, dwellbook-source/1');
export const loadDocument = document<Load>('Load', 'Load document, dwellbook-load/1');
export const resinDocument = document<Resin>('Resin', 'Resin document, dwellbook-resin/1');
export const evaluationDocument = document<Evaluation>('Evaluation', 'What check says, dwellbook-evaluation/1');
export const partEvaluationDocument = document<PartEvaluation>('PartEvaluation', 'One part of an evaluation');
export const forecastDocument = document<Forecast>('Forecast', 'Where an open run is heading, for one part');
/** Plain geometry, made and typed by `models/chart`. */
export const chartDocument = document<object>('Chart', 'What is to be drawn of a run, as plain geometry');
export const materialDocument = document<Material>('Material', 'Material document, dwellbook-material/1');
export const ledgerEventDocument = document<LedgerEvent>('LedgerEvent', 'One line of an out-life ledger');
export const materialStateDocument = document<MaterialState>('MaterialState', 'What a roll or kit has aged to');
