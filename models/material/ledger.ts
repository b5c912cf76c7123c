import type { TemperatureUnit } from '../units.ts';
import type { Material } from './material.ts';

/** What a room was like. What is left out was not recorded. */
export interface Room {
  readonly temperature?: number | undefined;
  readonly unit: TemperatureUnit;
  /** % RH. */
  readonly humidity?: number | undefined;
}

/** Which of a material's lives an extension is about. */
export const EXTENDED_LIVES = ['out-life', 'shelf-life'] as const;
export type ExtendedLife = (typeof EXTENDED_LIVES)[number];

/** One line of an item's ledger; `at` is an ISO instant. */
export type LedgerEvent = { readonly at: string } & (
  | {
      /** A roll came in, frozen or out. */
      readonly kind: 'received';
      readonly batch: string;
      readonly as: 'frozen' | 'out';
      readonly room?: Room | undefined;
      /** Out-time that the maker or carrier states, in minutes. */
      readonly outMinutesBefore?: number | undefined;
    }
  /** A kit was cut from a roll or from another kit; it is out from then on. */
  | { readonly kind: 'cut'; readonly from: string; readonly room?: Room | undefined }
  | { readonly kind: 'out'; readonly room?: Room | undefined }
  | { readonly kind: 'in' }
  /** The room it lies in was measured. */
  | { readonly kind: 'room'; readonly room: Room }
  /** The material had warmed to the temperature its document counts from. */
  | { readonly kind: 'thawed' }
  /** Its sealed wrapping was opened: tack life runs from here. */
  | { readonly kind: 'opened' }
  | {
      /** A freezer's own record while it was too warm or too cold: points of [ISO instant, temperature]. */
      readonly kind: 'excursion';
      readonly points: readonly (readonly [string, number])[];
      readonly unit: TemperatureUnit;
    }
  | {
      readonly kind: 'extended';
      readonly life: ExtendedLife;
      /** Of an out-life: the new one. */
      readonly lifeDays?: number | undefined;
      /** The extension's own end, and a shelf life's new one. */
      readonly until: string;
      readonly authority: string;
      readonly tests: string;
    }
  | { readonly kind: 'scrapped' }
);

export type EventKind = LedgerEvent['kind'];

export interface LedgerItem {
  readonly item: string;
  readonly kind: 'roll' | 'kit';
  /** In any order. */
  readonly events: readonly LedgerEvent[];
  /** Kits cut from it and parts laid up from it: whoever did that had it out of the freezer. */
  readonly uses?: readonly { readonly at: string; readonly what: string }[];
}

export interface BatchRecord {
  readonly batch: string;
  /** The issue of its material document. */
  readonly material: { readonly code: string; readonly issue: string };
  /** Days, `2026-03-02`. */
  readonly made?: string;
  /** The maker's own last day. */
  readonly expires?: string;
}

/** One material in a part: which item it came from, and when it was laid. */
export interface PartMaterial {
  readonly item: string;
  readonly plies?: number;
  readonly laidUpFrom?: string;
  readonly laidUpUntil?: string;
}

/** Everything that the ages of some items follow from; an input of a judgement, so it travels as a document. */
export interface MaterialRecords {
  readonly format: 'dwellbook-material-records/1';
  readonly materials: readonly Material[];
  readonly batches: readonly BatchRecord[];
  /** The items named in `parts`, and all they were cut from. */
  readonly items: readonly LedgerItem[];
  readonly parts: readonly { readonly part: string; readonly materials: readonly PartMaterial[] }[];
}
