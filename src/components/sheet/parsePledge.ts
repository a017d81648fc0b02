import { parseMass } from '#shared/domain/mass/parseMass.ts';

/** A typed pledge as read: grams wanted and maybe up to how many, or why not. */
export type ParsedPledge =
  | { ok: true; wantedMg: number; upToMg: number | null | undefined }
  | { ok: false; reason: string; readings?: { text: string; mg: number }[] };

const reasons: Record<string, string> = {
  unreadable: 'That is not a mass that can be read here.',
  negative: 'A pledge can not be below zero.',
  too_precise: 'That is finer than a milligram.',
  too_large: 'That is too large.',
};

const between = /\s*(?:up\s*to|\.{2,}|…|–|—|(?<=\d\s*\p{L}*\s*)-)\s*/iu;

type Say = (mg: number) => string;

function readOne(text: string, say: Say, rebuild: (part: string) => string) {
  const read = parseMass(text);
  if (read.ok) return { ok: true as const, mg: read.mg };
  if (read.code === 'empty') return { ok: true as const, mg: 0 };
  if (read.code !== 'ambiguous') {
    return { ok: false as const, reason: reasons[read.code] ?? 'That could not be read.' };
  }
  const readings = (read.readings ?? []).map((mg) => ({ text: rebuild(`${mg / 1000} g`), mg }));
  const words = readings.map(({ mg }) => say(mg)).join(' or ');
  return { ok: false as const, reason: `Is that ${words}?`, readings };
}

function wrongStep(mg: number, stepMg: number, say: Say): string | null {
  if (mg % stepMg === 0) return null;
  const below = mg - (mg % stepMg);
  return `In steps of ${say(stepMg)}: ${say(below)} or ${say(below + stepMg)}.`;
}

/**
 * Reads what somebody typed into a cell: "1.2kg", "800", "0,5 kg", "1000 up to 1500". Without a second part `upToMg`
 * is undefined: it stays as it was. Nothing means 0.
 */
export function parsePledge(text: string, stepMg: number, say: Say): ParsedPledge {
  const [first = '', second, ...more] = text.trim().split(between);
  if (more.length > 0) return { ok: false, reason: 'Write one mass, or two with “up to” between.' };
  const wanted = readOne(first, say, (part) =>
    second === undefined ? part : `${part} up to ${second}`,
  );
  if (!wanted.ok) return wanted;
  const upTo =
    second === undefined ? null : readOne(second, say, (part) => `${first} up to ${part}`);
  if (upTo && !upTo.ok) return upTo;
  const reason = wrongStep(wanted.mg, stepMg, say) ?? (upTo && wrongStep(upTo.mg, stepMg, say));
  if (reason) return { ok: false, reason };
  if (upTo && upTo.mg > 0 && upTo.mg < wanted.mg) {
    return { ok: false, reason: '“Up to” is the most you would take, so not below what you want.' };
  }
  return { ok: true, wantedMg: wanted.mg, upToMg: upTo ? upTo.mg || null : undefined };
}

/** A pledge as one would type it. */
export function writePledge(wantedMg: number, upToMg: number | null): string {
  const wanted = wantedMg === 0 ? '' : String(wantedMg / 1000);
  return upToMg === null ? wanted : `${wanted || '0'} up to ${upToMg / 1000}`;
}
