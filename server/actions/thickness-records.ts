import { type Laminate, reactionHeatJM3 } from '../../models/cure/heat/layer.ts';
import type { PartBetweenFaces } from '../../models/cure/heat/through-part.ts';
import type { Resin } from '../../models/cure/resin.ts';
import { DomainError } from '../../models/errors.ts';
import type { Layup } from '../contract/layups.ts';
import type { ResinLine } from '../contract/resins.ts';
import type { ToolRecord } from '../contract/tool-record.ts';
import type { Db } from '../store/database.ts';
import { findLayup } from '../store/layups.ts';
import { requirePart } from '../store/parts.ts';
import { readResinDocument, requireResin } from '../store/resins.ts';
import { findToolRecord } from '../store/tools.ts';

/** What is on record of a part that a cure through its thickness stands on. */
export interface ThicknessRecords {
  readonly layup: Layup;
  readonly toolCode: string | null;
  readonly toolRecord: ToolRecord | null;
  readonly resin: ResinLine;
  readonly document: Resin;
  readonly laminate: PartBetweenFaces['laminate'];
  readonly tool: PartBetweenFaces['tool'];
}

/** Reads them; where one is missing, refuses and says which and what to do. */
export function thicknessRecords(db: Db, serial: string, resinCode: string | null): ThicknessRecords {
  const layup = findLayup(db, requirePart(db, serial));
  if (layup === null) throw missing('lay-up', `How part ${serial} was laid up is not on record; write its lay-up down`);
  if (layup.thicknessMm === null) {
    throw missing('thickness', `The thickness of part ${serial} is not on record; write it in its lay-up`);
  }
  if (layup.laminate === null) {
    throw missing('laminate', `What part ${serial} is made of is not on record; choose a laminate in its lay-up`);
  }
  if (resinCode === null) {
    throw missing('resin', 'The cycle of this run names no resin set; choose the one the part was made with');
  }
  const resin = requireResin(db, resinCode);
  const document = readResinDocument(db, resin);
  const { densityKgM3, specificHeatJKgK, conductivityWMK } = layup.laminate;
  const toolRecord = layup.tool === null ? null : findToolRecord(db, layup.tool);
  return {
    layup,
    toolCode: layup.tool,
    toolRecord,
    resin,
    document,
    laminate: {
      thicknessM: layup.thicknessMm / 1000,
      densityKgM3,
      specificHeatJKgK,
      conductivityWMK,
      reactionHeatJM3: reactionHeatJM3(document, weighed(document, layup)),
    },
    tool: toolLayer(toolRecord),
  };
}

/** The laminate as far as the basis of the set's heat needs it. */
function weighed({ thermal, code }: Resin, { laminate, fibreFraction }: Layup): Laminate {
  if (thermal === undefined) {
    throw missing(
      'resin',
      `The set ${code} gives no heat of reaction, so how hot the middle got cannot be estimated with it; choose one that does`,
    );
  }
  const densityKgM3 = laminate?.densityKgM3 ?? Number.NaN;
  const resinDensityKgM3 = laminate?.resinDensityKgM3 ?? null;
  if (thermal.basis === 'composite') return { densityKgM3, resinDensityKgM3: Number.NaN, fibreFraction: Number.NaN };
  if (resinDensityKgM3 === null || fibreFraction === null) {
    const what = fibreFraction === null ? 'fibre fraction' : 'density of the resin';
    throw missing(
      'laminate',
      `The set ${code} gives its heat for a kg of resin; the ${what} of the laminate is not on record, write it in the lay-up`,
    );
  }
  return { densityKgM3, resinDensityKgM3, fibreFraction };
}

function toolLayer(record: ToolRecord | null): PartBetweenFaces['tool'] {
  if (record === null || record.thicknessMm === null || record.material === null) return null;
  const { densityKgM3, specificHeatJKgK, conductivityWMK } = record.material;
  return { thicknessM: record.thicknessMm / 1000, densityKgM3, specificHeatJKgK, conductivityWMK };
}

function missing(record: string, message: string): DomainError {
  return new DomainError('record-missing', message, { record });
}
