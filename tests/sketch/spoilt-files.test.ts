import { expect, test } from 'vitest';
import { files } from '../robust/files';
import { lossesOf } from '../robust/loss';
import { exampleText, type Loose, loose } from './help';

// More, and other seeds: npm run robust -- --what files --seed N --count 2000
test('200 spoilt files of seed 5 are refused with place and reason, or opened without losing anything', async () => {
  const { cases, wrong, more } = await files(5, 200);
  expect(cases).toEqual([]);
  expect(wrong).toBe(0);
  // Both ways must have been walked often, else this shows little.
  const { opened, refused } = more as { opened: number; refused: number };
  expect(opened).toBeGreaterThan(50);
  expect(refused).toBeGreaterThan(50);
}, 60_000);

test('the referee sees what is left out, altered or put in another order', () => {
  const text = exampleText('let-down');
  const after = (change: (raw: Loose & { units: Loose[]; streams: Loose[] }) => void): string => {
    const raw = loose();
    change(raw);
    return JSON.stringify(raw);
  };
  const lost = (saved: string): string[] => lossesOf(text, saved, []);
  expect(lost(text)).toEqual([]);
  expect(lost(after((raw) => delete raw.title))).toEqual(['title']);
  expect(lost(after((raw) => Object.assign(raw.units[1]!, { tag: 'PV-2' })))).toEqual(['units.1.tag']);
  expect(lost(after((raw) => void (raw.chemicals as string[]).reverse()))).not.toEqual([]);
  expect(lost(after((raw) => void raw.streams.pop()))).toEqual(['streams']);
});
