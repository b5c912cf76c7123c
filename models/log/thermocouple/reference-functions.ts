import type { ThermocoupleType } from '../layout.ts';

/** One range of a reference function: E = Σ c_i t^i in mV, t in °C, holding up to `untilC`. */
export interface ReferencePiece {
  readonly untilC: number;
  readonly coefficients: readonly number[];
}

export interface ReferenceFunction {
  /** Coldest and hottest temperature of the function, °C. */
  readonly rangeC: readonly [number, number];
  /** Rising in `untilC`. */
  readonly pieces: readonly ReferencePiece[];
  /** a0 exp(a1 (t − a2)²) in mV, added from 0 °C on: type K only. */
  readonly bump?: readonly [number, number, number];
}

/**
 * Emf of the letter-designated thermocouples with their cold junction at 0 °C, on the ITS-90.
 *
 * Source: Burns, Scroger, Strouse, Croarkin & Guthrie, NIST Monograph 175 (1993); coefficients as in the NIST ITS-90
 *   Thermocouple Database (Standard Reference Database 60).
 */
export const REFERENCE_FUNCTIONS: Readonly<Record<ThermocoupleType, ReferenceFunction>> = {
  K: {
    rangeC: [-270, 1372],
    pieces: [
      {
        untilC: 0,
        coefficients: [
          0, 0.039450128025, 2.3622373598e-5, -3.2858906784e-7, -4.9904828777e-9, -6.7509059173e-11, -5.7410327428e-13,
          -3.1088872894e-15, -1.0451609365e-17, -1.9889266878e-20, -1.6322697486e-23,
        ],
      },
      {
        untilC: 1372,
        coefficients: [
          -0.017600413686, 0.038921204975, 1.8558770032e-5, -9.9457592874e-8, 3.1840945719e-10, -5.6072844889e-13,
          5.6075059059e-16, -3.2020720003e-19, 9.7151147152e-23, -1.2104721275e-26,
        ],
      },
    ],
    bump: [0.1185976, -0.0001183432, 126.9686],
  },
  J: {
    rangeC: [-210, 1200],
    pieces: [
      {
        untilC: 760,
        coefficients: [
          0, 0.050381187815, 3.047583693e-5, -8.568106572e-8, 1.3228195295e-10, -1.7052958337e-13, 2.0948090697e-16,
          -1.2538395336e-19, 1.5631725697e-23,
        ],
      },
      {
        untilC: 1200,
        coefficients: [
          296.45625681, -1.4976127786, 0.0031787103924, -3.1847686701e-6, 1.5720819004e-9, -3.0691369056e-13,
        ],
      },
    ],
  },
  T: {
    rangeC: [-270, 400],
    pieces: [
      {
        untilC: 0,
        coefficients: [
          0, 0.038748106364, 4.4194434347e-5, 1.1844323105e-7, 2.0032973554e-8, 9.0138019559e-10, 2.2651156593e-11,
          3.6071154205e-13, 3.8493939883e-15, 2.8213521925e-17, 1.4251594779e-19, 4.8768662286e-22, 1.079553927e-24,
          1.3945027062e-27, 7.9795153927e-31,
        ],
      },
      {
        untilC: 400,
        coefficients: [
          0, 0.038748106364, 3.329222788e-5, 2.0618243404e-7, -2.1882256846e-9, 1.0996880928e-11, -3.0815758772e-14,
          4.547913529e-17, -2.7512901673e-20,
        ],
      },
    ],
  },
  N: {
    rangeC: [-270, 1300],
    pieces: [
      {
        untilC: 0,
        coefficients: [
          0, 0.026159105962, 1.0957484228e-5, -9.3841111554e-8, -4.6412039759e-11, -2.6303357716e-12, -2.2653438003e-14,
          -7.6089300791e-17, -9.3419667835e-20,
        ],
      },
      {
        untilC: 1300,
        coefficients: [
          0, 0.025929394601, 1.571014188e-5, 4.3825627237e-8, -2.5261169794e-10, 6.4311819339e-13, -1.0063471519e-15,
          9.9745338992e-19, -6.0863245607e-22, 2.0849229339e-25, -3.0682196151e-29,
        ],
      },
    ],
  },
  E: {
    rangeC: [-270, 1000],
    pieces: [
      {
        untilC: 0,
        coefficients: [
          0, 0.058665508708, 4.5410977124e-5, -7.7998048686e-7, -2.5800160843e-8, -5.9452583057e-10, -9.3214058667e-12,
          -1.0287605534e-13, -8.0370123621e-16, -4.3979497391e-18, -1.6414776355e-20, -3.9673619516e-23,
          -5.5827328721e-26, -3.4657842013e-29,
        ],
      },
      {
        untilC: 1000,
        coefficients: [
          0, 0.05866550871, 4.5032275582e-5, 2.8908407212e-8, -3.3056896652e-10, 6.502440327e-13, -1.9197495504e-16,
          -1.2536600497e-18, 2.1489217569e-21, -1.4388041782e-24, 3.5960899481e-28,
        ],
      },
    ],
  },
};
