/** Two sketches with columns, as files: scenarios and figures are invented. */
type Settings = Readonly<Record<string, unknown>>;
type Unit = readonly [id: string, tag: string, kind: string, settings: Settings];
type Stream = readonly [number: string, from: string, to?: string];

const end = (text: string): [string, string] => text.split('.') as [string, string];

export function sketchOf(
  chemicals: readonly string[],
  units: readonly Unit[],
  streams: readonly Stream[],
): unknown {
  return {
    format: 'splitwright.sketch',
    version: 1,
    chemicals,
    model: { kind: 'peng-robinson', alpha: '1976', bankPairs: true, pairs: [] },
    units: units.map(([id, tag, kind, settings], k) => ({ id, tag, kind, settings, at: [200 * k, 200] })),
    streams: streams.map(([number, from, to]) => ({
      id: `s${number}`,
      number,
      from: end(from),
      ...(to ? { to: end(to) } : {}),
    })),
  };
}

const parts = (ids: readonly string[], percent: readonly number[]) =>
  Object.fromEntries(ids.map((id, i) => [id, `${percent[i]} %`]));

const AROMATIC = [
  'methane',
  'ethane',
  'propane',
  'n-butane',
  'n-pentane',
  'n-hexane',
  'benzene',
  'toluene',
  'ethylbenzene',
  'm-xylene',
];

const column = (
  stages: number,
  distillate: string,
  feed: number,
  [condenser, top, bottom]: readonly [string, string, string],
  fixedBy: readonly Settings[],
): Settings => ({
  stages,
  top: { distillate },
  bottom: { reboiler: true },
  feeds: { feed1: { stage: feed } },
  pressure: { condenser: `${condenser} bar`, top: `${top} bar`, bottom: `${bottom} bar` },
  fixedBy,
});

/** Light ends off, then a benzene cut; the off-gas leaves the sketch. */
export const aromatics = (share = '14 %'): unknown =>
  sketchOf(
    AROMATIC,
    [
      [
        'f',
        'FEED-1',
        'feed',
        {
          state: { T: '121 degC', P: '7.8 bar' },
          flow: '185 kmol/h',
          composition: { basis: 'mole', parts: parts(AROMATIC, [8, 5, 4, 2.5, 3.5, 4, 31, 25, 4, 13]) },
        },
      ],
      ['e1', 'E-101', 'cooler', { T: '38 degC', p: { drop: '0.3 bar' } }],
      ['v1', 'V-101', 'drum', {}],
      ['pv2', 'PV-102', 'valve', { p: { P: '3.5 bar' } }],
      ['e2', 'E-102', 'heater', { T: '82 degC', p: { drop: '0.3 bar' } }],
      [
        'c1',
        'C-101',
        'column',
        column(
          26,
          'vapour',
          11,
          ['2.60', '2.75', '3.05'],
          [
            { fix: 'refluxRatio', value: 2.4 },
            {
              fix: 'flow',
              product: 'vapourDistillate',
              value: { share, of: { stream: 's1' }, basis: 'mole' },
            },
          ],
        ),
      ],
      ['pv3', 'PV-103', 'valve', { p: { P: '1.75 bar' } }],
      [
        'c2',
        'C-102',
        'column',
        column(
          31,
          'liquid',
          15,
          ['1.20', '1.30', '1.62'],
          [
            { fix: 'refluxRatio', value: 2.3 },
            { fix: 'flow', product: 'liquidDistillate', value: { share: '45 %', of: 'feed', basis: 'mole' } },
          ],
        ),
      ],
    ],
    [
      ['1', 'f.out', 'e1.in'],
      ['2', 'e1.out', 'v1.in1'],
      ['3', 'v1.vapour'],
      ['4', 'v1.liquid', 'pv2.in'],
      ['5', 'pv2.out', 'e2.in'],
      ['6', 'e2.out', 'c1.feed1'],
      ['7', 'c1.vapourDistillate'],
      ['8', 'c1.bottoms', 'pv3.in'],
      ['9', 'pv3.out', 'c2.feed1'],
      ['10', 'c2.liquidDistillate'],
      ['11', 'c2.bottoms'],
    ],
  );

const LIGHT = [
  'methane',
  'ethane',
  'propane',
  'isobutane',
  'n-butane',
  'isopentane',
  'n-pentane',
  'n-hexane',
  'n-heptane',
];

/** Ethane off, propane, butanes: purities, recoveries and ratios. */
export const lightTrain = (): unknown =>
  sketchOf(
    LIGHT,
    [
      [
        'f',
        'FEED-1',
        'feed',
        {
          state: { T: '49 degC', P: '29.5 bar' },
          flow: '640 kmol/h',
          composition: { basis: 'mole', parts: parts(LIGHT, [0.8, 21.2, 34, 9, 17, 6, 5.5, 4.5, 2]) },
        },
      ],
      ['pv1', 'PV-201', 'valve', { p: { P: '27.4 bar' } }],
      [
        'c1',
        'C-201',
        'column',
        column(
          28,
          'vapour',
          10,
          ['26.6', '26.8', '27.2'],
          [
            { fix: 'refluxRatio', value: '2.5' },
            { fix: 'purity', product: 'bottoms', chemical: 'ethane', value: '2.0 %', basis: 'mole' },
          ],
        ),
      ],
      ['pv2', 'PV-202', 'valve', { p: { P: '17.6 bar' } }],
      [
        'c2',
        'C-202',
        'column',
        column(
          36,
          'liquid',
          17,
          ['16.6', '16.8', '17.3'],
          [
            {
              fix: 'purity',
              product: 'liquidDistillate',
              chemical: 'isobutane',
              value: '1.2 %',
              basis: 'mole',
            },
            { fix: 'purity', product: 'bottoms', chemical: 'propane', value: '0.9 %', basis: 'mole' },
          ],
        ),
      ],
      ['pv3', 'PV-203', 'valve', { p: { P: '6.4 bar' } }],
      [
        'c3',
        'C-203',
        'column',
        column(
          30,
          'liquid',
          14,
          ['5.60', '5.75', '6.10'],
          [
            { fix: 'refluxRatio', value: 1.55 },
            { fix: 'recovery', product: 'liquidDistillate', chemical: 'n-butane', value: '98.8 %' },
          ],
        ),
      ],
    ],
    [
      ['1', 'f.out', 'pv1.in'],
      ['2', 'pv1.out', 'c1.feed1'],
      ['3', 'c1.vapourDistillate'],
      ['4', 'c1.bottoms', 'pv2.in'],
      ['5', 'pv2.out', 'c2.feed1'],
      ['6', 'c2.liquidDistillate'],
      ['7', 'c2.bottoms', 'pv3.in'],
      ['8', 'pv3.out', 'c3.feed1'],
      ['9', 'c3.liquidDistillate'],
      ['10', 'c3.bottoms'],
    ],
  );
