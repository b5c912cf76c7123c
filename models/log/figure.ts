const WITH_POINT = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d{1,3})?$/;
const WITH_COMMA = /^[+-]?(?:\d+,?\d*|,\d+)(?:[eE][+-]?\d{1,3})?$/;

/** The number a cell holds, with the decimal mark of its layout; NaN for anything else, grouped thousands too. */
export function figureFromText(text: string, decimal: '.' | ','): number {
  if (!(decimal === '.' ? WITH_POINT : WITH_COMMA).test(text)) return Number.NaN;
  const figure = Number(text.replace(',', '.'));
  if (!Number.isFinite(figure)) return Number.NaN;
  return figure === 0 ? 0 : figure;
}
