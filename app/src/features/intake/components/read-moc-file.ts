/** The file goes in base64 in a request, of which the service takes 5 MB. */
const MOST_BYTES = 3 * 1024 ** 2;

/** A MOC file as the service takes it: text as it is, a FITS file in base64. */
export async function readMocFile(file: File): Promise<{ value: string | { fits: string } } | { fault: string }> {
  if (file.size > MOST_BYTES) {
    return {
      fault: `The file has ${(file.size / 1024 ** 2).toFixed(0)} MB, more than 3: degrade the MOC to a coarser order.`,
    };
  }
  const bytes = new Uint8Array(await file.arrayBuffer());
  const isFits = new TextDecoder('latin1').decode(bytes.subarray(0, 9)) === 'SIMPLE  =';
  if (!isFits) return { value: new TextDecoder().decode(bytes).trim() };
  let binary = '';
  for (let at = 0; at < bytes.length; at += 0x8000) binary += String.fromCharCode(...bytes.subarray(at, at + 0x8000));
  return { value: { fits: btoa(binary) } };
}
