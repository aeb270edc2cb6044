/** Pixels of a saved picture for each of its own: sharp on paper. */
const DENSITY = 2;

function save(blob: Blob, fileName: string): void {
  const address = URL.createObjectURL(blob);
  const link = document.createElement('a');
  link.href = address;
  link.download = fileName;
  link.click();
  // The download has begun by then; the memory is the browser's no longer.
  setTimeout(() => URL.revokeObjectURL(address), 10_000);
}

/** Offers text as a file. */
export const saveText = (text: string, fileName: string, type: string): void =>
  save(new Blob([text], { type: `${type};charset=utf-8` }), fileName);

/** Draws an SVG document on a canvas and offers it as PNG. */
export async function savePng(svg: string, fileName: string): Promise<void> {
  const image = new Image();
  const address = URL.createObjectURL(new Blob([svg], { type: 'image/svg+xml;charset=utf-8' }));
  try {
    image.src = address;
    await image.decode();
    const canvas = document.createElement('canvas');
    [canvas.width, canvas.height] = [image.naturalWidth * DENSITY, image.naturalHeight * DENSITY];
    const context = canvas.getContext('2d')!;
    context.scale(DENSITY, DENSITY);
    context.drawImage(image, 0, 0);
    const blob = await new Promise<Blob | null>((resolve) => canvas.toBlob(resolve, 'image/png'));
    if (blob) save(blob, fileName);
  } finally {
    URL.revokeObjectURL(address);
  }
}

/** A name that every file system takes. */
export const fileNameOf = (name: string): string => name.replace(/[^\w+.-]+/g, '_').replace(/^[._]+/, '') || 'picture';
