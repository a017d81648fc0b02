/** What an organiser does from the sheet, each in a dialog of its own. */
export type OrganiserTool = 'pledge' | 'packs' | 'papers' | 'extend' | 'lock';
