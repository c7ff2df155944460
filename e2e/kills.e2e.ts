import { rmSync } from 'node:fs';
import { expect, test } from 'playwright/test';
import { killed, profile } from './kills';

// More: npm run robust -- --what kills --seed N --count 50
test.describe('a browser that is ended in mid-edit, at a random moment', () => {
  test('five times: the sketch is there again, with all but the last edit at most', async ({ baseURL }) => {
    test.setTimeout(180_000);
    const folder = profile();
    try {
      for (let k = 0; k < 5; k += 1) {
        const { fault } = await killed(folder, baseURL ?? '', {
          first: k === 0,
          seed: 100 + k,
          by: k % 2 ? 'reload' : 'kill',
        });
        expect(fault).toBeUndefined();
      }
    } finally {
      rmSync(folder, { recursive: true, force: true });
    }
  });
});
