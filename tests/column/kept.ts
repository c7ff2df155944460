import type { Attempt } from '../../src/engine/column/types';
import type { ColumnCase } from '../robust/columns';

/** Columns that the first start does not solve, each with the way that does. Drawn at random (`npm run robust -- --what columns`). */
export const KEPT: readonly (readonly [Attempt, ColumnCase])[] = [
  [
    'scan',
    {
      ids: [
        'p-diethylbenzene',
        '1-methylnaphthalene',
        'n-undecane',
        '2,3,4-trimethylpentane',
        'p-cymene',
        'n-pentadecane',
        'n-heptane',
        'n-tetradecane',
        '1,2,3-trimethylbenzene',
      ],
      z: [
        0.056914839619147235, 0.19022892021655702, 0.052458314001405264, 0.16328310909772095,
        0.25190382396256644, 0.01177110147803117, 0.11471170865693557, 0.10675907001904614,
        0.051969112948590274,
      ],
      stages: 36,
      top: 'liquid',
      reboiler: true,
      P_Pa: [176446.93442250486, 186497.88470848347],
      feedPlace: 26,
      vapourFraction: 0.5713706731330603,
      fixed: [
        { fix: 'refluxRatio', value: 4.97241747328448 },
        { fix: 'purity', product: 'bottoms', chemical: 1, value: 0.21569936109492838, basis: 'mole' },
      ],
    },
  ],
  [
    'more-sweeps',
    {
      ids: ['cyclopropane', 'trans-decalin', 'n-heptane', 'm-xylene'],
      z: [0.31555146023698216, 0.3479445589268068, 0.16581331339833041, 0.1706906674378807],
      stages: 57,
      top: 'liquid',
      reboiler: true,
      P_Pa: [1124758.0600257346, 1135499.90206967],
      feedPlace: 17,
      vapourFraction: 0.8173312800936401,
      fixed: [
        { fix: 'flow', product: 'top', flow: { value: 59.66934516653396, basis: 'mole' } },
        { fix: 'duty', at: 'condenser', value: -9643214.21925582 },
      ],
    },
  ],
  [
    'heats',
    {
      ids: [
        'methane',
        '1-butene',
        'n-pentane',
        '1,3-butadiene',
        'cis-2-butene',
        'trans-2-butene',
        'neopentane',
        'n-butane',
        'methylacetylene',
        'vinylacetylene',
        'propadiene',
      ],
      z: [
        0.02479401679877711, 0.03027458946163397, 0.018699088420108173, 0.06667631467728079,
        0.15538303595432904, 0.019979323901570437, 0.06974403076265177, 0.06393761258292228,
        0.23429057935656247, 0.24563605107024258, 0.07058535701392124,
      ],
      stages: 40,
      top: 'vapour',
      reboiler: true,
      P_Pa: [105144.39317869369, 159625.6290097383],
      feedPlace: 25,
      vapourFraction: 0.835331519600004,
      fixed: [
        { fix: 'recovery', product: 'top', chemical: 10, value: 0.6868925051748367 },
        { fix: 'recovery', product: 'bottoms', chemical: 7, value: 0.9041013715595312 },
      ],
    },
  ],
  [
    'heats',
    {
      ids: ['1-decene', 'cis-decalin', 'p-xylene', 'm-diethylbenzene', 'cyclohexene'],
      z: [
        0.10199668273647314, 0.02264164052186591, 0.3831720408555133, 0.039075096361930246,
        0.4531145395242174,
      ],
      stages: 55,
      top: 'vapour',
      reboiler: true,
      P_Pa: [345338.740539236, 424137.0672401618],
      feedPlace: 45,
      vapourFraction: 0,
      fixed: [
        { fix: 'flow', product: 'top', flow: { value: 89.15786584094167, basis: 'mole' } },
        { fix: 'recovery', product: 'top', chemical: 0, value: 0.5305828800551033 },
      ],
    },
  ],
  [
    'plain-then-move',
    {
      ids: [
        'm-xylene',
        '1-octene',
        '2-methylheptane',
        'trans-decalin',
        'ethylbenzene',
        'n-decane',
        'p-diethylbenzene',
        'methylcyclohexane',
      ],
      z: [
        0.4507371183655593, 0.2907608982459971, 0.006196740991193006, 0.04641836698859514,
        0.015438312523037297, 0.05292263993726468, 0.08732971917316897, 0.05019620377518436,
      ],
      stages: 21,
      top: 'vapour',
      reboiler: true,
      P_Pa: [842786.0224285398, 871036.3780579066],
      feedPlace: 9,
      vapourFraction: 0,
      fixed: [
        { fix: 'purity', product: 'top', chemical: 6, value: 0.00003954825248188792, basis: 'mole' },
        { fix: 'purity', product: 'bottoms', chemical: 4, value: 0.015763455141071348, basis: 'mole' },
      ],
    },
  ],
  [
    'plain-then-move',
    {
      ids: ['ethane', 'isobutane', 'propylene', 'n-butane', '1,3-butadiene'],
      z: [
        0.36710146947128364, 0.26058363149154123, 0.02513541918515474, 0.2780559099389185,
        0.06912356991310176,
      ],
      stages: 57,
      top: 'vapour',
      reboiler: true,
      P_Pa: [1289482.1122051291, 1308714.0806494355],
      feedPlace: 48,
      vapourFraction: 0.0010838666930794716,
      fixed: [
        { fix: 'recovery', product: 'top', chemical: 0, value: 0.7294304641847725 },
        { fix: 'recovery', product: 'bottoms', chemical: 1, value: 0.9956828473760794 },
      ],
    },
  ],
  [
    'scan',
    {
      ids: [
        'isobutane',
        'cyclopropane',
        'cis-2-butene',
        'methylacetylene',
        'n-butane',
        '1-butene',
        'propylene',
        'vinylacetylene',
        'trans-2-butene',
        '1,3-butadiene',
      ],
      z: [
        0.04539720462025108, 0.04458730394030747, 0.05550246517461371, 0.07042352636052576,
        0.02135520198944273, 0.20366674314456512, 0.23414587477628301, 0.02423298491925232,
        0.2088383922999156, 0.0918503027748433,
      ],
      stages: 52,
      top: 'vapour',
      reboiler: true,
      P_Pa: [1571365.7597051426, 1624931.3814034178],
      feedPlace: 17,
      vapourFraction: 0.7568452381528914,
      fixed: [
        { fix: 'flow', product: 'top', flow: { value: 33.12120426073667, basis: 'mole' } },
        { fix: 'recovery', product: 'top', chemical: 3, value: 0.6285587730575183 },
      ],
    },
  ],
];
