import { useId, useState } from 'react';
import { formatDecimals } from '../../quantity';
import { useBank } from '../../store/bank';
import { setChemicals } from '../../store/commands';
import { useSketch, useStores } from '../../store/react';
import { useChemicals } from '../chemicalNames';
import { run } from '../run';
import { searchBank } from './search';

/** A search over the bank by name, formula or CAS number; arrows walk the answers, Enter adds one. */
export function AddChemical() {
  const { sketch, session } = useStores();
  const writable = useSketch((state) => state.writable);
  const { index } = useBank();
  const listed = useChemicals();
  const [text, setText] = useState('');
  const [at, setAt] = useState(0);
  const [why, setWhy] = useState<string | undefined>();
  const id = useId();
  const found = searchBank(index, text).filter(
    (entry) => !listed.some((chemical) => chemical.id === entry.id),
  );
  const add = (chosen: string | undefined): void => {
    if (chosen === undefined) return;
    const refused = run(sketch, (s) => setChemicals(s, [...s.chemicals, chosen]));
    setWhy(refused);
    const name = found.find((entry) => entry.id === chosen)?.name;
    if (refused === undefined && name) session.setState({ spoken: `${name} added` });
    setText('');
    setAt(0);
  };
  const step = (by: number): void => setAt((at + by + found.length) % Math.max(1, found.length));
  return (
    <div className="add-chemical">
      <input
        type="search"
        role="combobox"
        className="framed-input"
        aria-label="Add a chemical: name, formula or CAS number"
        aria-expanded={found.length > 0}
        aria-controls={id}
        aria-activedescendant={found.length > 0 ? `${id}-${at}` : undefined}
        autoComplete="off"
        data-field="chemicals.add"
        data-begin
        placeholder="Add: name, formula or CAS number"
        disabled={!writable}
        value={text}
        onChange={(event) => {
          setText(event.target.value);
          setAt(0);
          setWhy(undefined);
        }}
        onKeyDown={(event) => {
          if (event.key === 'ArrowDown') step(1);
          else if (event.key === 'ArrowUp') step(-1);
          else if (event.key === 'Enter') add(found[at]?.id);
          else if (event.key === 'Escape' && text !== '') {
            event.stopPropagation();
            setText('');
            return;
          } else return;
          event.preventDefault();
        }}
      />
      {text.trim() !== '' && found.length === 0 ? (
        <p className="field-note">
          {searchBank(index, text).length > 0
            ? 'Already in the list.'
            : 'The bank has no chemical like that.'}
        </p>
      ) : null}
      {found.length > 0 ? (
        <div className="answers" role="listbox" id={id} aria-label="Chemicals of the bank">
          {found.map((entry, k) => (
            <div
              key={entry.id}
              id={`${id}-${k}`}
              role="option"
              tabIndex={-1}
              aria-selected={k === at}
              data-chemical={entry.id}
              onPointerDown={(event) => {
                event.preventDefault();
                add(entry.id);
              }}
            >
              <span>{entry.name}</span>
              <span className="muted">{entry.formula}</span>
              <span className="muted">{entry.cas}</span>
              <span className="muted mw">{formatDecimals(entry.MW_g_mol, 2)}</span>
            </div>
          ))}
        </div>
      ) : null}
      {why ? (
        <p className="refusal" role="alert">
          {why}
        </p>
      ) : null}
    </div>
  );
}
