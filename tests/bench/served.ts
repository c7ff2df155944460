import { type ChildProcess, spawn } from 'node:child_process';
import { once } from 'node:events';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { gzipSync } from 'node:zlib';

const ROOT = fileURLToPath(new URL('../..', import.meta.url));
const VITE = join(ROOT, 'node_modules/vite/bin/vite.js');
const PORT = Number(process.env.BENCH_PORT ?? 4188);

/** Builds the page into a folder of its own and serves it while `use` lasts. BENCH_BUILT names a built page to use instead. */
export async function served<T>(use: (address: string, folder: string) => Promise<T>): Promise<T> {
  const built = process.env.BENCH_BUILT;
  const folder = built ?? mkdtempSync(join(tmpdir(), 'built-page-'));
  const options = { cwd: ROOT, stdio: 'ignore' } as const;
  if (!built) {
    const build = spawn(process.execPath, [VITE, 'build', '--outDir', folder, '--emptyOutDir'], options);
    const [code] = await once(build, 'exit');
    if (code !== 0) throw new Error(`the build ended with ${code}`);
  }
  const server: ChildProcess = spawn(
    process.execPath,
    [VITE, 'preview', '--outDir', folder, '--port', String(PORT), '--strictPort'],
    options,
  );
  const address = `http://localhost:${PORT}/`;
  const answers = (): Promise<boolean> =>
    fetch(address).then(
      (r) => r.ok,
      () => false,
    );
  try {
    for (let k = 0; k < 200; k += 1) {
      if (await answers()) return await use(address, folder);
      await new Promise((resolve) => setTimeout(resolve, 100));
    }
    throw new Error('the built page is not served');
  } finally {
    server.kill();
    if (!built) rmSync(folder, { recursive: true, force: true });
  }
}

/** Scripts that the page asks for before it can show anything, packed [kB]. */
export function firstScripts_kB(folder: string): number {
  const page = readFileSync(join(folder, 'index.html'), 'utf8');
  const files = [...page.matchAll(/(?:src|href)="\.\/([^"]+\.js)"/g)].map((match) => match[1]!);
  return files.reduce((sum, file) => sum + gzipSync(readFileSync(join(folder, file))).length / 1000, 0);
}
