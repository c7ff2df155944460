import { parseQuantity, unitLabel } from '../../quantity';
import type { Sketch } from '../../sketch/types';
import type { ScaledFlow } from '../../store/commands';
import { useChemicals } from '../chemicalNames';
import { FLOW_DIMS } from './target';

/** A typed flow in readable units. */
function shown(text: string): string {
  const read = parseQuantity(text, FLOW_DIMS);
  return read.ok ? `${read.number} ${unitLabel(read.unit, read.dim)}` : text;
}

/** Flow by flow, what is typed at the feeds and what stands there after; what does not take part is said. */
export function ScaledList({
  flows,
  sketch,
}: {
  readonly flows: readonly ScaledFlow[];
  readonly sketch: Sketch;
}) {
  const chemicals = useChemicals();
  const part = (path: string): string => {
    const id = path.split('.').slice(2).join('.');
    return id === '' ? '' : ` ${chemicals.find((c) => c.id === id)?.name ?? id}`;
  };
  const untouched = sketch.units.filter(
    (unit) => unit.kind === 'feed' && !flows.some((flow) => flow.unit.id === unit.id),
  );
  return (
    <>
      <div className="scaled-holder">
        <table className="scaled">
          <tbody>
            {flows.map(({ unit, path, from, to }) => (
              <tr key={`${unit.id} ${path}`}>
                <th scope="row">
                  {unit.name?.trim() || unit.tag}
                  {part(path)}
                </th>
                <td>{shown(from)}</td>
                <td>{from === to ? '' : shown(to)}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      {untouched.length > 0 ? (
        <p className="muted small">
          Without a flow of their own: {untouched.map((unit) => unit.name?.trim() || unit.tag).join(', ')}.
        </p>
      ) : null}
      <p className="muted small">
        Flows given elsewhere, such as air or a part given as a flow, stay as typed.
      </p>
    </>
  );
}
