import { DomainError } from '../errors.ts';
import type { ChannelLayout } from './layout.ts';
import type { RowPlan } from './row-plan.ts';
import { unitFromSpelling } from './unit-spelling.ts';

/**
 * Holds a units row against the layout. An empty cell says nothing; a spelling of the same unit agrees.
 *
 * Where a channel has `scale` or `offset`, the row speaks of the figure before them, so only the quantity must agree.
 *
 * @throws {DomainError} `log-units-contradict` naming line, column and both units.
 */
export function checkUnits(
  cells: readonly string[],
  channels: readonly ChannelLayout[],
  plan: RowPlan,
  file: string,
  line: number,
): void {
  for (const [column, target] of plan.targets.entries()) {
    const channel = channels[target];
    const spelling = cells[column] ?? '';
    if (!channel || spelling === '' || agrees(spelling, channel)) continue;
    throw new DomainError(
      'log-units-contradict',
      `${file}, line ${line}, column "${channel.column}": the file says ${spelling}, the layout says ${channel.unit}`,
      { file, line, column: channel.column, unitInFile: spelling, unitInLayout: channel.unit },
    );
  }
}

function agrees(spelling: string, channel: ChannelLayout): boolean {
  const said = unitFromSpelling(spelling);
  const isAbsolute = channel.unit.endsWith(' abs');
  const meant = unitFromSpelling(channel.unit);
  if (!said || !meant) return channel.role === 'other' || spelling === channel.unit;
  if (said.quantity !== meant.quantity) return false;
  if (channel.scale !== undefined || channel.offset !== undefined) return true;
  if (said.unit !== meant.unit) return false;
  return said.reference === null || (said.reference === 'absolute') === isAbsolute;
}
