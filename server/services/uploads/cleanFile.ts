import sharp from 'sharp';
import { DomainProblem } from '../problem.ts';
import { sniffType, type TakenType } from './sniffType.ts';

/** A file fit to be kept. */
export interface CleanFile {
  readonly bytes: Buffer;
  readonly contentType: TakenType;
  readonly fileName: string;
}

const mostBytes = 10 * 1024 * 1024;
const longestSide = 4000;
const mostPixels = 60_000_000;

const extensions: Record<TakenType, string> = {
  'image/jpeg': 'jpg',
  'image/png': 'png',
  'image/webp': 'webp',
  'application/pdf': 'pdf',
  'text/csv': 'csv',
};

/** Multipart names arrive as Latin-1 bytes of UTF-8; what isn't valid UTF-8 stays as it is. */
function decodeName(name: string): string {
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(Buffer.from(name, 'latin1'));
  } catch {
    return name;
  }
}

/** A name without folders and control characters, with the ending that its content asks for. */
export function cleanName(name: string, type: TakenType): string {
  const base = decodeName(name).split(/[\\/]/).pop() ?? '';
  const stem = base
    .replace(/\.[^.]{0,10}$/, '')
    .replace(/[\p{Cc}\p{Cf}<>:"|?*]/gu, '')
    .trim()
    .slice(0, 100);
  return `${stem === '' ? 'file' : stem}.${extensions[type]}`;
}

/** The image drawn anew: upright, at most 4000 pixels a side, without place, camera or any other metadata. */
async function redraw(bytes: Buffer, type: TakenType): Promise<{ bytes: Buffer; type: TakenType }> {
  const image = sharp(bytes, { limitInputPixels: mostPixels, failOn: 'error' })
    .autoOrient()
    .resize({ width: longestSide, height: longestSide, fit: 'inside', withoutEnlargement: true });
  const same = await image
    .clone()
    .toFormat(type === 'image/png' ? 'png' : type === 'image/webp' ? 'webp' : 'jpeg', {
      quality: 85,
    })
    .toBuffer();
  if (same.length <= mostBytes) return { bytes: same, type };
  // A photograph kept as PNG can be larger than what came.
  const smaller = await image.flatten({ background: '#ffffff' }).jpeg({ quality: 80 }).toBuffer();
  return { bytes: smaller, type: 'image/jpeg' };
}

/**
 * Looks into an uploaded file and makes it fit to be kept and served: its type by content, images drawn anew.
 * @throws DomainProblem 415 for a type that is not taken, 422 for an image that can't be read or is empty
 */
export async function cleanFile(file: { fileName: string; bytes: Buffer }): Promise<CleanFile> {
  const type = await sniffType(file.bytes);
  if (!type) {
    throw new DomainProblem(
      415,
      'wrong_type',
      'Images (JPEG, PNG, WebP), PDF and CSV files are taken. This is none of them.',
      { errors: { file: 'Choose a JPEG, PNG or WebP image, a PDF or a CSV file.' } },
    );
  }
  if (!type.startsWith('image/')) {
    return { bytes: file.bytes, contentType: type, fileName: cleanName(file.fileName, type) };
  }
  try {
    const drawn = await redraw(file.bytes, type);
    const fileName = cleanName(file.fileName, drawn.type);
    return { bytes: drawn.bytes, contentType: drawn.type, fileName };
  } catch {
    throw new DomainProblem(
      422,
      'invalid',
      'This image can’t be read. Save it anew and try again.',
      {
        errors: { file: 'This image can’t be read.' },
      },
    );
  }
}
