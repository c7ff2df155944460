import type { Attempt } from '../../src/engine/column/types';
import type { ColumnCase } from '../robust/columns';

/** Columns that the first start does not solve, each with the way that does. Drawn at random (`npm run robust -- --what columns`, `oneEnded`);
 * each needs its way still when its feed is changed in the fifth digit. */
export const KEPT: readonly (readonly [Attempt, ColumnCase])[] = [
  [
    'scan',
    {
      ids: [
        '1,2,4-trimethylbenzene',
        '1-methylnaphthalene',
        '3-methylheptane',
        '2,3,4-trimethylpentane',
        'n-dodecane',
      ],
      z: [
        0.5623621766458653, 0.2897483902374213, 0.014998486682210812, 0.11333099802999008,
        0.01955994840451235,
      ],
      stages: 22,
      top: 'vapour',
      reboiler: true,
      P_Pa: [706764.023414724, 716689.8159439717],
      feedPlace: 5,
      vapourFraction: 0.7358315591700375,
      fixed: [
        { fix: 'refluxRatio', value: 4.960034023443495 },
        { fix: 'purity', product: 'top', chemical: 4, value: 0.00033268133269345203, basis: 'mole' },
      ],
    },
  ],
  [
    'scan',
    {
      ids: [
        'methane',
        'cyclopropane',
        'methylacetylene',
        'n-butane',
        'cyclopentene',
        'vinylacetylene',
        'isobutane',
      ],
      z: [
        0.02035882552634076, 0.07936309326869156, 0.530613051644313, 0.11889277725290755, 0.07709333483191164,
        0.046502722606654945, 0.1271761948691805,
      ],
      stages: 44,
      top: 'vapour',
      reboiler: true,
      P_Pa: [1158027.4779087084, 1174896.144883536],
      feedPlace: 15,
      vapourFraction: 0,
      fixed: [
        { fix: 'refluxRatio', value: 0.48231913785917707 },
        { fix: 'purity', product: 'top', chemical: 3, value: 0.06230956685014187, basis: 'mole' },
      ],
    },
  ],
  [
    'more-sweeps',
    {
      ids: [
        '2,3-dimethylbutane',
        'neopentane',
        '3-methylhexane',
        'methylcyclohexane',
        'cyclopentene',
        'cyclohexene',
        'ethylbenzene',
        'ethylcyclohexane',
        '2-methyl-2-butene',
        '2,2,3-trimethylbutane',
      ],
      z: [
        0.2040233387564185, 0.22876565574802274, 0.053721781000471695, 0.016809324162120304,
        0.01431410912789419, 0.06256293391324648, 0.024065177365574, 0.2191674916775011, 0.10538677925601123,
        0.07118340899273991,
      ],
      stages: 50,
      top: 'vapour',
      reboiler: true,
      P_Pa: [200551.0916014161, 261965.49362041577],
      feedPlace: 40,
      vapourFraction: 0,
      fixed: [
        { fix: 'boilup', value: 3.3354323412287252 },
        { fix: 'recovery', product: 'top', chemical: 0, value: 0.9975373362441762 },
      ],
    },
  ],
  [
    'more-sweeps',
    {
      ids: [
        'methane',
        '1-pentene',
        'n-heptane',
        'm-xylene',
        '3-methylheptane',
        '1-butene',
        '1-hexene',
        'isopentane',
        'acetylene',
        'n-butane',
      ],
      z: [
        0.1887033806391787, 0.12957109439545533, 0.01086484119643905, 0.05522671039290823,
        0.15673533103821558, 0.25789643073767743, 0.0029608264068408494, 0.05970223141980396,
        0.004516506126086218, 0.13382264764739477,
      ],
      stages: 22,
      top: 'liquid',
      reboiler: true,
      P_Pa: [1200823.9076912517, 1205659.7931957452],
      feedPlace: 17,
      vapourFraction: 0,
      fixed: [
        { fix: 'flow', product: 'top', flow: { value: 74.78195237740852, basis: 'mole' } },
        { fix: 'duty', at: 'condenser', value: -13712075.024386749 },
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
    'heats',
    {
      ids: [
        'cumene',
        'p-diethylbenzene',
        'benzene',
        'o-xylene',
        'ethylcyclopentane',
        'n-decane',
        '3-methylheptane',
      ],
      z: [
        0.41933347682087807, 0.18940397516631935, 0.12214946545487045, 0.10397901676642572,
        0.005052081816842686, 0.029142916428157254, 0.13093906754650647,
      ],
      stages: 35,
      top: 'vapour',
      reboiler: true,
      P_Pa: [229398.92161396, 256736.6250795605],
      feedPlace: 9,
      vapourFraction: 0.9289664989337325,
      fixed: [
        { fix: 'refluxRatio', value: 5.673415612830644 },
        { fix: 'recovery', product: 'bottoms', chemical: 3, value: 0.9891787589171659 },
      ],
    },
  ],
  [
    'plain-then-move',
    {
      ids: ['acetylene', 'n-pentane', 'n-butane'],
      z: [0.014619065378521142, 0.5762721218835909, 0.4091088127378879],
      stages: 43,
      top: 'vapour',
      reboiler: true,
      P_Pa: [1378391.7864699955, 1408748.2625966999],
      feedPlace: 13,
      vapourFraction: 0.2809605640359223,
      fixed: [
        { fix: 'refluxRatio', value: 0.4573894915401929 },
        { fix: 'purity', product: 'bottoms', chemical: 2, value: 0.0001644344971957658, basis: 'mole' },
      ],
    },
  ],
  [
    'plain-then-move',
    {
      ids: ['trans-2-butene', 'ethane', 'propadiene', 'benzene'],
      z: [0.049603444982412134, 0.22831049049605284, 0.5285005787654885, 0.19358548575604648],
      stages: 31,
      top: 'liquid',
      reboiler: true,
      P_Pa: [1735115.8568941518, 1775331.000169599],
      feedPlace: 23,
      vapourFraction: 0,
      fixed: [
        { fix: 'flow', product: 'top', flow: { value: 72.91621681489042, basis: 'mole' } },
        { fix: 'recovery', product: 'top', chemical: 2, value: 0.922177127787655 },
      ],
    },
  ],
  [
    'other-ratio',
    {
      ids: ['p-xylene', 'n-pentane', 'indane'],
      z: [0.3998064341079374, 0.32231165381128124, 0.2778819120807813],
      stages: 23,
      top: 'vapour',
      reboiler: false,
      P_Pa: [1393088.9243255286, 1409246.6374081476],
      feedPlace: 23,
      vapourFraction: 1,
      fixed: [{ fix: 'refluxRatio', value: 2.877579922020942 }],
    },
  ],
  [
    'other-ratio',
    {
      ids: ['propane', 'isobutane', 'ethylene', 'acetylene', 'ethane', 'methylacetylene', 'propylene'],
      z: [
        0.09288137842792396, 0.039373755943514784, 0.02921638740553479, 0.32973160286383646,
        0.2648212803828082, 0.033665062136537305, 0.2103105328398445,
      ],
      stages: 30,
      top: 'liquid',
      reboiler: false,
      P_Pa: [217637.6360805073, 222405.9797880539],
      feedPlace: 30,
      vapourFraction: 1,
      fixed: [{ fix: 'refluxRatio', value: 2.9859354916946885 }],
    },
  ],
];
