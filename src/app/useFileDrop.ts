import { useEffect, useState } from 'react';
import type { Stores } from '../store/react';
import { dropFiles } from './documents';
import { isTyping } from './isTyping';

/** A file dropped anywhere on the page is opened; while it hangs over the page, the page says so. True: one hangs there. */
export function useFileDrop(stores: Stores): boolean {
  const [hangs, setHangs] = useState(false);
  useEffect(() => {
    const isFile = (event: DragEvent): boolean => event.dataTransfer?.types.includes('Files') ?? false;
    // Words drawn into a field are the field's; anything else would have the browser leave this page.
    const isOurs = (event: DragEvent): boolean => isFile(event) || !isTyping(event.target);
    const over = (event: DragEvent): void => {
      if (!isOurs(event)) return;
      event.preventDefault();
      setHangs(isFile(event));
    };
    const leave = (event: DragEvent): void => {
      if (event.relatedTarget === null) setHangs(false);
    };
    const drop = (event: DragEvent): void => {
      if (!isOurs(event)) return;
      event.preventDefault();
      setHangs(false);
      if (event.dataTransfer) void dropFiles(stores, event.dataTransfer.files);
    };
    window.addEventListener('dragover', over);
    window.addEventListener('dragleave', leave);
    window.addEventListener('drop', drop);
    return () => {
      window.removeEventListener('dragover', over);
      window.removeEventListener('dragleave', leave);
      window.removeEventListener('drop', drop);
    };
  }, [stores]);
  return hangs;
}
