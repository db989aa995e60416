/** Saves a file the browser already holds. */
export function saveBlob(name: string, blob: Blob): void {
  const url = URL.createObjectURL(blob);
  const link = document.createElement('a');
  link.href = url;
  link.download = name;
  link.click();
  setTimeout(() => URL.revokeObjectURL(url), 10_000); // a slow disk may still be reading it
}

/** Saves a text as a file of that name. */
export async function saveText(name: string, text: string, type: string): Promise<void> {
  saveBlob(name, new Blob([text], { type }));
}
