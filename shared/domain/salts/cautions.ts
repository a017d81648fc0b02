import { isReportable, statementsOf } from './care.ts';
import { storageClasses, type StorageClass } from './data/storageClasses.ts';
import { bareCode } from './hazards.ts';
import { fractionOf, nitrogenFromAmmoniumNitrate, type SaltFacts } from './saltFacts.ts';
import { findTwin } from './sameSubstance.ts';

/** Where a caution stands: beside the line, at the bench, when a share is handed over, on its label. */
export type CautionPlace = 'line' | 'bench' | 'handOver' | 'label';

/** One sentence of what can happen and one of what to do; `danger` where the law or life is at stake. */
export type Caution = { code: string; tone: 'danger' | 'amber' | 'slate'; text: string };

type Rule = Caution & { places: readonly CautionPlace[]; holds: (salt: Look) => boolean };

type Look = {
  facts: SaltFacts;
  codes: ReadonlySet<string>;
  has: (part: string) => boolean;
  keeps: (how: StorageClass) => boolean;
};

/** A salt as the rules of care see it. */
export function lookAt(facts: SaltFacts): Look {
  const id = facts.catalogueId ?? findTwin(facts)?.id ?? '';
  return {
    facts,
    codes: new Set(statementsOf(facts).map(bareCode)),
    has: (part) => fractionOf(facts, part) > 0,
    keeps: (how) => (storageClasses[how] as readonly string[]).includes(id),
  };
}

const anyOf = (look: Look, ...codes: string[]) => codes.some((code) => look.codes.has(code));

const rules: readonly Rule[] = [
  {
    code: 'reportable',
    tone: 'danger',
    places: ['line'],
    holds: ({ facts }) => isReportable(facts),
    text: 'This is a reportable explosives precursor: the club keeps a record of who received how much. Losses and thefts have to be reported within 24 hours.',
  },
  {
    code: 'reportable',
    tone: 'danger',
    places: ['handOver'],
    holds: ({ facts }) => isReportable(facts),
    text: 'This is a reportable explosives precursor: write down the legal name of who collects it. Hand nothing to someone you can’t name.',
  },
  {
    code: 'reportable',
    tone: 'danger',
    places: ['label'],
    holds: ({ facts }) => isReportable(facts),
    text: 'Reportable explosives precursor. Don’t pass it on; report loss or theft within 24 hours.',
  },
  {
    code: 'double_salt',
    tone: 'slate',
    places: ['line'],
    holds: ({ facts }) => nitrogenFromAmmoniumNitrate(facts) > 0,
    text: 'It holds some nitrogen from ammonium nitrate, below the 16 % from which that is restricted. Check the label: greenhouse calcium nitrate is this double salt, not the tetrahydrate.',
  },
  {
    code: 'feeds_fire',
    tone: 'amber',
    places: ['line', 'bench', 'label'],
    holds: (look) => look.has('NO3') || anyOf(look, 'H270', 'H271', 'H272'),
    text: 'It makes a fire burn harder. Keep it cool and dry, away from paper, wood dust, sugar, oils, acids and metal powder.',
  },
  {
    code: 'copper',
    tone: 'amber',
    places: ['line', 'label'],
    holds: (look) => look.has('Cu'),
    text: 'A trace of copper too much kills shrimps and snails. Leave it out, or dose with care, where a tank keeps them.',
  },
  {
    code: 'ammonium',
    tone: 'amber',
    places: ['line', 'label'],
    holds: (look) => look.has('NH4'),
    text: 'Ammonium turns into toxic ammonia as the pH rises. Don’t dose it into an inhabited tank unchecked.',
  },
  {
    code: 'eyes',
    tone: 'amber',
    places: ['bench', 'handOver', 'label'],
    holds: (look) => anyOf(look, 'H314', 'H318', 'H319'),
    text: 'It hurts eyes. Wear goggles; if it gets in an eye, rinse for 15 minutes and get help.',
  },
  {
    code: 'skin',
    tone: 'amber',
    places: ['bench', 'label'],
    holds: (look) => anyOf(look, 'H310', 'H311', 'H312', 'H314', 'H315', 'H317'),
    text: 'It harms skin or sets off an allergy. Wear gloves.',
  },
  {
    code: 'dust',
    tone: 'amber',
    places: ['bench', 'label'],
    holds: (look) =>
      anyOf(look, 'H330', 'H331', 'H332', 'H334', 'H335', 'H341', 'H350', 'H360', 'H372', 'H373'),
    text: 'Its dust is harmful to breathe. Wear a dust mask and pour slowly.',
  },
  {
    code: 'swallowed',
    tone: 'amber',
    places: ['handOver', 'label'],
    holds: (look) => anyOf(look, 'H300', 'H301', 'H302', 'H304'),
    text: 'It is poisonous to swallow. Lock it away from children, pets and food.',
  },
  {
    code: 'water_life',
    tone: 'amber',
    places: ['bench', 'label'],
    holds: (look) => anyOf(look, 'H400', 'H410', 'H411', 'H412', 'H413'),
    text: 'It poisons water life. Sweep spills up dry; nothing goes down a drain.',
  },
  {
    code: 'heat',
    tone: 'amber',
    places: ['line', 'label'],
    holds: (look) => look.keeps('heatsWhenWetted'),
    text: 'It heats up strongly when wetted. Add it slowly to cold water, never water to it.',
  },
  {
    code: 'takes_up_water',
    tone: 'slate',
    places: ['bench', 'handOver'],
    holds: (look) => look.keeps('takesUpWater'),
    text: 'It draws water from the air. Split it on a dry day and close bags and jars within minutes.',
  },
  {
    code: 'loses_water',
    tone: 'slate',
    places: ['bench', 'handOver'],
    holds: (look) => look.keeps('losesWater'),
    text: 'It loses water in dry, warm air and gets stronger. Keep it cool and closed.',
  },
];

/** Cautions for a salt where an act is done, the gravest first. */
export function cautionsFor(facts: SaltFacts, place: CautionPlace): Caution[] {
  const look = lookAt(facts);
  return rules
    .filter((rule) => rule.places.includes(place) && rule.holds(look))
    .map(({ code, tone, text }) => ({ code, tone, text }));
}
