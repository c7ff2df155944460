/** A feed, a column of twelve stages and its products, as a file would have them; scenario and figures are made up. */
export const columnSettings = {
  stages: 12,
  top: { distillate: 'vapour' },
  bottom: { reboiler: true },
  feeds: { feed1: { stage: 6 } },
  pressure: { condenser: '1.10 bar', top: '1.15 bar', bottom: '1.30 bar' },
  fixedBy: [
    { fix: 'refluxRatio', value: 2.4 },
    {
      fix: 'flow',
      product: 'vapourDistillate',
      value: { share: '38 %', of: { stream: 's1' }, basis: 'mole' },
    },
  ],
} as const;

export const columnSketch = (settings: object = columnSettings) => ({
  format: 'splitwright.sketch',
  version: 1,
  id: 'column-test',
  title: { title: 'Aromatics' },
  chemicals: ['benzene', 'toluene', 'm-xylene'],
  model: { kind: 'peng-robinson' },
  units: [
    {
      id: 'u1',
      tag: 'FEED-1',
      kind: 'feed',
      at: [80, 320],
      settings: {
        state: { T: '95 degC', P: '1.5 bar' },
        flow: '60 kmol/h',
        composition: { basis: 'mole', parts: { benzene: '40 %', toluene: '35 %', 'm-xylene': '25 %' } },
      },
    },
    { id: 'c', tag: 'C-101', name: 'Benzene column', kind: 'column', at: [320, 320], settings },
  ],
  streams: [
    { id: 's1', number: '1', from: ['u1', 'out'], to: ['c', 'feed1'] },
    { id: 's2', number: '2', from: ['c', 'vapourDistillate'] },
    { id: 's3', number: '3', from: ['c', 'bottoms'] },
  ],
});
