/** A square code as one path on a grid of `size` units, its quiet zone included. */
export type Square = { size: number; path: string };

const quiet = 4;

/** Draws a text as a square code (ISO/IEC 18004, correction level M). */
export async function drawSquare(text: string): Promise<Square> {
  const { default: codes } = await import('qrcode');
  const { modules } = codes.create(text, { errorCorrectionLevel: 'M' });
  const rows = Array.from({ length: modules.size }, (_, y) =>
    Array.from({ length: modules.size }, (_unused, x) =>
      modules.get(y, x) ? `M${x + quiet} ${y + quiet}h1v1h-1z` : '',
    ).join(''),
  );
  return { size: modules.size + 2 * quiet, path: rows.join('') };
}
