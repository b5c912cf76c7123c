import type { PartView } from '../../server/contract/parts.ts';

/** What a reader may expect of a part's history and will not find here, each named as missing. */
export function missingOfPart(view: PartView): string[] {
  const missing: string[] = [];
  if (!view.title) missing.push('What the part is.');
  if (!view.drawing) missing.push('Its drawing.');
  else if (!view.drawingIssue) missing.push('The issue of its drawing.');
  if (!view.tool) missing.push('The tool it was laid up on.');
  else if (!view.toolRecord?.material || view.toolRecord.thicknessMm === null)
    missing.push(`What tool ${view.tool} is made of, and how thick it is.`);
  missing.push(...missingOfLayup(view));
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

/** Of the lay-up, each thing that nobody wrote down; where there is none at all, that alone. */
function missingOfLayup({ layup, runs, tool }: PartView): string[] {
  if (layup === null) return ['How it was laid up: thickness, laminate, times, room and debulks.'];
  const missing: string[] = [];
  if (layup.thicknessMm === null) missing.push('Its thickness when cured.');
  if (layup.laminate === null) missing.push('What its laminate is made of.');
  if (layup.plies === null) missing.push('How many plies it has.');
  if (layup.beganAt === null || layup.endedAt === null) missing.push('When its lay-up began and ended.');
  if (layup.roomC === null || layup.humidityPercent === null)
    missing.push('Temperature and humidity of the room it was laid up in.');
  if (layup.debulks.length === 0) missing.push('Its debulks.');
  if (layup.customer === null) missing.push('Whom it was made for.');
  if (layup.tool !== null && tool !== null && layup.tool !== tool)
    missing.push(`Which tool is right: its lay-up says ${layup.tool}, its load ${tool}.`);
  const first = runs[0]?.line;
  if (first && layup.endedAt !== null && Date.parse(layup.endedAt) > Date.parse(first.from))
    missing.push(`How its lay-up can have ended after run ${first.run} began.`);
  return missing;
}
