import { formatMass } from '../mass/formatMass.ts';

/** What became of one line when its bags were weighed. */
export interface LineOutcome {
  readonly countedMg: number;
  readonly wantedMg: number;
  readonly targetMg: number;
  readonly shortage: 'scale' | 'queue';
  readonly surplus: 'spread' | 'shelf';
  /** Members who get less than they asked for, and more. */
  readonly less: number;
  readonly more: number;
}

const people = (count: number) => (count === 1 ? '1 member' : `${count} members`);

/** What the line's policy does with what came, in a sentence or two. */
export function targetWords(outcome: LineOutcome, locale = 'en'): string {
  const { countedMg, wantedMg, targetMg, less, more } = outcome;
  const g = (mg: number) => formatMass(mg, { locale });
  if (wantedMg === 0) return 'Nobody asked for it: all of it goes to the shelf.';
  if (countedMg < wantedMg) {
    const short = `${g(wantedMg - countedMg)} too little came.`;
    return outcome.shortage === 'scale'
      ? `${short} Everyone gets ${Math.floor((targetMg * 1000) / wantedMg) / 10} % of what they asked for.`
      : `${short} Earlier pledges are filled first: ${people(less)} ${less === 1 ? 'gets' : 'get'} less.`;
  }
  const over = countedMg - wantedMg;
  if (over === 0) return 'Exactly what was asked for.';
  const shelf = countedMg - targetMg;
  const head = `${g(over)} more than asked for.`;
  if (more === 0) return `${head} It covers what is lost in handling; the rest goes to the shelf.`;
  const how = outcome.surplus === 'spread' ? 'spread as the buy says' : 'to those with room for it';
  return `${head} ${g(over - shelf)} of it ${how}, to ${people(more)}; ${g(shelf)} for handling and the shelf.`;
}
