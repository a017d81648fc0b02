type Limits = { accept: string; maxBytes: number; multiple: boolean };

const fits = (file: File, accept: string) =>
  accept
    .split(',')
    .map((kind) => kind.trim().toLowerCase())
    .some((kind) => {
      if (kind.startsWith('.')) return file.name.toLowerCase().endsWith(kind);
      if (kind.endsWith('/*')) return file.type.startsWith(kind.slice(0, -1));
      return file.type === kind;
    });

/** The files that may be sent, and one sentence about the first that may not. */
export function checkFiles(all: File[], { accept, maxBytes, multiple }: Limits) {
  const chosen = multiple ? all : all.slice(0, 1);
  let problem = '';
  const files = chosen.filter((file) => {
    if (!fits(file, accept)) {
      problem ||= `${file.name} is not a kind of file that is taken here.`;
      return false;
    }
    if (file.size > maxBytes) {
      problem ||= `${file.name} is larger than ${Math.floor(maxBytes / 1_000_000)} MB.`;
      return false;
    }
    return true;
  });
  return { files, problem };
}
