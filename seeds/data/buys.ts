/** Grams wanted on a line by person, and what they would take up to. */
export type DemoPledges = Record<string, number | readonly [wanted: number, upTo: number]>;

/** A line of a demo buy; the salt, who wants how much, and what is not the default. */
export interface DemoLine {
  readonly saltId: string;
  readonly pledges: DemoPledges;
  readonly stepMg?: number;
  readonly note?: string;
}

/** Open: the sack of potassium nitrate is all but full, and some would take what is left of it. */
export const winterLines: readonly DemoLine[] = [
  {
    saltId: 'KNO3',
    pledges: {
      imke: 1200,
      teodor: 2500,
      noor: 600,
      ravi: [1000, 1600],
      pim: 300,
      orla: 750,
      sanna: 1500,
      jory: 2000,
      ines: 800,
      bram: 1800,
      hale: 1000,
      mirela: [1200, 1500],
      kenji: 2400,
      dagny: 900,
      tomasz: 1600,
      amara: 700,
      greta: 1250,
      silas: 1000,
      yara: 650,
    },
  },
  {
    saltId: 'K2SO4',
    pledges: {
      imke: 800,
      teodor: 1000,
      noor: 400,
      pim: 300,
      orla: 500,
      sanna: 1200,
      jory: 900,
      bram: [600, 1000],
      mirela: 700,
      kenji: 1500,
      tomasz: 500,
      greta: 700,
      wim: 250,
    },
  },
  {
    saltId: 'KH2PO4',
    stepMg: 500,
    pledges: {
      imke: 150,
      teodor: 250,
      noor: 100,
      ravi: 200,
      pim: 50,
      sanna: 150,
      jory: 200,
      ines: 100,
      hale: 125,
      kenji: 300,
      dagny: 100,
      amara: 75,
      silas: 100,
    },
  },
  {
    saltId: 'MgSO4.7H2O',
    pledges: {
      imke: [1000, 1500],
      noor: 500,
      ravi: 2000,
      pim: 250,
      orla: 750,
      sanna: 800,
      ines: 600,
      bram: 1000,
      hale: 500,
      kenji: 1500,
      dagny: 400,
      tomasz: 1000,
      yara: 600,
      dora: 300,
    },
  },
  {
    saltId: 'trace',
    stepMg: 500,
    note: 'Mixed and assayed by the maker; copper is in it.',
    pledges: { imke: 50, teodor: 75, ravi: 50, sanna: [40, 60], kenji: 100, greta: 30, noor: 25 },
  },
];

/** At the split: everything has come, half of it is weighed. */
export const autumnLines: readonly DemoLine[] = [
  {
    saltId: 'KNO3',
    pledges: {
      imke: 900,
      noor: 500,
      pim: 400,
      jory: 1500,
      lotte: 800,
      luc: 900,
      otis: 1200,
      petra: 700,
      ravi: 1000,
    },
  },
  {
    saltId: 'MgSO4.7H2O',
    pledges: { noor: 500, lotte: 1000, luc: 600, petra: [900, 1200], ffion: 800, ravi: 700 },
  },
  { saltId: 'KH2PO4', stepMg: 500, pledges: { noor: 100, otis: 150, petra: 100, ffion: 125 } },
];

/** Settled months ago. */
export const summerLines: readonly DemoLine[] = [
  {
    saltId: 'K2SO4',
    pledges: { imke: 1000, orla: 500, noor: 600, sanna: 800, hale: 700, amara: 900 },
  },
  { saltId: 'MgSO4.7H2O', pledges: { imke: 800, noor: 1200, hale: 900, amara: 1000, greta: 700 } },
];

/** A draft for the next season. */
export const springLines: readonly DemoLine[] = [
  { saltId: 'KNO3', pledges: {} },
  { saltId: 'FeDTPA', pledges: {}, stepMg: 500 },
];

export const sedgeholmLines: readonly DemoLine[] = [
  { saltId: 'MgSO4.7H2O', pledges: { noor: 1000, imke: 500, alba: 1500, rune: 800 } },
  { saltId: 'KHCO3', pledges: { noor: 250, cass: 200, rune: 300 } },
];
