import { lookAt } from './cautions.ts';
import type { SaltFacts } from './saltFacts.ts';

/** What a salt must be kept from, and what happens otherwise; `bottle` where that is about one bottle only. */
export type BadMeeting = { what: string; why: string; bottle: boolean };

/** What a salt must not meet, dry or in one bottle. */
export function mustNotMeet(facts: SaltFacts): BadMeeting[] {
  const look = lookAt(facts);
  const carbonate = look.keeps('carbonates');
  const chelate = look.has('C') && look.has('N') && (look.has('Fe') || look.has('Na'));
  const traceMetal = ['Fe', 'Mn', 'Zn', 'Cu', 'Co', 'Ni'].some(look.has) && !look.has('C');
  const meetings: (BadMeeting | false)[] = [
    look.has('NO3') && {
      what: 'paper, wood dust, sugar, oils, solvents, metal powder, acids and heat',
      why: 'it makes a fire burn harder',
      bottle: false,
    },
    carbonate && { what: 'acids', why: 'it fizzes and can burst a closed bottle', bottle: false },
    carbonate && {
      what: 'calcium, magnesium, ammonium and trace metal salts',
      why: 'a solid or ammonia gas forms',
      bottle: true,
    },
    look.keeps('acids') && {
      what: 'carbonates',
      why: 'they fizz and can burst a closed bottle',
      bottle: false,
    },
    look.has('NH4') && {
      what: 'carbonates and other alkaline salts',
      why: 'ammonia gas comes off',
      bottle: false,
    },
    look.has('Ca') &&
      !carbonate && {
        what: 'sulfates, phosphates and carbonates',
        why: 'a solid forms',
        bottle: true,
      },
    look.has('Mg') &&
      !look.has('Ca') && {
        what: 'dipotassium phosphate and carbonates',
        why: 'a solid forms',
        bottle: true,
      },
    look.has('P') && {
      what: 'calcium salts and unchelated trace metals',
      why: 'a solid forms',
      bottle: true,
    },
    look.has('S') &&
      !look.has('Ca') && { what: 'calcium salts', why: 'gypsum forms', bottle: true },
    traceMetal && {
      what: 'phosphates, carbonates and anything alkaline',
      why: 'the metal falls out',
      bottle: true,
    },
    look.keeps('heatsWhenWetted') && {
      what: 'a little water',
      why: 'it heats up strongly: add it to much cold water',
      bottle: false,
    },
    chelate && { what: 'strong light', why: 'light destroys chelates', bottle: false },
    look.keeps('spoilsInAirOrLight') &&
      !chelate && { what: 'air and light', why: 'it spoils', bottle: false },
  ];
  return meetings.filter((meeting) => meeting !== false);
}
