/** Colours and letters of the page, as the canvas needs them; read again when light turns dark. */
export interface Ink {
  readonly ink: string;
  readonly soft: string;
  readonly faint: string;
  readonly hairline: string;
  readonly paper: string;
  readonly accent: string;
  readonly band: string;
  readonly red: string;
  readonly amber: string;
  readonly other: string;
  readonly hatch: string;
  readonly font: string;
  /** On paper nothing is pointed at. */
  readonly isOnPaper: boolean;
}

export function readInk(): Ink {
  const style = getComputedStyle(document.documentElement);
  const of = (name: string) => style.getPropertyValue(name).trim();
  return {
    ink: of('--ink'),
    soft: of('--ink-soft'),
    faint: of('--ink-faint'),
    hairline: of('--hairline'),
    paper: of('--paper'),
    accent: of('--accent'),
    band: of('--chart-band'),
    red: of('--red'),
    amber: of('--amber'),
    other: of('--chart-other'),
    hatch: of('--chart-hatch'),
    font: of('--font'),
    isOnPaper: false,
  };
}

/** Black on white; the accent and red stay, where a printer has them. */
export function inkOnPaper(): Ink {
  return {
    ...readInk(),
    ink: '#000000',
    soft: '#222222',
    faint: '#444444',
    hairline: '#c8c8c8',
    paper: '#ffffff',
    accent: '#0f6b5c',
    band: '#0f6b5c1c',
    red: '#a3281f',
    amber: '#835300',
    other: '#777777',
    hatch: '#777777',
    isOnPaper: true,
  };
}
