import { solveSketch } from '../../src/cli/run';
import { bank } from '../../src/data/bank';
import type { ReportInput } from '../../src/report/input';
import { openSketch } from '../../src/sketch/read';
import type { Json, Sketch } from '../../src/sketch/types';

/** Chemicals of a generated sketch, all vapour or liquid under common conditions. */
function chemicalsOf(count: number): readonly string[] {
  const names = bank.index.map((chemical) => chemical.id);
  if (names.length < count) throw new Error(`the bank has ${names.length} chemicals`);
  return names.slice(0, count);
}

export interface Generated {
  readonly streams: number;
  readonly chemicals: number;
  /** Long names of streams, units and sketch. */
  readonly long?: boolean;
}

const LONG =
  'Recirculated intermediate hydrocarbon from the second-stage separator to the downstream conditioning section';

/** A train of heaters and valves in rows of ten, one stream after each: as many streams and chemicals as asked for. */
export async function generatedSketch({ streams, chemicals, long = false }: Generated): Promise<Sketch> {
  const ids = chemicalsOf(chemicals);
  const at = (k: number): readonly [number, number] => [96 * (k % 10) * 2, Math.floor(k / 10) * 240];
  const unit = (k: number): Json => {
    const isValve = k % 3 === 2;
    return {
      id: `u${k}`,
      tag: isValve ? `PV-${100 + k}` : `E-${100 + k}`,
      ...(long ? { name: `${LONG} ${k}` } : {}),
      kind: isValve ? 'valve' : 'heater',
      at: at(k),
      settings: isValve
        ? { p: { ratio: '97 %' } }
        : { T: `${30 + ((k * 7) % 90)} degC`, p: { drop: '0.01 bar' } },
    };
  };
  const opened = openSketch({
    format: 'splitwright.sketch',
    version: 1,
    id: 'generated',
    title: { title: long ? LONG : `Train of ${streams} streams`, number: 'GEN-1' },
    chemicals: ids,
    model: { kind: 'peng-robinson', alpha: '1976', bankPairs: true, pairs: [] },
    units: [
      {
        id: 'u0',
        tag: 'FEED-1',
        kind: 'feed',
        at: at(0),
        settings: {
          state: { T: '40 degC', P: '20 bar' },
          flow: '100 kmol/h',
          composition: {
            basis: 'mole',
            parts: Object.fromEntries(ids.map((id) => [id, 1 / ids.length])),
          },
        },
      },
      ...Array.from({ length: streams - 1 }, (_, k) => unit(k + 1)),
    ],
    streams: Array.from({ length: streams }, (_, k) => ({
      id: `s${k + 1}`,
      number: String(k + 1),
      ...(long ? { name: `${LONG} ${k + 1}` } : {}),
      from: [`u${k}`, 'out'],
      ...(k + 1 < streams ? { to: [`u${k + 1}`, 'in'] } : {}),
    })),
  });
  if (!opened.ok) throw new Error(JSON.stringify(opened.problems));
  return opened.sketch;
}

/** A generated sketch solved once from nothing, with a fixed day. */
export async function solvedGenerated(what: Generated): Promise<ReportInput> {
  const { input } = await solveSketch(await generatedSketch(what));
  return { ...input, day: '2026-01-15' };
}
