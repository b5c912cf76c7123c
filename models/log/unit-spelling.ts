/** What a units row says of one column. */
export interface SpelledUnit {
  /** The product's name of the unit, without ` abs`; `K` for kelvin and `µV`, which no channel has. */
  readonly unit: string;
  readonly quantity: 'temperature' | 'pressure' | 'emf';
  /** What the spelling says of the zero point; null where it says nothing. */
  readonly reference: 'gauge' | 'absolute' | null;
}

const TEMPERATURE_SPELLINGS: Readonly<Record<string, string>> = {
  c: '°C',
  celsius: '°C',
  centigrade: '°C',
  f: '°F',
  fahrenheit: '°F',
  k: 'K',
  kelvin: 'K',
};

/** NFKC turns the micro sign into the Greek letter. */
const EMF_SPELLINGS: Readonly<Record<string, string>> = {
  mv: 'mV',
  millivolt: 'mV',
  millivolts: 'mV',
  μv: 'µV',
  uv: 'µV',
  microvolt: 'µV',
  microvolts: 'µV',
};

const PRESSURE_SPELLINGS: Readonly<Record<string, string>> = {
  pa: 'Pa',
  pascal: 'Pa',
  hpa: 'hPa',
  mbar: 'mbar',
  mb: 'mbar',
  millibar: 'mbar',
  kpa: 'kPa',
  bar: 'bar',
  bars: 'bar',
  mpa: 'MPa',
  psi: 'psi',
  lbfin2: 'psi',
  lbin2: 'psi',
  inhg: 'inHg',
  inchhg: 'inHg',
  '"hg': 'inHg',
  mmhg: 'mmHg',
  torr: 'torr',
};

/** The unit behind a spelling (`deg C`, `ºC`, `bar(g)`, `psia`, `in. Hg`); null where the text is no unit known here. */
export function unitFromSpelling(spelling: string): SpelledUnit | null {
  const bare = spelling
    .trim()
    .replace(/^[[({](.*)[\])}]$/u, '$1')
    .normalize('NFKC')
    .toLowerCase()
    .replace(/[\s._^/·-]/g, '');
  const scale = bare.replace(DEGREES, '');
  if (Object.hasOwn(TEMPERATURE_SPELLINGS, scale)) {
    return { unit: TEMPERATURE_SPELLINGS[scale]!, quantity: 'temperature', reference: null };
  }
  if (Object.hasOwn(EMF_SPELLINGS, bare)) return { unit: EMF_SPELLINGS[bare]!, quantity: 'emf', reference: null };
  if (Object.hasOwn(PRESSURE_SPELLINGS, bare)) return pressure(bare, undefined);
  const [, name = '', suffix] = /^(.+?)\(?(g|gauge|gage|rel|a|abs|absolute|vac|vacuum)\)?$/u.exec(bare) ?? [];
  return Object.hasOwn(PRESSURE_SPELLINGS, name) ? pressure(name, suffix) : null;
}

function pressure(name: string, suffix: string | undefined): SpelledUnit {
  return { unit: PRESSURE_SPELLINGS[name]!, quantity: 'pressure', reference: referenceFrom(suffix) };
}

/**
 * A degree sign as it is written (`°`, `º`, `˚`, `deg`), or as it arrives when its encoding was lost: `?`, U+FFFD, or
 * the `Â°` of UTF-8 read as Windows-1252. NFKC turns `º` into `o`, `˚` into a space and U+030A, `℃` into `°C`.
 */
const DEGREES = /^(?:â?°|o|\u030a|\?|\ufffd+|deg(?:ree)?s?|grad|grd)(?=.)/u;

function referenceFrom(suffix: string | undefined): 'gauge' | 'absolute' | null {
  if (suffix === undefined || suffix.startsWith('vac')) return null;
  return suffix.startsWith('a') ? 'absolute' : 'gauge';
}
