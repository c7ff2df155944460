import { useState } from 'react';

interface Props {
  readonly title: React.ReactNode;
  readonly open?: boolean;
  readonly children: React.ReactNode;
  readonly aside?: React.ReactNode;
}

/** A head that folds what belongs to it. */
export function Disclosure({ title, open = false, children, aside }: Props) {
  const [isOpen, setOpen] = useState(open);
  return (
    <section className="disclosure">
      <h3>
        <button type="button" aria-expanded={isOpen} onClick={() => setOpen(!isOpen)}>
          <svg width="10" height="10" viewBox="0 0 10 10" aria-hidden="true">
            <path
              d={isOpen ? 'M1.5 3.5 5 7 8.5 3.5' : 'M3.5 1.5 7 5 3.5 8.5'}
              fill="none"
              stroke="currentColor"
            />
          </svg>
          {title}
        </button>
        {aside ? <span className="muted">{aside}</span> : null}
      </h3>
      {isOpen ? children : null}
    </section>
  );
}
