import type { PickedText } from '@/lib/picked';

/** The browser's own file chooser; null when it is closed without a choice. */
export function chooseFile(accept: string): Promise<File | null> {
  return new Promise((resolve) => {
    const input = document.createElement('input');
    input.type = 'file';
    input.accept = accept;
    input.addEventListener('change', () => resolve(input.files?.[0] ?? null));
    input.addEventListener('cancel', () => resolve(null));
    input.click();
  });
}

/** Lets the reader choose a text file of theirs; `endings` such as ".geojson,.gpx". */
export async function pickTextFile(endings: string): Promise<PickedText | null> {
  const file = await chooseFile(endings);
  return file ? { name: file.name, text: await file.text() } : null;
}
