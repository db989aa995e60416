import type { PickedFile, PickedText } from '@/lib/picked';

/** The browser's own file chooser; nothing when it is closed without a choice. */
function chooseFiles(accept: string, multiple: boolean): Promise<File[]> {
  return new Promise((resolve) => {
    const input = document.createElement('input');
    input.type = 'file';
    input.accept = accept;
    input.multiple = multiple;
    input.addEventListener('change', () => resolve([...(input.files ?? [])]));
    input.addEventListener('cancel', () => resolve([]));
    input.click();
  });
}

export const chooseFile = async (accept: string): Promise<File | null> =>
  (await chooseFiles(accept, false))[0] ?? null;

/** Lets the reader choose several files of theirs, of whatever kind. */
export const pickFiles = async (): Promise<PickedFile[]> =>
  (await chooseFiles('', true)).map((file) => ({ name: file.name, file }));

/** Lets the reader choose a text file of theirs; `endings` such as ".geojson,.gpx". */
export async function pickTextFile(endings: string): Promise<PickedText | null> {
  const file = await chooseFile(endings);
  return file ? { name: file.name, text: await file.text() } : null;
}
