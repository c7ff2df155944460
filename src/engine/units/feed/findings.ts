/** Codes a feed may emit. */
export const FEED_FINDINGS = [
  'feed/flow-missing',
  'feed/flow-not-positive',
  'feed/no-components',
  'feed/share-without-stream',
  'feed/air-needs-temperature-and-pressure',
  'feed/air-component-missing',
  'feed/water-data-missing',
  'feed/humidity-above-saturation',
] as const;
