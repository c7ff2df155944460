type Means = Pick<StorageManager, 'persist' | 'persisted'>;

/**
 * Asks the browser, once, not to clear what this page keeps when the disk fills up or the page has not been visited for
 * long: without that, stored sketches are its to throw away (Storage Standard, WHATWG, "best-effort" buckets). Some browsers
 * ask the user; so this is for the moment in which there is something to lose. A refusal changes nothing else.
 */
export function makeLasting(means: Means | undefined): () => Promise<void> {
  let asked = false;
  return async () => {
    if (asked || !means) return;
    asked = true;
    try {
      if (!(await means.persisted())) await means.persist();
    } catch (error) {
      console.warn(`The browser was not asked to keep sketches for good: ${String(error)}`);
    }
  };
}
