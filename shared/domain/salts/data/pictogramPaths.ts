import type { Pictogram } from '../hazards.ts';

/**
 * A stroke or an area of a symbol in a box of 100 by 100: `width` makes it a round-ended line, `paper` paints white on
 * what lies below.
 */
export type SymbolPath = { d: string; width?: number; paper?: true };

/** The square on its point that frames each symbol. */
export const pictogramFrame = 'M50 3 L97 50 L50 97 L3 50 Z';
export const pictogramFrameWidth = 6;

const disc = (x: number, y: number, r: number) =>
  `M${x - r} ${y} a${r} ${r} 0 1 0 ${2 * r} 0 a${r} ${r} 0 1 0 ${-2 * r} 0 Z`;

/** The nine symbols of the GHS, drawn anew for this app; black on white inside the red frame. */
export const pictogramPaths: Readonly<Record<Pictogram, readonly SymbolPath[]>> = {
  GHS01: [
    { d: disc(44, 61, 13) },
    { d: 'M53 51 L58 46', width: 5 },
    { d: 'M58 46 L55 30', width: 3 },
    { d: 'M60 44 L68 31', width: 3 },
    { d: 'M62 47 L76 44', width: 3 },
    { d: 'M62 51 L74 58', width: 3 },
    { d: 'M54 43 L45 36', width: 3 },
  ],
  GHS02: [
    {
      d: 'M51 20 C53 32 66 38 66 54 C66 64 59 70 50 70 C41 70 34 64 34 54 C34 46 39 42 41 35 C44 38 46 41 47 45 C51 38 52 29 51 20 Z',
    },
    {
      d: 'M51 46 C52 52 58 55 58 61 C58 66 54 68 50 68 C46 68 42 66 42 60 C42 56 45 54 46 51 C48 53 49 54 49 56 C51 53 51 50 51 46 Z',
      paper: true,
    },
    { d: 'M36 77 L64 77', width: 4 },
  ],
  GHS03: [
    { d: disc(50, 62, 12), width: 5 },
    {
      d: 'M51 17 C52 26 62 31 62 41 C62 46 59 49 55 49 C57 45 54 42 51 38 C50 42 44 44 45 49 C41 48 38 45 38 40 C38 34 42 31 43 27 C45 29 47 31 47 34 C50 29 51 24 51 17 Z',
    },
    { d: 'M40 81 L60 81', width: 4 },
  ],
  GHS04: [
    { d: 'M31 62 L60 46', width: 15 },
    { d: 'M66 43 L73 39', width: 8 },
  ],
  GHS05: [
    { d: 'M25 44 L45 32 L48 37 L28 49 Z' },
    { d: 'M75 44 L55 32 L52 37 L72 49 Z' },
    { d: 'M31 52 L31 57', width: 3 },
    { d: 'M37 50 L37 55', width: 3 },
    { d: 'M69 52 L69 57', width: 3 },
    { d: 'M63 50 L63 55', width: 3 },
    { d: 'M24 62 L29 62 C30 66 33 66 34 63 C36 67 39 66 40 62 L46 62 L46 68 L24 68 Z' },
    {
      d: 'M54 66 C57 61 61 61 63 64 C64 67 67 66 68 63 C72 62 75 64 76 66 L72 71 C66 73 58 72 54 69 Z',
    },
  ],
  GHS06: [
    { d: 'M33 62 L67 78', width: 5 },
    { d: 'M67 62 L33 78', width: 5 },
    {
      d: 'M50 22 C40 22 34 29 34 37 C34 43 37 46 40 48 L41 56 C44 58 56 58 59 56 L60 48 C63 46 66 43 66 37 C66 29 60 22 50 22 Z',
    },
    { d: disc(43, 39, 4.5), paper: true },
    { d: disc(57, 39, 4.5), paper: true },
    { d: 'M50 44 L53 50 L47 50 Z', paper: true },
  ],
  GHS07: [{ d: 'M43 22 L57 22 L53 58 L47 58 Z' }, { d: disc(50, 70, 6) }],
  GHS08: [
    { d: disc(50, 28, 8) },
    { d: 'M50 38 C38 38 33 45 32 57 L31 66 L41 76 L59 76 L69 66 L68 57 C67 45 62 38 50 38 Z' },
    {
      d: 'M50 42 L53 52 L61 46 L56 55 L66 58 L56 61 L61 70 L53 64 L50 74 L47 64 L39 70 L44 61 L34 58 L44 55 L39 46 L47 52 Z',
      paper: true,
    },
  ],
  GHS09: [
    { d: 'M39 71 L41 36', width: 4 },
    { d: 'M41 50 L30 42', width: 3 },
    { d: 'M41 44 L50 32', width: 3 },
    { d: 'M40 58 L51 49', width: 3 },
    { d: 'M41 36 L36 28', width: 3 },
    { d: 'M26 72 L58 72', width: 3 },
    { d: 'M52 64 L46 59 L46 69 Z' },
    { d: 'M51 64 C56 56 68 56 75 64 C68 72 56 72 51 64 Z' },
    { d: disc(68, 62, 1.6), paper: true },
  ],
};
