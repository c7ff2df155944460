import { useEffect, useState } from 'react';
import { buildScene } from '../drawing/scene';
import { sceneToSvg } from '../drawing/svg';
import { PRINT } from '../drawing/tokens';
import { openSketch } from '../sketch/read';
import type { Sketch } from '../sketch/types';
import { useStores } from '../store/react';
import { openExample, openFile } from './documents';
import './start.css';

interface Listed {
  readonly file: string;
  readonly title: string;
  readonly shows: string;
}
interface Card extends Listed {
  readonly sketch: Sketch;
  readonly picture: string;
}

/** Ink that follows the theme: the small drawings are SVG made from the example files themselves. */
const INK = {
  ...PRINT,
  ink: 'currentColor',
  ink2: 'currentColor',
  ink3: 'currentColor',
  paper: 'var(--paper)',
};

function cardOf(listed: Listed, text: string): Card[] {
  const opened = openSketch(text);
  if (!opened.ok) return [];
  const scene = buildScene(opened.sketch, {
    states: new Map(),
    limits: new Map(),
    labels: new Map(),
    duties: new Map(),
  });
  return [{ ...listed, sketch: opened.sketch, picture: sceneToSvg(scene, INK, { bare: true }) }];
}

async function loadCards(): Promise<readonly Card[]> {
  const list: readonly Listed[] = await (await fetch('./examples/index.json')).json();
  const texts = await Promise.all(
    list.map(async (entry) => (await fetch(`./examples/${entry.file}`)).text()),
  );
  return list.flatMap((entry, k) => cardOf(entry, texts[k] ?? ''));
}

/** The picture as an image source: nothing in it can run. */
const counted = (sketch: Sketch): string => {
  const drawn = sketch.units.filter((u) => u.kind !== 'feed' && u.kind !== 'product').length;
  return `${drawn} units, ${sketch.streams.length} streams, ${sketch.chemicals.length} components`;
};

/** An empty sheet is a drawing not yet made: a dashed ghost with three sentences; examples below, the framed one opens with Enter. */
export function Start() {
  const stores = useStores();
  const [cards, setCards] = useState<readonly Card[]>([]);
  useEffect(() => {
    let alive = true;
    loadCards().then(
      (loaded) => alive && setCards(loaded),
      () => alive && setCards([]),
    );
    return () => {
      alive = false;
    };
  }, []);
  return (
    <section className="start" aria-label="Start">
      <Ghost />
      <div className="start-head">
        <h2>Or open an example and change it</h2>
        <button type="button" className="link" onClick={() => void openFile(stores)}>
          Open a file, or drop one on the sheet
        </button>
      </div>
      <div className="cards">
        {cards.map((card, k) => (
          <button
            key={card.file}
            type="button"
            className="card"
            data-example={card.file}
            ref={k === 0 ? focusIfFree : undefined}
            onClick={() => void openExample(stores, card.file)}
          >
            {/* biome-ignore lint/security/noDangerouslySetInnerHtml: our own SVG writer, which escapes every text */}
            <span className="picture" aria-hidden="true" dangerouslySetInnerHTML={{ __html: card.picture }} />
            <span className="card-title">{card.title}</span>
            <span className="muted">{card.shows}</span>
            <span className="muted">{counted(card.sketch)}</span>
          </button>
        ))}
      </div>
      <p className="muted">
        Enter opens the framed example. Without a mouse: F6 goes from part to part of the screen, and ? lists
        all keys. Sketches stay on this computer and save themselves.
      </p>
    </section>
  );
}

/** The first example takes the focus, unless somebody is already at work elsewhere. */
function focusIfFree(element: HTMLElement | null): void {
  if (document.activeElement === document.body) element?.focus({ preventScroll: true });
}

function Ghost() {
  return (
    <svg
      className="start-ghost"
      viewBox="0 0 640 250"
      role="img"
      aria-label="A feed, a valve and a drum, not drawn yet"
    >
      <g fill="none" stroke="currentColor" strokeWidth="1.3" strokeDasharray="4 3">
        <path d="M90 100H142L154 112L142 124H90Z M154 112H222 M222 104V120L246 104V120Z M246 112H312" />
        <path d="M312 76A24 16 0 0 1 360 76V156A24 16 0 0 1 312 156Z M336 60V28H470 M336 172V204H470" />
        <path d="M470 16H518L530 28L518 40H470L482 28Z M470 192H518L530 204L518 216H470L482 204Z M312 88H360" />
      </g>
      <g className="ghost-words">
        <text x="102" y="116">
          Feed
        </text>
        <text x="488" y="32">
          Vapour
        </text>
        <text x="490" y="208">
          Liquid
        </text>
      </g>
      <g className="ghost-steps">
        <text x="20" y="150">
          <tspan className="no">1</tspan> Drag a feed from the shelf, choose the
        </text>
        <text x="33" y="166">
          chemicals, give it a flow and a composition
        </text>
        <text x="384" y="96">
          <tspan className="no">2</tspan> Pull from a port to a unit,
        </text>
        <text x="397" y="112">
          or drop a unit on a line
        </text>
        <text x="384" y="140">
          <tspan className="no">3</tspan> Numbers follow as you draw;
        </text>
        <text x="397" y="156">
          the balance shows the closure
        </text>
      </g>
    </svg>
  );
}
