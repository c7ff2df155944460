/**
 * Figures of second sources for pure chemicals, to compare the bank with. All were entered from memory; a figure
 * that was not sure was left out. None of them made the bank's rows: those come from reference equations of state
 * (saturation), from TRC and from NASA/TP-2002-211556 (ideal gas).
 */

/**
 * Vapour pressure: Tc [K], Pc [bar], a, b, c, d of ln(P/Pc) = (a t + b t^1.5 + c t^3 + d t^6)/Tr, t = 1 - Tr.
 * Source: McGarry, Ind. Eng. Chem. Process Des. Dev. 22 (1983) 313, as printed in Reid, Prausnitz & Poling,
 * The Properties of Gases and Liquids, 4th ed. (1987), appendix A.
 */
export const VAPOUR_PRESSURE: Readonly<
  Record<string, readonly [number, number, number, number, number, number]>
> = {
  nitrogen: [126.2, 33.9, -6.09676, 1.1367, -1.04072, -1.93306],
  oxygen: [154.6, 50.4, -6.28275, 1.73619, -1.81349, -0.0253645],
  argon: [150.8, 48.7, -5.90501, 1.12627, -0.76787, -1.62721],
  'carbon-monoxide': [132.9, 35.0, -6.20798, 1.27885, -1.34533, -2.56842],
  'carbon-dioxide': [304.1, 73.8, -6.95626, 1.19695, -3.12614, 2.99448],
  water: [647.3, 221.2, -7.76451, 1.45838, -2.7758, -1.23303],
  methane: [190.4, 46.0, -6.00435, 1.1885, -0.83408, -1.22833],
  ethane: [305.4, 48.8, -6.34307, 1.0163, -1.19116, -2.03539],
  propane: [369.8, 42.5, -6.72219, 1.33236, -2.13868, -1.38551],
  'n-butane': [425.2, 38.0, -6.88709, 1.15157, -1.99873, -3.13003],
  isobutane: [408.2, 36.5, -6.95579, 1.5009, -2.52717, -1.49776],
  'n-pentane': [469.7, 33.7, -7.28936, 1.53679, -3.08367, -1.02456],
  'n-hexane': [507.5, 30.1, -7.46765, 1.44211, -3.28222, -2.50941],
  'n-heptane': [540.3, 27.4, -7.67468, 1.37068, -3.5362, -3.20243],
  'n-octane': [568.8, 24.9, -7.91211, 1.38007, -3.80435, -4.50132],
  'n-decane': [617.7, 21.2, -8.56523, 1.97756, -5.81971, -0.29982],
  ethylene: [282.4, 50.4, -6.32055, 1.16819, -1.55935, -1.83552],
  propylene: [364.9, 46.0, -6.64231, 1.21857, -1.81005, -2.48212],
  cyclohexane: [553.5, 40.7, -6.96009, 1.31328, -2.75683, -2.45491],
  benzene: [562.2, 48.9, -6.98273, 1.33213, -2.62863, -3.33399],
  toluene: [591.8, 41.0, -7.28607, 1.38091, -2.83433, -2.79168],
  methanol: [512.6, 80.9, -8.54796, 0.76982, -3.1085, 1.54481],
  ethanol: [513.9, 61.4, -8.51838, 0.34163, -5.73683, 8.32581],
  acetone: [508.1, 47.0, -7.45514, 1.202, -2.43926, -3.3559],
};

/**
 * Saturated-liquid density: c1 [kmol/m3], c2, c3 [K], c4 of rho = c1 / c2^(1 + (1 - T/c3)^c4).
 * Source: Perry's Chemical Engineers' Handbook, 7th and 8th ed., Table 2-30/2-32.
 */
export const LIQUID_DENSITY: Readonly<Record<string, readonly [number, number, number, number]>> = {
  nitrogen: [3.2091, 0.2861, 126.2, 0.2966],
  oxygen: [3.9143, 0.28772, 154.58, 0.2924],
  argon: [3.8469, 0.2881, 150.86, 0.29783],
  'carbon-monoxide': [2.897, 0.27532, 132.92, 0.2813],
  'carbon-dioxide': [2.768, 0.26212, 304.21, 0.2908],
  methane: [2.9214, 0.28976, 190.56, 0.28881],
  ethane: [1.9122, 0.27937, 305.32, 0.29187],
  propane: [1.3757, 0.27453, 369.83, 0.29359],
  'n-butane': [1.0677, 0.27188, 425.12, 0.28688],
  isobutane: [1.0631, 0.27506, 407.8, 0.2758],
  'n-pentane': [0.84947, 0.26726, 469.7, 0.27789],
  isopentane: [0.91991, 0.27815, 460.4, 0.28667],
  'n-hexane': [0.70824, 0.26411, 507.6, 0.27537],
  'n-heptane': [0.61259, 0.26211, 540.2, 0.28141],
  'n-octane': [0.53731, 0.26115, 568.7, 0.28034],
  'n-nonane': [0.48387, 0.26147, 594.6, 0.28281],
  'n-decane': [0.42831, 0.25745, 617.7, 0.28912],
  'n-undecane': [0.39, 0.25678, 639, 0.2913],
  'n-dodecane': [0.35541, 0.25511, 658, 0.29368],
  isooctane: [0.59059, 0.27424, 543.8, 0.2847],
  ethylene: [2.0961, 0.27657, 282.34, 0.29147],
  propylene: [1.4094, 0.26465, 365.57, 0.295],
  isobutene: [1.1454, 0.2725, 417.9, 0.28186],
  cyclohexane: [0.8908, 0.27396, 553.58, 0.2851],
  methylcyclohexane: [0.73109, 0.26971, 572.19, 0.29185],
  benzene: [1.0162, 0.2655, 562.16, 0.28212],
  toluene: [0.8792, 0.27136, 591.8, 0.29241],
  'o-xylene': [0.69883, 0.26113, 630.3, 0.27429],
  'm-xylene': [0.68902, 0.26086, 617, 0.27479],
  'p-xylene': [0.67752, 0.25887, 616.2, 0.27596],
  methanol: [2.288, 0.2685, 512.64, 0.2453],
  ethanol: [1.648, 0.27627, 513.92, 0.2331],
  acetone: [1.2332, 0.25886, 508.2, 0.2913],
  ammonia: [3.5383, 0.25443, 405.65, 0.2888],
};

/**
 * Heat of vaporisation: c1 [1e7 J/kmol], c2, c3, c4, Tc [K] of c1 (1 - Tr)^(c2 + c3 Tr + c4 Tr^2).
 * Source: Perry's Chemical Engineers' Handbook, 7th and 8th ed., Table 2-193/2-150.
 */
export const HEAT_OF_VAPORISATION: Readonly<
  Record<string, readonly [number, number, number, number, number]>
> = {
  nitrogen: [0.74905, 0.40406, -0.317, 0.27343, 126.2],
  oxygen: [0.9008, 0.4542, -0.4096, 0.3183, 154.58],
  argon: [0.84215, 0.28334, 0.033281, 0.0305, 150.86],
  'carbon-monoxide': [0.8585, 0.4921, -0.326, 0.2231, 132.92],
  'carbon-dioxide': [2.173, 0.382, -0.4339, 0.42213, 304.21],
  ammonia: [3.1523, 0.3914, -0.2289, 0.2309, 405.65],
  water: [5.2053, 0.3199, -0.212, 0.25795, 647.096],
  methane: [1.0194, 0.26087, -0.14694, 0.22154, 190.56],
  ethane: [2.1091, 0.60646, -0.55492, 0.32799, 305.32],
  propane: [2.9209, 0.78237, -0.77319, 0.39246, 369.83],
  'n-butane': [3.6238, 0.8337, -0.82274, 0.39613, 425.12],
  isobutane: [3.1667, 0.3855, 0, 0, 408.14],
  'n-pentane': [3.9109, 0.38681, 0, 0, 469.7],
  'n-hexane': [4.4544, 0.39002, 0, 0, 507.6],
  'n-heptane': [5.0014, 0.38795, 0, 0, 540.2],
  'n-octane': [5.518, 0.38467, 0, 0, 568.7],
  'n-decane': [6.6126, 0.39797, 0, 0, 617.7],
  ethylene: [1.8844, 0.36485, 0, 0, 282.34],
  propylene: [2.5216, 0.33721, -0.18399, 0.22377, 364.85],
  cyclohexane: [4.4902, 0.39881, 0, 0, 553.8],
  benzene: [4.75, 0.45238, 0.0534, -0.1181, 562.05],
  toluene: [5.0144, 0.3859, 0, 0, 591.75],
  methanol: [5.239, 0.3682, 0, 0, 512.5],
};

/**
 * Heat of vaporisation at the normal boiling point [kJ/mol].
 * Source: Majer & Svoboda, Enthalpies of Vaporization of Organic Compounds (IUPAC, 1985), as printed in the CRC Handbook.
 */
export const HEAT_AT_BOILING: Readonly<Record<string, number>> = {
  'n-pentane': 25.79,
  isopentane: 24.69,
  'n-hexane': 28.85,
  'n-heptane': 31.77,
  'n-octane': 34.41,
  isooctane: 30.79,
  cyclopentane: 27.3,
  cyclohexane: 29.97,
  benzene: 30.72,
  toluene: 33.18,
  ethylbenzene: 35.57,
  'o-xylene': 36.24,
  'm-xylene': 35.66,
  'p-xylene': 35.67,
  methanol: 35.21,
  ethanol: 38.56,
  acetone: 29.1,
  'diethyl-ether': 26.52,
};

/**
 * Saturated ammonia: t [degC], P [kPa], liquid density [kg/m3], heat of vaporisation [kJ/kg].
 * Source: Haar & Gallagher, J. Phys. Chem. Ref. Data 7 (1978) 635, as tabulated in the ASHRAE Handbook.
 */
export const AMMONIA: readonly (readonly [number, number, number, number])[] = [
  [-30, 119.5, 677.8, 1360],
  [-20, 190.2, 665.1, 1329.2],
  [0, 429.6, 638.6, 1262.2],
  [20, 857.5, 610.3, 1186.1],
  [40, 1555.4, 579.4, 1098.9],
  [60, 2614.4, 545.2, 997.3],
  [80, 4142, 505.7, 873.1],
];

/** Heat of vaporisation of water: t [degC], [kJ/kg]. Source: steam tables of IAPWS-IF97 (Wagner & Kretzschmar). */
export const WATER_HEAT: readonly (readonly [number, number])[] = [
  [100, 2256.5],
  [150, 2113.7],
  [200, 1939.7],
  [250, 1715.2],
  [300, 1404.8],
];

/**
 * H(T) - H(298.15 K) of the ideal gas at 400, 500, 600, 700, 800 K [kJ/mol].
 * Source: NIST-JANAF Thermochemical Tables (Chase 1998).
 */
export const ENTHALPY: Readonly<Record<string, readonly number[]>> = {
  hydrogen: [2.959, 5.882, 8.811, 11.749, 14.702],
  nitrogen: [2.971, 5.911, 8.894, 11.937, 15.046],
  oxygen: [3.025, 6.084, 9.244, 12.499, 15.835],
  water: [3.452, 6.925, 10.501, 14.192, 18.002],
  'carbon-monoxide': [2.976, 5.931, 8.942, 12.023, 15.177],
  'carbon-dioxide': [4.003, 8.305, 12.907, 17.754, 22.806],
  ammonia: [3.781, 7.819, 12.188, 16.872, 21.853],
  'sulfur-dioxide': [4.25, 8.758, 13.544, 18.548, 23.721],
  'nitric-oxide': [3.04, 6.059, 9.144, 12.308, 15.548],
};

/**
 * Cp/R = a0 + a1 1e-3 T + a2 1e-5 T^2 + a3 1e-8 T^3 + a4 1e-11 T^4.
 * Source: Poling, Prausnitz & O'Connell, The Properties of Gases and Liquids, 5th ed. (2001), appendix A, section C.
 */
export const CP_POLING: Readonly<Record<string, readonly [number, number, number, number, number]>> = {
  methane: [4.568, -8.975, 3.631, -3.407, 1.091],
  ethane: [4.178, -4.427, 5.66, -6.651, 2.487],
  propane: [3.847, 5.131, 6.011, -7.893, 3.079],
  'n-butane': [5.547, 5.536, 8.057, -10.571, 4.134],
  isobutane: [3.351, 17.883, 5.477, -8.099, 3.243],
  'n-pentane': [7.554, -0.368, 11.846, -14.939, 5.753],
  'n-hexane': [8.831, -0.166, 14.302, -18.314, 7.124],
  'n-heptane': [9.634, 4.156, 15.494, -20.066, 7.77],
  'n-octane': [10.824, 4.983, 17.751, -23.137, 8.98],
  propylene: [3.834, 3.893, 4.688, -6.013, 2.283],
  methanol: [4.714, -6.986, 4.211, -4.443, 1.535],
  ethanol: [4.396, 0.628, 5.546, -7.024, 2.685],
  acetone: [5.126, 1.511, 5.731, -7.177, 2.728],
};

/**
 * Cp = A + B (C/T / sinh(C/T))^2 + D (E/T / cosh(E/T))^2, J/(kmol K).
 * Source: Aly & Lee's form with the constants of Perry's Chemical Engineers' Handbook, 7th ed., Table 2-198.
 */
export const CP_ALY_LEE: Readonly<Record<string, readonly [number, number, number, number, number]>> = {
  benzene: [44767, 230850, 1479.2, 168360, 677.66],
};

/**
 * Constant Z_RA of the modified Rackett equation.
 * Source: Spencer & Danner, J. Chem. Eng. Data 17 (1972) 236.
 */
export const Z_RA: Readonly<Record<string, number>> = {
  methane: 0.2892,
  ethane: 0.2808,
  propane: 0.2766,
  isobutane: 0.2754,
  'n-butane': 0.273,
  isopentane: 0.2717,
  'n-pentane': 0.2684,
  'n-hexane': 0.2635,
  'n-heptane': 0.2604,
  'n-octane': 0.2571,
  'n-decane': 0.2507,
  ethylene: 0.2815,
  propylene: 0.2779,
  '1-butene': 0.2736,
  cyclohexane: 0.2729,
  methylcyclopentane: 0.2712,
  methylcyclohexane: 0.2702,
  benzene: 0.2698,
  toluene: 0.2646,
  ethylbenzene: 0.2619,
  'o-xylene': 0.262,
  'm-xylene': 0.2594,
  'p-xylene': 0.259,
};
