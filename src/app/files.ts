/** Opens the browser's file dialogue; answers undefined when the user closed it. */
export function pickFile(accept: string): Promise<File | undefined> {
  return new Promise((resolve) => {
    const input = document.createElement('input');
    input.type = 'file';
    input.accept = accept;
    input.hidden = true;
    const end = (file: File | undefined): void => {
      input.remove();
      resolve(file);
    };
    input.addEventListener('change', () => end(input.files?.[0]));
    input.addEventListener('cancel', () => end(undefined));
    // In the document while the dialogue is open: a loose element may be collected, and its answer lost.
    document.body.append(input);
    input.click();
  });
}

/** Hands a file to the browser's downloads. */
export function download(name: string, data: BlobPart, type: string): void {
  const address = URL.createObjectURL(new Blob([data], { type }));
  const link = document.createElement('a');
  link.href = address;
  link.download = name;
  document.body.append(link);
  link.click();
  link.remove();
  setTimeout(() => URL.revokeObjectURL(address), 60_000);
}

/** A file name from a title: letters, digits and dashes, never empty. */
export function fileName(title: string | undefined, ending: string): string {
  const stem = (title ?? '')
    .normalize('NFKD')
    .replace(/[^\p{Letter}\p{Number}]+/gu, '-')
    .replace(/^-+|-+$/g, '')
    .toLowerCase()
    .slice(0, 60);
  return `${stem || 'sketch'}${ending}`;
}
