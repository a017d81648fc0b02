import type { Roles } from '#shared/schemas/fields.ts';

/** An invented person of the demo. */
export interface DemoPersonData {
  readonly key: string;
  readonly name: string;
  readonly roles?: Partial<Roles>;
}

/** The Quillmere Water Gardeners; all invented. The first founds the club. */
export const quillmerePeople: readonly DemoPersonData[] = [
  { key: 'teodor', name: 'Teodor Banach-Lind', roles: { steward: true } },
  { key: 'imke', name: 'Imke Sørland', roles: { organiser: true } },
  { key: 'orla', name: 'Orla Fennimore', roles: { treasurer: true } },
  { key: 'ravi', name: 'Ravi Achterlo', roles: { organiser: true } },
  { key: 'noor', name: 'Noor Valdane' },
  { key: 'pim', name: 'Pim Castellet' },
  { key: 'sanna', name: 'Sanna Korpivaara' },
  { key: 'jory', name: 'Jory Mabberly' },
  { key: 'ines', name: 'Inês Quartilho' },
  { key: 'bram', name: 'Bram Oostergaard' },
  { key: 'lotte', name: 'Lotte Windhager' },
  { key: 'hale', name: 'Hale Trewithick' },
  { key: 'mirela', name: 'Mirela Stancovic' },
  { key: 'kenji', name: 'Kenji Aramori' },
  { key: 'ffion', name: 'Ffion Pendarren' },
  { key: 'dagny', name: 'Dagny Holmvik' },
  { key: 'tomasz', name: 'Tomasz Wierzbin' },
  { key: 'amara', name: 'Amara Odunlade' },
  { key: 'luc', name: 'Luc Vermandois' },
  { key: 'greta', name: 'Greta Maulbeck' },
  { key: 'silas', name: 'Silas Thornbury' },
  { key: 'yara', name: 'Yara Benslimane' },
  { key: 'otis', name: 'Otis Llewelyn' },
  { key: 'petra', name: 'Petra Kolmanova' },
];

/** Guests of Quillmere: they have no sign-in. */
export const quillmereGuests = [
  {
    key: 'wim',
    name: 'Wim Hazelbrook',
    contact: 'wim.hazelbrook@quillmere.example',
    vouchedBy: 'ravi',
  },
  { key: 'dora', name: 'Dora Lindqvist', contact: 'comes with Sanna', vouchedBy: 'sanna' },
] as const;

/** A second, small club; Noor and Imke belong to both. */
export const sedgeholmPeople: readonly DemoPersonData[] = [
  { key: 'noor', name: 'Noor Valdane', roles: { organiser: true, treasurer: true, steward: true } },
  { key: 'imke', name: 'Imke Sørland' },
  { key: 'alba', name: 'Alba Ferrante' },
  { key: 'rune', name: 'Rune Askeland' },
  { key: 'cass', name: 'Cass Whitlow' },
];
