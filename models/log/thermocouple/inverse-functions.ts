import type { ThermocoupleType } from '../layout.ts';

/** One range of an inverse: t = Σ d_i E^i in °C, E in mV, holding up to `untilMillivolt`. */
export interface InversePiece {
  readonly untilMillivolt: number;
  readonly coefficients: readonly number[];
}

/**
 * Temperature from emf, to 0.05 °C from −200 °C on: where the search for the exact inverse begins.
 *
 * Source: as the reference functions; "approximate inverse functions" of the same tables.
 */
export const INVERSE_FUNCTIONS: Readonly<Record<ThermocoupleType, readonly InversePiece[]>> = {
  K: [
    {
      untilMillivolt: 0,
      coefficients: [
        0, 25.173462, -1.1662878, -1.0833638, -0.8977354, -0.37342377, -0.086632643, -0.010450598, -0.00051920577,
      ],
    },
    {
      untilMillivolt: 20.644,
      coefficients: [
        0, 25.08355, 0.07860106, -0.2503131, 0.0831527, -0.01228034, 0.0009804036, -4.41303e-5, 1.057734e-6,
        -1.052755e-8,
      ],
    },
    {
      untilMillivolt: 54.886,
      coefficients: [-131.8058, 48.30222, -1.646031, 0.05464731, -0.0009650715, 8.802193e-6, -3.11081e-8],
    },
  ],
  J: [
    {
      untilMillivolt: 0,
      coefficients: [
        0, 19.528268, -1.2286185, -1.0752178, -0.59086933, -0.17256713, -0.028131513, -0.002396337, -8.3823321e-5,
      ],
    },
    {
      untilMillivolt: 42.919,
      coefficients: [0, 19.78425, -0.2001204, 0.01036969, -0.0002549687, 3.585153e-6, -5.344285e-8, 5.09989e-10],
    },
    {
      untilMillivolt: 69.553,
      coefficients: [-3113.58187, 300.543684, -9.9477323, 0.17027663, -0.00143033468, 4.73886084e-6],
    },
  ],
  T: [
    {
      untilMillivolt: 0,
      coefficients: [0, 25.949192, -0.21316967, 0.79018692, 0.42527777, 0.13304473, 0.020241446, 0.0012668171],
    },
    {
      untilMillivolt: 20.872,
      coefficients: [0, 25.928, -0.7602961, 0.04637791, -0.002165394, 6.048144e-5, -7.293422e-7],
    },
  ],
  N: [
    {
      untilMillivolt: 0,
      coefficients: [
        0, 38.436847, 1.1010485, 5.2229312, 7.2060525, 5.8488586, 2.7754916, 0.77075166, 0.11582665, 0.0073138868,
      ],
    },
    {
      untilMillivolt: 20.613,
      coefficients: [0, 38.6896, -1.08267, 0.0470205, -2.12169e-6, -0.000117272, 5.3928e-6, -7.98156e-8],
    },
    { untilMillivolt: 47.513, coefficients: [19.72485, 33.00943, -0.3915159, 0.009855391, -0.0001274371, 7.767022e-7] },
  ],
  E: [
    {
      untilMillivolt: 0,
      coefficients: [
        0, 16.977288, -0.4351497, -0.15859697, -0.092502871, -0.026084314, -0.0041360199, -0.0003403403, -1.156489e-5,
      ],
    },
    {
      untilMillivolt: 76.373,
      coefficients: [
        0, 17.057035, -0.23301759, 0.0065435585, -7.3562749e-5, -1.7896001e-6, 8.4036165e-8, -1.3735879e-9,
        1.0629823e-11, -3.2447087e-14,
      ],
    },
  ],
};
