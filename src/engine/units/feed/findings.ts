/** Codes a feed may emit. */
export const FEED_FINDINGS = [
  'feed/flow-missing',
  'feed/flow-not-positive',
  'feed/no-components',
  'feed/mass-flow-of-nothing',
  'feed/share-without-stream',
  'feed/air-needs-temperature-and-pressure',
  'feed/air-component-missing',
  'feed/humidity-above-saturation',
  'feed/no-state',
] as const;
