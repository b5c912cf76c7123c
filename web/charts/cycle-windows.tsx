import type { Cycle } from '../../models/cycle/cycle.ts';
import { band } from '../words/figures.ts';
import type { CycleShape } from './cycle-shape.ts';

/** Windows of pressure and vacuum: a bracket each, over the stretch it holds, under the course. */
export function CycleWindows({
  cycle,
  shape,
  x,
  top,
  rowHeight,
  lit,
}: {
  cycle: Cycle;
  shape: CycleShape;
  x: (minute: number) => number;
  top: number;
  rowHeight: number;
  lit: string | null;
}) {
  return (
    <g>
      {shape.windows.map((window, row) => {
        const y = top + row * rowHeight;
        const left = x(window.fromMin);
        const right = Math.max(x(window.untilMin), left + 10);
        const isOnRight = left > (x(0) + x(shape.lengthMin)) / 2;
        const unit = (window.quantity === 'vacuum' ? cycle.units.vacuum : cycle.units.pressure) ?? '';
        return (
          <g key={window.name} class={lit === window.name ? 'bracket lit' : 'bracket'}>
            <rect class="band" x={left} y={y + 24} width={right - left} height={12} />
            <path d={`M${left},${y + 18} V${y + 40} M${right},${y + 18} V${y + 40} M${left},${y + 36} H${right}`} />
            <text x={isOnRight ? right : left} y={y + 14} text-anchor={isOnRight ? 'end' : 'start'}>
              <tspan class="name">{window.name}</tspan> {band(window.atLeast, window.atMost, unit)}
            </text>
          </g>
        );
      })}
    </g>
  );
}
