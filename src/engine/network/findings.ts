/** Codes the network may emit. */
export const NETWORK_FINDINGS = [
  'network/nothing-enters',
  'network/no-way-out',
  'network/loop-unsettled',
  'network/pressure-falls',
  'network/unknown-kind',
  'network/inlet-missing',
  'network/source-missing',
  'network/outlet-missing',
  'network/waits-for',
  'network/does-not-close',
  'network/several-answers',
  'model/pair-none',
  'model/pair-predicted',
  'model/pair-predicted-far',
] as const;
export type NetworkFindingCode = (typeof NETWORK_FINDINGS)[number];
