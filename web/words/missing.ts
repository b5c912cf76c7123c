import type { PartView } from '../../server/contract/parts.ts';

/** What a reader may expect of a part's history and will not find here, each named as missing. */
export function missingOfPart(view: PartView): string[] {
  const missing: string[] = [];
  if (!view.title) missing.push('What the part is.');
  if (!view.drawing) missing.push('Its drawing.');
  else if (!view.drawingIssue) missing.push('The issue of its drawing.');
  if (!view.tool) missing.push('The tool it was laid up on.');
  missing.push('The rolls it was laid up from, and their out-life.');
  for (const { line, evaluation, leakTest, startDegree, sensors } of view.runs) {
    const run = `Run ${line.run}: `;
    if (!line.cycle) missing.push(`${run}the cycle it was cured to.`);
    if (!line.vessel) missing.push(`${run}the vessel.`);
    if (!line.workOrder) missing.push(`${run}the work order.`);
    if (sensors.length === 0) missing.push(`${run}a thermocouple of its own; it is judged by all in the load.`);
    if (!leakTest) missing.push(`${run}a leak test of its bag.`);
    if (startDegree === null)
      missing.push(`${run}its degree of cure at the start; estimates begin with the resin set’s own.`);
    if (line.cycle && !evaluation) missing.push(`${run}a judgement.`);
  }
  if (view.results.length === 0) missing.push('Any test or inspection after cure.');
  return missing;
}
