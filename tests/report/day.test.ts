import { afterAll, expect, test } from 'vitest';
import { dayOf } from '../../src/report/day';

const before = process.env.TZ;
afterAll(() => {
  process.env.TZ = before;
});

// Derived: half past eleven at night in New York is the next day at Greenwich; one in the morning in Sydney the day before.
test.each([
  ['America/New_York', '2026-01-16T04:30:00Z', '2026-01-15'],
  ['Australia/Sydney', '2026-01-14T14:00:00Z', '2026-01-15'],
  ['UTC', '2026-01-15T23:59:59Z', '2026-01-15'],
])('a document made in %s carries the day of the calendar there', (zone, moment, day) => {
  process.env.TZ = zone;
  expect(dayOf(new Date(moment))).toBe(day);
});
