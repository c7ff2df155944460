import type { Port } from '../engine/ids';
import type { Sketch, SketchStream, SketchUnit } from './types';

/** "vapourDistillate" -> "vapour distillate", "out2" -> "outlet 2", "in" -> "inlet". */
export function portWords(port: Port): string {
  const numbered = /^(.*?)(\d+)$/.exec(port);
  const stem = numbered?.[1] ?? port;
  const words = stem === 'out' ? 'outlet' : stem === 'in' ? 'inlet' : spaced(stem);
  return numbered ? `${words} ${numbered[2]}` : words;
}

const spaced = (name: string): string =>
  name.replace(/([a-z])([A-Z])/g, (_, a: string, b: string) => `${a} ${b.toLowerCase()}`);

/**
 * What a stream is called where nobody gave it a name: by where it comes from ("V-101 vapour", a feed's own name), else by
 * where it goes.
 */
export function describeStream(sketch: Pick<Sketch, 'units'>, stream: SketchStream): string {
  if (stream.name !== undefined && stream.name.trim() !== '') return stream.name;
  const end = stream.from ?? stream.to;
  const unit = end && sketch.units.find((u) => u.id === end[0]);
  if (!end || !unit) return '';
  if (unit.kind === 'feed' || unit.kind === 'product') return unitName(unit);
  return `${unit.tag} ${portWords(end[1])}`;
}

const unitName = (unit: SketchUnit): string =>
  unit.name !== undefined && unit.name.trim() !== '' ? unit.name : unit.tag;
