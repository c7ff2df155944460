import type { Stores } from '../../store/react';
import { openAsNew } from '../documents';

const MARK = '#sketch=';

/** Opens the sketch that the page's address holds as a new one; a damaged link is refused with the reason. */
async function openLink(stores: Stores): Promise<void> {
  const { hash } = location;
  if (!hash.startsWith(MARK)) return;
  let link: typeof import('./link');
  try {
    link = await import('./link');
  } catch (error) {
    // The link stays in the address: it is read when the page is loaded again.
    stores.session.say('beyond', 'The link was not opened; your sketches are untouched.', [
      `Load the page again. (${error instanceof Error ? error.message : String(error)})`,
    ]);
    return;
  }
  // Once is enough: a page that is loaded again shows what was made of it.
  history.replaceState(history.state, '', location.pathname + location.search);
  const { readLink, sayLinkFault } = link;
  const read = readLink(hash);
  if (!read.ok) {
    stores.session.say('beyond', 'The link was not opened; your sketches are untouched.', [
      sayLinkFault(read.fault),
    ]);
    return;
  }
  if (openAsNew(stores, read.text, 'The sketch in the link'))
    stores.session.setState({ spoken: 'The sketch in the link is open as a new sketch.' });
}

/** Sketches in the page's address, now and whenever another link is followed here. */
export function watchLinks(stores: Stores): Promise<void> {
  window.addEventListener('hashchange', () => void openLink(stores));
  return openLink(stores);
}
