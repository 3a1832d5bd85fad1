/** A file name made of plain letters: nothing that a file system takes for a path. */
export function safeName(name: string): string {
  const bare = name
    .replace(/[^\p{L}\p{N}._ -]+/gu, ' ')
    .replace(/\s+/g, ' ')
    .trim();
  return bare.replace(/^\.+/, '') === '' ? 'standfast' : bare.replace(/^\.+/, '');
}

/** Hands a file to the reader. */
export function download(blob: Blob, name: string): void {
  const address = URL.createObjectURL(blob);
  const link = document.createElement('a');
  link.href = address;
  link.download = safeName(name);
  link.click();
  setTimeout(() => URL.revokeObjectURL(address), 10_000);
}
