import { TOOL_MATERIALS } from '../../models/cure/heat/materials.ts';
import type { SetToolRequest, ToolRecord } from '../../server/contract/tool-record.ts';
import { numberIn } from './typed.ts';

/** A tool as it stands in a form: text everywhere. */
export interface ToolForm {
  readonly title: string;
  readonly drawing: string;
  readonly thicknessMm: string;
  /** Name of a table entry, `own` for figures of one's own, empty where not known. */
  readonly entry: string;
  readonly name: string;
  readonly density: string;
  readonly specificHeat: string;
  readonly conductivity: string;
  readonly source: string;
  readonly reason: string;
}

export function formOfTool(record: ToolRecord | null): ToolForm {
  const material = record?.material ?? null;
  const isOfTable = TOOL_MATERIALS.some(({ name, source }) => name === material?.name && source === material.source);
  return {
    title: record?.title ?? '',
    drawing: record?.drawing ?? '',
    thicknessMm: record?.thicknessMm == null ? '' : String(record.thicknessMm),
    entry: material === null ? '' : isOfTable ? material.name : 'own',
    name: material?.name ?? '',
    density: material === null ? '' : String(material.densityKgM3),
    specificHeat: material === null ? '' : String(material.specificHeatJKgK),
    conductivity: material === null ? '' : String(material.conductivityWMK),
    source: material?.source ?? '',
    reason: '',
  };
}

export function requestOfTool(form: ToolForm): SetToolRequest {
  return {
    title: form.title.trim() || null,
    drawing: form.drawing.trim() || null,
    thicknessMm: numberIn(form.thicknessMm),
    material: materialIn(form),
    ...(form.reason.trim() === '' ? {} : { reason: form.reason.trim() }),
  };
}

function materialIn(form: ToolForm): SetToolRequest['material'] {
  if (form.entry === '') return null;
  const entry = TOOL_MATERIALS.find(({ name }) => name === form.entry);
  if (entry !== undefined) return { ...entry };
  return {
    name: form.name.trim(),
    densityKgM3: numberIn(form.density) ?? Number.NaN,
    specificHeatJKgK: numberIn(form.specificHeat) ?? Number.NaN,
    conductivityWMK: numberIn(form.conductivity) ?? Number.NaN,
    source: form.source.trim(),
  };
}
