import type { TemperatureUnit } from '../units.ts';

/**
 * The material document (`dwellbook-material/1`): what counts against the lives of one product, issue by issue.
 *
 * Temperatures are in the document's unit, lives in days of 24 hours.
 */
export interface Material {
  readonly format: 'dwellbook-material/1';
  readonly code: string;
  readonly issue: string;
  readonly name: string;
  readonly maker?: string;
  /** What it comes as: prepreg tape, film adhesive … */
  readonly form?: string;
  readonly origin?: { readonly document: string; readonly issue: string; readonly clause?: string };
  /** Code of the resin set its aged degree may be worked out with. */
  readonly resin?: string;
  readonly units: { readonly temperature: TemperatureUnit };
  readonly storage: Storage;
  readonly out: OutLife;
  readonly tack?: { readonly lifeDays: number };
  readonly thaw?: Thaw;
  readonly refreezing?: { readonly atMost: number };
  readonly equivalent?: EquivalentTime;
  readonly extension?: Extension;
  readonly ageing?: Ageing;
}

/** Shelf life from manufacture, kept at or below `atMost`. */
export interface Storage {
  readonly atMost: number;
  /** Colder than this it may not be kept. */
  readonly atLeast?: number;
  readonly lifeDays: number;
  /** A freezer warmer than this counts as out; where not written: warmer than `atMost`. */
  readonly outAbove?: number;
}

/** Out-life in a room of at most `atMost` and `humidityAtMost` % RH. */
export interface OutLife {
  readonly lifeDays: number;
  readonly atMost: number;
  readonly humidityAtMost?: number;
}

/** Where out-time begins: as the item leaves the freezer, or once the material has warmed to `above`. */
export type Thaw = { readonly from: 'removal' } | { readonly from: 'temperature'; readonly above: number };

/** How much faster a warmer room ages: two stated lives or an activation energy, approved by someone with a name. */
export type EquivalentTime = {
  readonly approvedBy: string;
  /** Time colder than the out-life's temperature counts for less; where not written it counts in full. */
  readonly colderCountsLess?: boolean;
} & (
  | {
      readonly rule: 'two-lives';
      /** Two of [temperature, days]: the out-life itself first, then a shorter life in a warmer room. */
      readonly lives: readonly [readonly [number, number], readonly [number, number]];
    }
  | {
      readonly rule: 'arrhenius';
      /** J/mol. */
      readonly E: number;
      /** Nothing warmer than this is converted. */
      readonly atMost: number;
    }
);

/** What a named authority may extend by re-test. */
export interface Extension {
  readonly times: number;
  readonly tests: readonly string[];
}

/** Degree of cure measured on fresh material and at the end of its out-life. */
export interface Ageing {
  readonly freshDegree: number;
  readonly degreeAtOutLife: number;
  readonly source: string;
}
