import { mkdtempSync, readFileSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { run } from '../../src/cli/run';
import { readXlsx } from '../report/readXlsx';
import { EXAMPLES } from '../report/solved';

const dir = mkdtempSync(join(tmpdir(), 'sketch-'));
const letDown = join(EXAMPLES, 'let-down.sketch.json');
async function call(...args: string[]) {
  const out: string[] = [];
  const err: string[] = [];
  const code = await run(args, { out: (l) => out.push(l), err: (l) => err.push(l) });
  return { code, out: out.join('\n'), err: err.join('\n') };
}
const readJson = (path: string) => JSON.parse(readFileSync(path, 'utf8'));

describe('the headless command', () => {
  test('solves a sketch and writes results in SI, keyed by stream number and tag', async () => {
    const json = join(dir, 'a.json');
    expect((await call(letDown, '--json', json)).code).toBe(0);
    const results = readJson(json);
    expect(results).toMatchObject({ format: 'splitwright.results', version: 1, solved: true });
    expect(Object.keys(results.streams)).toEqual(['1', '2', '3', '4']);
    expect(results.streams['3']).toMatchObject({
      from: ['V-1', 'vapour'],
      state: 'solved',
      vapourFraction: 1,
    });
    expect(results.units['V-1']).toMatchObject({
      kind: 'drum',
      state: 'solved',
      out: { vapour: '3', liquid: '4' },
    });
    // Derived by hand: 150 kmol/h is 41.6667 mol/s; vapour and liquid of the drum make the feed.
    expect(results.streams['3'].n_mol_s + results.streams['4'].n_mol_s).toBeCloseTo(150 / 3.6, 9);
    expect(results.closure.energy.relative).toBeLessThan(1e-11);
    expect(
      Object.values(results.streams['4'].z as Record<string, number>).reduce((a, b) => a + b),
    ).toBeCloseTo(1, 12);
  });

  test('changes a setting by tag and path before solving', async () => {
    const json = join(dir, 'b.json');
    expect((await call(letDown, '--json', json, '--set', 'PV-1.p.P=12 bar')).code).toBe(0);
    expect(readJson(json).streams['2'].P_Pa).toBe(12e5);
  });

  test('says why a unit has no answer, and the next step, once', async () => {
    const loop = join(EXAMPLES, 'nitrogen-loop.sketch.json');
    const closed = await call(loop, '--set', 'D-1.shares.out2=0 %');
    expect(closed.code).toBe(1);
    const lines = closed.err.split('\n');
    // Eight units go round; the reason is one.
    expect(lines).toHaveLength(1);
    expect(lines[0]).toMatch(/Nitrogen.*Oxygen/);
    expect(lines[0]).toMatch(/purge/);
    const open = await call(letDown, '--set', 'PV-1.p={}');
    expect(open.err).toMatch(/^ {2}PV-1: /);
    expect((await call(letDown)).err).toBe('');
  });

  test('says 1 and still writes the results when something needs a value', async () => {
    const json = join(dir, 'c.json');
    const { code } = await call(letDown, '--json', json, '--set', 'PV-1.p={}');
    expect(code).toBe(1);
    const results = readJson(json);
    expect(results.solved).toBe(false);
    expect(results.units['PV-1'].state).toBe('needs-value');
    expect(results.streams['3']).toEqual({
      from: ['V-1', 'vapour'],
      to: expect.anything(),
      state: 'waiting',
    });
  });

  test('says 1 under --strict when a finding is beyond a limit', async () => {
    // A valve cannot raise the pressure: beyond limit by the balance.
    const wrong = ['--set', 'PV-1.p.P=90 bar'];
    expect((await call(letDown, ...wrong)).code).toBe(0);
    expect((await call(letDown, ...wrong, '--strict')).code).toBe(1);
  });

  test.each([
    ['not JSON', '{"format": ', /line|Line/],
    ['of another format', '{"format": "other"}', /./],
    [
      'with a stream to nowhere',
      JSON.stringify({
        format: 'splitwright.sketch',
        version: 1,
        chemicals: ['methane'],
        model: { kind: 'peng-robinson' },
        units: [],
        streams: [{ id: 's1', number: '1', from: ['u9', 'out'] }],
      }),
      /u9/,
    ],
  ])('says 2 with the place for a file %s', async (_, text, place) => {
    const file = join(dir, 'bad.sketch.json');
    writeFileSync(file, text);
    const { code, err } = await call(file);
    expect(code).toBe(2);
    expect(err).toMatch(place);
  });

  test('says 2 for a model that this version does not have', async () => {
    const file = join(dir, 'later.sketch.json');
    writeFileSync(file, readFileSync(letDown, 'utf8').replace('"peng-robinson"', '"nrtl"'));
    const { code, err } = await call(file);
    expect(code).toBe(2);
    expect(err).toContain('not available');
  });

  test.each([
    [[]],
    [['--json']],
    [['x.json', '--what']],
    [['a.json', 'b.json', '--json', 'o']],
    [['a.json', '--set', 'PV-1']],
  ])('says 2 and how it is called for the arguments %j', async (args) => {
    const { code, err } = await call(...args);
    expect(code).toBe(2);
    expect(err).toContain('npm run -s solve');
  });

  test('solves several files in one go into a folder', async () => {
    const { code } = await call(
      letDown,
      join(EXAMPLES, 'condensate-flash.sketch.json'),
      '--json-dir',
      join(dir, 'out'),
    );
    expect(code).toBe(0);
    expect(readJson(join(dir, 'out/let-down.results.json')).solved).toBe(true);
    expect(readJson(join(dir, 'out/condensate-flash.results.json')).solved).toBe(true);
  });

  test('writes spreadsheet and drawing, and PDF, all in one call', async () => {
    const [xlsx, svg, pdf] = [join(dir, 'f.xlsx'), join(dir, 'f.svg'), join(dir, 'f.pdf')];
    expect((await call(letDown, '--xlsx', xlsx, '--svg', svg, '--pdf', pdf)).code).toBe(0);
    expect(readXlsx(new Uint8Array(readFileSync(xlsx))).map((s) => s.name)).toContain('Stream summary');
    expect(readFileSync(svg, 'utf8')).toMatch(/^<svg [^>]*viewBox=.*>PV-1<\/text>.*<\/svg>\n$/s);
    expect(readFileSync(pdf).subarray(0, 5).toString()).toBe('%PDF-');
  });

  test('gives the same results twice, but for the time', async () => {
    const [a, b] = [join(dir, 'd.json'), join(dir, 'e.json')];
    await call(letDown, '--json', a);
    await call(letDown, '--json', b);
    const still = (path: string) => ({ ...readJson(path), seconds: 0 });
    expect(still(a)).toEqual(still(b));
  });
});
