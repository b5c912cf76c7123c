import type { LabelSymbol } from '../../server/contract/labels.ts';
import { labelPath } from '../../server/contract/record-paths.ts';
import type { Asked, SheetLayout } from '../words/label-sheet.ts';

/** One page of labels, in mm: what is seen is what is printed. */
export function LabelSheet({
  layout,
  symbol,
  labels,
}: {
  layout: SheetLayout;
  symbol: LabelSymbol;
  labels: readonly (Asked | null)[];
}) {
  const { pageWidthMm, pageHeightMm, labelWidthMm, labelHeightMm, places } = layout;
  const said = [...new Set(labels.flatMap((label) => (label === null ? [] : [label.code])))].join(', ');
  return (
    <svg
      class="label-sheet"
      role="img"
      aria-label={`Labels of ${said}`}
      width={`${pageWidthMm}mm`}
      height={`${pageHeightMm}mm`}
      viewBox={`0 0 ${pageWidthMm} ${pageHeightMm}`}
    >
      {places.map(({ x, y }, n) => {
        const label = labels[n];
        return (
          <g key={`${x} ${y}`} transform={`translate(${x} ${y})`}>
            <rect class="cut" width={labelWidthMm} height={labelHeightMm} />
            {label && <Label label={label} symbol={symbol} width={labelWidthMm} height={labelHeightMm} />}
          </g>
        );
      })}
    </svg>
  );
}

/** Of a label's height: kept clear above and below. */
const PAD = 0.08;

function Label({
  label: { kind, code },
  symbol,
  width,
  height,
}: {
  label: Asked;
  symbol: LabelSymbol;
  width: number;
  height: number;
}) {
  const pad = Math.max(1, PAD * height);
  const href = labelPath(kind, code, symbol);
  if (symbol === 'code128') {
    const barsMm = 0.55 * height;
    const sizeMm = Math.min(0.2 * height, textSizeMm(code, width - 2 * pad));
    return (
      <>
        <image href={href} x={0} y={pad} width={width} height={barsMm} preserveAspectRatio="none" />
        <text class="code" x={width / 2} y={height - pad} font-size={sizeMm} text-anchor="middle">
          {code}
        </text>
      </>
    );
  }
  const sideMm = Math.min(height - 2 * pad, 0.45 * width);
  const leftMm = sideMm + 2 * pad;
  const lines = linesOf(code, (width - leftMm - pad) / height > 1.2 ? 16 : 9);
  const longest = Math.max(...lines.map((line) => line.length));
  const sizeMm = Math.min((0.5 * height) / lines.length, textSizeMm('0'.repeat(longest), width - leftMm - pad));
  const middle = height / 2 + 0.1 * height;
  return (
    <>
      <image href={href} x={pad} y={(height - sideMm) / 2} width={sideMm} height={sideMm} />
      <text class="kind" x={leftMm} y={pad + 0.12 * height} font-size={0.1 * height}>
        {kind}
      </text>
      {lines.map((line, n) => (
        <text
          key={`${n} ${line}`}
          class="code"
          x={leftMm}
          y={middle + (n - (lines.length - 1) / 2) * 1.1 * sizeMm + 0.3 * sizeMm}
          font-size={sizeMm}
        >
          {line}
        </text>
      ))}
    </>
  );
}

/** Bold figures and capitals are about 0.66 of their size wide. */
function textSizeMm(text: string, widthMm: number): number {
  return widthMm / (0.66 * Math.max(1, text.length));
}

function linesOf(code: string, most: number): string[] {
  return Array.from({ length: Math.ceil(code.length / most) }, (_, n) => code.slice(n * most, (n + 1) * most));
}
