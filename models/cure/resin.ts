/** The resin document (`dwellbook-resin/1`): one parameter set of one study, never mixed with another. */

export type Kinetics =
  | { readonly law: 'nth-order'; readonly A: number; readonly E: number; readonly n: number }
  | { readonly law: 'autocatalytic'; readonly A: number; readonly E: number; readonly m: number; readonly n: number }
  | {
      readonly law: 'kamal-sourour';
      readonly A1: number;
      readonly E1: number;
      readonly A2: number;
      readonly E2: number;
      readonly m: number;
      readonly n: number;
    }
  | {
      readonly law: 'lee-loos-springer';
      readonly A1: number;
      readonly E1: number;
      readonly A2: number;
      readonly E2: number;
      readonly A3: number;
      readonly E3: number;
      readonly B: number;
      readonly switchDegree: number;
    }
  | {
      readonly law: 'two-term';
      readonly A1: number;
      readonly E1: number;
      readonly m1: number;
      readonly n1: number;
      readonly A2: number;
      readonly E2: number;
      readonly m2: number;
      readonly n2: number;
      readonly D: number;
      readonly alphaC0: number;
      readonly alphaCT: number;
    }
  | {
      readonly law: 'isoconversional';
      readonly degree: readonly number[];
      readonly E: readonly number[];
      readonly lnAf: readonly number[];
    };

export type NthOrder = Extract<Kinetics, { law: 'nth-order' }>;
export type Autocatalytic = Extract<Kinetics, { law: 'autocatalytic' }>;
export type KamalSourour = Extract<Kinetics, { law: 'kamal-sourour' }>;
export type LeeLoosSpringer = Extract<Kinetics, { law: 'lee-loos-springer' }>;
export type TwoTerm = Extract<Kinetics, { law: 'two-term' }>;
export type Isoconversional = Extract<Kinetics, { law: 'isoconversional' }>;

export const RESIN_STATUSES = ['published', 'recalled', 'fitted', 'illustrative'] as const;
export type ResinStatus = (typeof RESIN_STATUSES)[number];

/** `flowsBelow`, in Pa s, is the viscosity below which its author says that the resin flows; there is no common one. */
export type Viscosity =
  | {
      readonly law: 'castro-macosko';
      /** Pa s. */
      readonly A: number;
      /** J/mol. */
      readonly E: number;
      readonly gelDegree: number;
      /** Exponent a + b α of αg/(αg − α). */
      readonly a: number;
      readonly b: number;
      readonly flowsBelow?: number;
    }
  | {
      readonly law: 'lee-loos-springer';
      /** Pa s. */
      readonly muInf: number;
      /** J/mol. */
      readonly U: number;
      readonly K: number;
      /** Degree up to which the fit was made. */
      readonly validTo: number;
      readonly flowsBelow?: number;
    };
export type CastroMacosko = Extract<Viscosity, { law: 'castro-macosko' }>;
export type ViscosityLeeLoosSpringer = Extract<Viscosity, { law: 'lee-loos-springer' }>;

export type Diffusion = NonNullable<Resin['diffusion']>;
export type GlassTransition = NonNullable<Resin['glassTransition']>;

export interface Resin {
  readonly format: 'dwellbook-resin/1';
  readonly code: string;
  readonly name: string;
  readonly source: {
    readonly citation: string;
    readonly status: ResinStatus;
    /** Where a figure looks wrong and is not: in words, why it stands as the source prints it. Silences the questions. */
    readonly confirmed?: string;
  };
  /** Range of temperature the set was fitted in, °C. */
  readonly validC?: readonly [number, number];
  /** Degree of cure at the first scan; part of the set. */
  readonly initialDegree: number;
  /** J/(mol K), as the study used it. */
  readonly gasConstant: number;
  /** `A` in 1/s, `E` in J/mol. */
  readonly kinetics: Kinetics;
  /** Multiplies the whole rate by 1/(1 + exp(C (α − (alphaC0 + alphaCT T)))), T in K. */
  readonly diffusion?: {
    readonly law: 'logistic';
    readonly C: number;
    readonly alphaC0: number;
    readonly alphaCT: number;
  };
  readonly glassTransition?: {
    readonly law: 'dibenedetto';
    readonly tg0C: number;
    readonly tgInfC: number;
    readonly lambda: number;
    readonly method?: string;
  };
  readonly gel?: { readonly degree: number };
  /** Viscosity of the reacting resin before gel, of the same study. */
  readonly viscosity?: Viscosity;
  /**
   * Covariances of the fitted constants, where the study gives them. `parameters` are keys of `kinetics`, or `ln` and
   * such a key for the natural logarithm of a constant (`lnA1`).
   */
  readonly covariance?: {
    readonly parameters: readonly string[];
    readonly matrix: readonly (readonly number[])[];
  };
  /** No key of the document: set by a workshop that may take the set for trials only, never as a limit. */
  readonly forTrialsOnly?: true;
  readonly thermal?: { readonly heatOfReaction: number; readonly basis: 'resin' | 'composite' };
}
