import { cpSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { createServer, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { extname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { expect, type Page } from 'playwright/test';
import { field, labelText, unit } from './hand';
import { openExample, solved, test } from './page';

test.use({ serviceWorkers: 'allow' });

/** The built page; E2E_DIST names another folder than the usual one. */
const DIST = process.env.E2E_DIST ?? fileURLToPath(new URL('../dist', import.meta.url));

/** Every file of the page is kept. */
const kept = (page: Page): Promise<unknown> =>
  page.waitForFunction(() => performance.getEntriesByName('offline-ready').length > 0, null, {
    timeout: 60_000,
  });

async function setPressure(page: Page, text: string, shown: string): Promise<void> {
  await unit(page, 'PV-1').click();
  await field(page, 'p.P').fill(text);
  await field(page, 'p.P').press('Enter');
  await expect.poll(() => labelText(page, '2')).toContain(shown);
}

test('after the first visit the page starts, solves, opens examples and arranges without a network', async ({
  quiet: page,
  context,
}) => {
  await openExample(page);
  await kept(page);
  await context.setOffline(true);
  await page.reload();
  await solved(page);
  await setPressure(page, '7 bar', '7.000');
  await page.locator('body').click({ position: { x: 700, y: 850 } });
  await page.keyboard.press('Control+Alt+n');
  await openExample(page, '[data-example="aromatic-condensate.sketch.json"]');
  // Its own worker, not asked for before.
  await page.keyboard.press('Shift+A');
  await expect(page.getByRole('button', { name: /^Undo arrange all/ })).toBeVisible({ timeout: 30_000 });
});

test('nothing is asked for anywhere but at the page’s own address, and the policy is never broken', async ({
  quiet: page,
  context,
  baseURL,
}) => {
  const foreign: string[] = [];
  const own = new URL(baseURL ?? '').origin;
  context.on('request', (request) => {
    const address = new URL(request.url());
    if (address.origin !== own && !['data:', 'blob:'].includes(address.protocol)) foreign.push(request.url());
  });
  await page.addInitScript(() => {
    const broken: string[] = [];
    Object.assign(window, { broken });
    document.addEventListener('securitypolicyviolation', (event) =>
      broken.push(`${event.violatedDirective}: ${event.blockedURI} ${event.sample}`),
    );
  });
  await page.reload();
  await openExample(page, '[data-example="aromatic-condensate.sketch.json"]');
  await kept(page);
  // The main journey: change, arrange, look at the tables, make the documents.
  await page.keyboard.press('Shift+A');
  await expect(page.getByRole('button', { name: /^Undo arrange all/ })).toBeVisible({ timeout: 30_000 });
  await page.keyboard.press('Control+Shift+S');
  await expect(page.locator('.summary-table').first()).toBeVisible();
  await page.keyboard.press('Escape');
  const download = page.waitForEvent('download', { timeout: 60_000 });
  await page.keyboard.press('Control+p');
  expect((await download).suggestedFilename()).toMatch(/\.pdf$/);
  expect(foreign).toEqual([]);
  expect(await page.evaluate(() => (window as unknown as { broken: string[] }).broken)).toEqual([]);
});

test('a script that is slipped into the page does not run', async ({ page }) => {
  await page.goto('./');
  await expect(page.locator('.app')).toBeVisible();
  const ran = await page.evaluate(() => {
    const element = document.createElement('script');
    element.textContent = 'document.documentElement.dataset.ran = "ran"';
    document.body.append(element);
    document.body.insertAdjacentHTML(
      'beforeend',
      '<b onclick="document.documentElement.dataset.ran = 1">x</b>',
    );
    document.body.querySelector<HTMLElement>('body > b')?.click();
    return document.documentElement.dataset.ran ?? 'nothing';
  });
  expect(ran).toBe('nothing');
});

const TYPES: Readonly<Record<string, string>> = {
  '.html': 'text/html',
  '.js': 'text/javascript',
  '.css': 'text/css',
  '.json': 'application/json',
  '.svg': 'image/svg+xml',
  '.ttf': 'font/ttf',
};

/** A folder over HTTP, never kept by the browser itself. */
async function serve(folder: string): Promise<{ readonly server: Server; readonly address: string }> {
  const server = createServer((request, response) => {
    const path = new URL(request.url ?? '/', 'http://x').pathname;
    const file = join(folder, path === '/' ? 'index.html' : path);
    try {
      const body = readFileSync(file);
      response.writeHead(200, {
        'content-type': TYPES[extname(file)] ?? 'text/plain',
        'cache-control': 'no-store',
      });
      response.end(body);
    } catch (error) {
      response.writeHead(404);
      response.end(String(error));
    }
  });
  await new Promise<void>((ready) => server.listen(0, '127.0.0.1', ready));
  return { server, address: `http://127.0.0.1:${(server.address() as AddressInfo).port}/` };
}

test('a new version is offered quietly, and taken only when asked for', async ({ page }) => {
  const folder = mkdtempSync(join(tmpdir(), 'splitwright-update-'));
  cpSync(DIST, folder, { recursive: true });
  const { server, address } = await serve(folder);
  try {
    await page.goto(address);
    await openExample(page);
    await kept(page);
    await expect(page).toHaveTitle('Let-down – Splitwright');
    // The next version: another title, and the list of kept files says so.
    const html = readFileSync(join(folder, 'index.html'), 'utf8');
    writeFileSync(
      join(folder, 'index.html'),
      html.replace('<title>Splitwright', '<title>Splitwright, newer'),
    );
    const worker = readFileSync(join(folder, 'sw.js'), 'utf8');
    const newer = worker.replace(/(url:"index\.html",revision:")[0-9a-f]+/, '$10000');
    const swapped =
      newer === worker ? worker.replace(/(revision:")[0-9a-f]+(",url:"index\.html")/, '$10000$2') : newer;
    expect(swapped).not.toBe(worker);
    writeFileSync(join(folder, 'sw.js'), swapped);
    await page.reload();
    const bar = page.getByRole('status', { name: 'New version' });
    await expect(bar).toBeVisible({ timeout: 60_000 });
    // Not taken unasked: the page that runs is the old one, also after another load.
    await expect(page).toHaveTitle('Let-down – Splitwright');
    await page.reload();
    await solved(page);
    await expect(page).toHaveTitle('Let-down – Splitwright');
    await expect(bar).toBeVisible({ timeout: 60_000 });
    await bar.getByRole('button', { name: 'Reload' }).click();
    await expect(page).toHaveTitle('Let-down – Splitwright, newer');
    await solved(page);
    await expect(bar).toHaveCount(0);
  } finally {
    server.close();
    server.closeAllConnections();
    rmSync(folder, { recursive: true, force: true });
  }
});
