import { useMemo } from 'react';
import { useSketch } from '../../store/react';
import type { Form } from '../unit/form';
import { useForm } from '../unit/useForm';

export interface PortRow {
  readonly port: string;
  /** Number of its stream; undefined where a setting is left of a stream that has gone. */
  readonly stream: string | undefined;
}

/** The numbered ports of a family that have a stream, in the order of their numbers, then settings left without one. */
export function usePortRows(stem: 'feed' | 'side'): readonly PortRow[] {
  const { unit, value } = useForm();
  const streams = useSketch((state) => state.sketch.streams);
  const given = value(`${stem}s`);
  return useMemo(() => {
    const name = new RegExp(`^${stem}\\d+$`);
    const joined = streams.flatMap((stream): PortRow[] => {
      const end = stem === 'feed' ? stream.to : stream.from;
      return end?.[0] === unit.id && name.test(end[1]) ? [{ port: end[1], stream: stream.number }] : [];
    });
    const left = Object.keys(typeof given === 'object' && given !== null ? given : {})
      .filter((port) => !joined.some((row) => row.port === port))
      .map((port): PortRow => ({ port, stream: undefined }));
    const number = (row: PortRow): number => Number(row.port.slice(stem.length));
    return [...joined.sort((a, b) => number(a) - number(b)), ...left];
  }, [streams, unit.id, stem, given]);
}

/** The ends that the column has, as places. */
export function endsOf(form: Form): readonly ('condenser' | 'reboiler')[] {
  const distillate = form.value('top.distillate');
  return [
    ...(distillate === 'liquid' || distillate === 'vapour' ? (['condenser'] as const) : []),
    ...(form.value('bottom.reboiler') === true ? (['reboiler'] as const) : []),
  ];
}
